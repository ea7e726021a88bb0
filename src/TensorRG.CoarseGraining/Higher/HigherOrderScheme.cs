using System.Numerics;
using TensorRG.Tensors;
using TensorRG.Tensors.Decompositions;

namespace TensorRG.CoarseGraining.Higher;

/// <summary>
/// HOTRG: joins two tensors in one direction and cuts the doubled bonds by an isometry from the higher-order singular
/// value decomposition, left or right, whichever discards less; directions alternate, vertical first (Z. Y. Xie, J. Chen, M. P. Qin,
/// J. W. Zhu, L. P. Yang, T. Xiang, Phys. Rev. B 86, 045139 (2012)). Cost O(chi^7), memory O(chi^5).
/// </summary>
/// <typeparam name="T">Element type.</typeparam>
/// <param name="algebra">Contractions and kernels.</param>
/// <param name="settings">The user's choices.</param>
internal sealed class HigherOrderScheme<T>(TensorAlgebra<T> algebra, SchemeSettings settings) : IScheme<T>
    where T : unmanaged, INumberBase<T>
{
    private const string Site = "site";

    /// <inheritdoc/>
    public int ShapePeriod => 2;

    /// <inheritdoc/>
    public NetworkState<T> Begin(Tensor<T> site) => NetworkState<T>.Of(Site, site.Clone());

    /// <inheritdoc/>
    public CoarseStep<T> Step(NetworkState<T> state, int step)
    {
        bool vertical = step % 2 == 1;
        using Tensor<T> oriented = vertical ? state[Site].Clone() : state[Site].Permute(1, 0, 3, 2);
        TruncatedEigen<T> isometry = Isometry(oriented);
        using Tensor<T> joined = Join(oriented, isometry.Vectors);
        Tensor<T> site = vertical ? joined.Clone() : joined.Permute(1, 0, 3, 2);
        return new CoarseStep<T>(NetworkState<T>.Of(Site, site), isometry.Truncation.DiscardedFraction, [.. isometry.Truncation.Notices]);
    }

    /// <inheritdoc/>
    public Tensor<T> TransferMatrix(NetworkState<T> state) => TensorAlgebra<T>.Trace(state[Site], [1], [3]);

    /// <inheritdoc/>
    public NetworkState<T> Rescale(NetworkState<T> state, double factor) => state.Rescaled(Site, factor);

    /// <inheritdoc/>
    public (Leg Vertical, Leg Horizontal) Bonds(NetworkState<T> state) => (state[Site].Legs[0], state[Site].Legs[1]);

    /// <inheritdoc/>
    public double AspectRatio(int step) => step % 2 == 1 ? 2 : 1;

    /// <summary>U[l1, l2, x] from the side that loses less; for equal losses the left.</summary>
    private TruncatedEigen<T> Isometry(Tensor<T> a)
    {
        using Tensor<T> conjugate = a.Conjugate();
        TruncatedEigen<T> left = Leading(a, conjugate, side: 1, other: 3);
        TruncatedEigen<T> right = Leading(a, conjugate, side: 3, other: 1);
        if (left.Truncation.DiscardedFraction <= right.Truncation.DiscardedFraction)
            return left;
        using Tensor<T> dual = right.Vectors.Conjugate();
        return right with { Vectors = dual.ReverseArrow(2) };
    }

    /// <summary>Leading eigenvectors of M M^H on the pair of legs of one side, M being the two stacked tensors.</summary>
    private TruncatedEigen<T> Leading(Tensor<T> a, Tensor<T> conjugate, int side, int other)
    {
        using Tensor<T> top = algebra.Contract(a, [0, other], conjugate, [0, other]);
        using Tensor<T> bottom = algebra.Contract(a, [2, other], conjugate, [2, other]);
        bool left = side == 1;
        using Tensor<T> gram = algebra.Contract(top, left ? [1, 3] : [0, 2], bottom, [0, 2]);
        using Tensor<T> ordered = gram.Permute(0, 2, 1, 3);
        return GradedEigen.Compute(algebra.Kernels, ordered, settings.Cut);
    }

    /// <summary>A'[u, x, d, x'] = conj(U)[l1, l2, x] A[u, l1, m, r1] A[m, l2, d, r2] U[r1, r2, x'].</summary>
    private Tensor<T> Join(Tensor<T> a, Tensor<T> isometry)
    {
        using Tensor<T> conjugate = isometry.Conjugate();
        using Tensor<T> top = algebra.Contract(a, [1], conjugate, [0]);
        using Tensor<T> bottom = algebra.Contract(a, [3], isometry, [1]);
        return algebra.Contract(top, [1, 2, 3], bottom, [0, 3, 1]);
    }
}
