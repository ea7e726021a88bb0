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
    /// <summary>Share of a derivative in the density below which it is round-off: that of an observable that is constant.</summary>
    private const double LeastShare = 1e-26;

    /// <summary>U[l1, l2, x] from the side that loses less; for equal losses the left.</summary>
    public TruncatedEigen<T> Isometry(Tensor<T> a) => Isometry(a, [], 0);

    /// <summary>
    /// U[l1, l2, x] from the density M M^H of the stacked pair, with those of the derivatives M' added: the pair with B in place of A in either of the two,
    /// summed. Of each the trace is <paramref name="weight"/> times that of the first.
    /// </summary>
    /// <param name="a">A.</param>
    /// <param name="derivatives">The tensors B; they may change the charge.</param>
    /// <param name="weight">Their weight, not negative.</param>
    public TruncatedEigen<T> Isometry(Tensor<T> a, IReadOnlyList<Tensor<T>> derivatives, double weight)
    {
        TruncatedEigen<T> left = Leading(a, derivatives, weight, side: 1);
        TruncatedEigen<T> right = Leading(a, derivatives, weight, side: 3);
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

    private TruncatedEigen<T> Leading(Tensor<T> a, IReadOnlyList<Tensor<T>> derivatives, double weight, int side)
    {
        Tensor<T> density = Density(a, a, a, a, side);
        double trace = Trace(density);
        foreach (Tensor<T> b in derivatives)
        {
            using Tensor<T> added = Derivative(a, b, side);
            double share = Trace(added);
            if (share > LeastShare * trace)
                Add(ref density, added, weight * trace / share);
        }

        using Tensor<T> owned = density;
        return GradedEigen.Compute(algebra.Kernels, owned, cut);
    }

    /// <summary>M' M'^H, M' being B over A plus A over B.</summary>
    private Tensor<T> Derivative(Tensor<T> a, Tensor<T> b, int side)
    {
        Tensor<T> sum = Density(b, b, a, a, side);
        foreach ((Tensor<T> x, Tensor<T> y) in ((Tensor<T>, Tensor<T>)[])[(b, a), (a, b), (a, a)])
        {
            using Tensor<T> term = Density(x, y, x == b ? a : b, y == b ? a : b, side);
            Add(ref sum, term, 1);
        }

        return sum;
    }

    /// <summary>M M^H on the pair of legs of one side: M is the upper tensor over the lower one, and M^H is made of tensors of its own.</summary>
    private Tensor<T> Density(Tensor<T> upper, Tensor<T> upperAdjoint, Tensor<T> lower, Tensor<T> lowerAdjoint, int side)
    {
        int other = 4 - side;
        bool left = side == 1;
        using Tensor<T> upperConjugate = upperAdjoint.Conjugate(), lowerConjugate = lowerAdjoint.Conjugate();
        using Tensor<T> top = algebra.Contract(upper, [0, other], upperConjugate, [0, other]);
        using Tensor<T> bottom = algebra.Contract(lower, [2, other], lowerConjugate, [2, other]);
        using Tensor<T> gram = algebra.Contract(top, left ? [1, 3] : [0, 2], bottom, [0, 2]);
        return gram.Permute(0, 2, 1, 3);
    }

    private static double Trace(Tensor<T> density) => Scalar.RealPart(TensorAlgebra<T>.Trace(density, [0, 1], [2, 3]).Elements[0]);

    private static void Add(ref Tensor<T> sum, Tensor<T> term, double factor)
    {
        using Tensor<T> before = sum;
        sum = TensorAlgebra<T>.Add(before, term, Scalar.FromReal<T>(factor));
    }
}
