using System.Numerics;
using TensorRG.Tensors;
using TensorRG.Tensors.Decompositions;

namespace TensorRG.CoarseGraining.Higher;

/// <summary>
/// The two halves of an HOTRG step in the vertical direction: the isometry on a doubled horizontal bond, and the stack of two tensors closed with it.
/// Cost O(chi^7), memory O(chi^5).
/// </summary>
/// <typeparam name="T">Element type.</typeparam>
/// <param name="algebra">Contractions and kernels.</param>
/// <param name="cut">How many states the new bond keeps.</param>
internal sealed class PairJoin<T>(TensorAlgebra<T> algebra, CutRule cut)
    where T : unmanaged, INumberBase<T>
{
    /// <summary>U[l1, l2, x] from the side that loses less; for equal losses the left.</summary>
    public TruncatedEigen<T> Isometry(Tensor<T> a)
    {
        using Tensor<T> conjugate = a.Conjugate();
        TruncatedEigen<T> left = Leading(a, conjugate, side: 1, other: 3);
        TruncatedEigen<T> right = Leading(a, conjugate, side: 3, other: 1);
        if (left.Truncation.DiscardedFraction <= right.Truncation.DiscardedFraction)
            return left;
        using Tensor<T> dual = right.Vectors.Conjugate();
        return right with { Vectors = dual.ReverseArrow(2) };
    }

    /// <summary>conj(U)[l1, l2, x] A[u, l1, m, r1], legs u, m, r1, l2, x: the upper tensor with the isometry of the left bonds.</summary>
    public Tensor<T> Top(Tensor<T> a, Tensor<T> isometry)
    {
        using Tensor<T> conjugate = isometry.Conjugate();
        return algebra.Contract(a, [1], conjugate, [0]);
    }

    /// <summary>A[m, l2, d, r2] U[r1, r2, x'], legs m, l2, d, r1, x': the lower tensor with the isometry of the right bonds.</summary>
    public Tensor<T> Bottom(Tensor<T> a, Tensor<T> isometry) => algebra.Contract(a, [3], isometry, [1]);

    /// <summary>A'[u, x, d, x'] of the two.</summary>
    public Tensor<T> Close(Tensor<T> top, Tensor<T> bottom) => algebra.Contract(top, [1, 2, 3], bottom, [0, 3, 1]);

    /// <summary>A'[u, x, d, x'] = conj(U)[l1, l2, x] A[u, l1, m, r1] A[m, l2, d, r2] U[r1, r2, x'].</summary>
    public Tensor<T> Join(Tensor<T> a, Tensor<T> isometry)
    {
        using Tensor<T> top = Top(a, isometry);
        using Tensor<T> bottom = Bottom(a, isometry);
        return Close(top, bottom);
    }

    /// <summary>Leading eigenvectors of M M^H on the pair of legs of one side, M being the two stacked tensors.</summary>
    private TruncatedEigen<T> Leading(Tensor<T> a, Tensor<T> conjugate, int side, int other)
    {
        using Tensor<T> top = algebra.Contract(a, [0, other], conjugate, [0, other]);
        using Tensor<T> bottom = algebra.Contract(a, [2, other], conjugate, [2, other]);
        bool left = side == 1;
        using Tensor<T> gram = algebra.Contract(top, left ? [1, 3] : [0, 2], bottom, [0, 2]);
        using Tensor<T> ordered = gram.Permute(0, 2, 1, 3);
        return GradedEigen.Compute(algebra.Kernels, ordered, cut);
    }
}
