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

    private readonly PairJoin<T> _pair = new(algebra, settings.Cut);

    /// <inheritdoc/>
    public int ShapePeriod => 2;

    /// <inheritdoc/>
    public NetworkState<T> Begin(Tensor<T> site) => NetworkState<T>.Of(Site, site.Clone());

    /// <inheritdoc/>
    public CoarseStep<T> Step(NetworkState<T> state, int step)
    {
        bool vertical = step % 2 == 1;
        using Tensor<T> oriented = vertical ? state[Site].Clone() : state[Site].Permute(1, 0, 3, 2);
        TruncatedEigen<T> isometry = _pair.Isometry(oriented);
        using Tensor<T> joined = _pair.Join(oriented, isometry.Vectors);
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
}
