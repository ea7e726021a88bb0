using System.Numerics;
using TensorRG.Tensors;
using TensorRG.Tensors.Decompositions;

namespace TensorRG.CoarseGraining.Loop;

/// <summary>
/// Entanglement filtering (S. Yang, Z.-C. Gu, X.-G. Wen, Phys. Rev. Lett. 118, 110504 (2017)): triangular factors are passed round the plaquette until
/// they settle; what they annihilate on a bond is entanglement that never leaves the plaquette. With L from the left and R from the right of a bond and
/// L R = U s V the bond is replaced by R V^H s^(-1/2) times s^(-1/2) U^H L.
/// </summary>
/// <remarks>
/// Every bond of the network belongs to just one plaquette of the colour that is filtered, and all of these are alike: the factors serve both
/// tensors wherever the bond occurs. As they change the outer legs, which the factors depend on, the filter is applied more than once; what it cannot
/// remove it brings into a gauge that no longer depends on the one it was given.
/// </remarks>
/// <typeparam name="T">Element type.</typeparam>
/// <param name="algebra">Contractions and kernels.</param>
internal sealed class EntanglementFilter<T>(TensorAlgebra<T> algebra)
    where T : unmanaged, INumberBase<T>
{
    /// <summary>Most passes round the plaquette.</summary>
    private const int Passes = 60;

    /// <summary>Change of a factor of unit norm over one pass below which it has settled.</summary>
    private const double Settled = 1e-13;

    /// <summary>Singular values below this share of the largest are what is removed.</summary>
    private const double Floor = 1e-12;

    /// <summary>How often the filter is applied.</summary>
    private const int Repeats = 3;

    private readonly RingTransfers<T> _transfers = new(algebra);
    private readonly CutRule _cut = new(int.MaxValue, 0, Floor);

    /// <summary>Both tensors with all four kinds of bonds filtered.</summary>
    public FilteredPair<T> Apply(Tensor<T> a, Tensor<T> b)
    {
        FilteredPair<T> pair = Once(a, b);
        for (int n = 1; n < Repeats; n++)
        {
            FilteredPair<T> before = pair;
            pair = Once(before.A, before.B);
            before.A.Dispose();
            before.B.Dispose();
        }

        return pair;
    }

    private FilteredPair<T> Once(Tensor<T> a, Tensor<T> b)
    {
        Tensor<T>[] ring = PlaquetteRing.Of(a, b);
        Tensor<T>[] left = FromLeft(ring), right = FromRight(ring);
        var weights = new BondWeights[4];
        Tensor<T>[] inner = [.. ring];
        for (int bond = 0; bond < 4; bond++)
        {
            using Tensor<T> product = algebra.Contract(left[bond], [1], right[bond], [1]);
            TruncatedSvd<T> svd = DenseSvd.Compute(algebra.Kernels, product, [0], [1], _cut);
            weights[bond] = svd.Weights.Scale(1 / svd.Weights.Largest);
            using Tensor<T> toNext = Projector(right[bond], svd.V, 1, svd.Weights), toPrevious = Projector(left[bond], svd.U, 0, svd.Weights);
            bool fromA = bond % 2 == 0;
            a = Replace(a, PlaquetteRing.LegOfA(bond), fromA ? toNext : toPrevious);
            b = Replace(b, PlaquetteRing.LegOfB(bond), fromA ? toPrevious : toNext);
            inner[bond] = Replace(inner[bond], 3, toNext);
            inner[(bond + 1) % 4] = Replace(inner[(bond + 1) % 4], 0, toPrevious);
        }

        return new FilteredPair<T>(TensorAlgebra<T>.Scale(a, Lost(ring, inner)), b, weights);
    }

    /// <summary>
    /// The number that makes up for what was removed: a line that stays in the plaquette is a factor of the ring, and the factors that settled know only its
    /// leading part. There is one such plaquette for each pair A, B.
    /// </summary>
    private T Lost(Tensor<T>[] ring, Tensor<T>[] filtered)
    {
        T overlap = _transfers.Trace([.. ring.Zip(filtered, _transfers.Whole)]);
        double norm = _transfers.Closed([.. filtered.Select(_transfers.Whole)]);
        return norm > 0 ? overlap / Scalar.FromReal<T>(norm) : T.One;
    }

    /// <summary>P[bond, kept] = s^(-1/2) sum over k of F[k, bond] conj(W[k, kept]).</summary>
    private Tensor<T> Projector(Tensor<T> factor, Tensor<T> vectors, int axis, BondWeights weights)
    {
        using Tensor<T> dual = vectors.Conjugate();
        using Tensor<T> product = algebra.Contract(factor, [0], dual, [axis]);
        return TensorAlgebra<T>.ScaleLeg(product, 1, weights.Power(-0.5));
    }

    private Tensor<T> Replace(Tensor<T> tensor, int axis, Tensor<T> factor)
    {
        using Tensor<T> moved = algebra.Contract(tensor, [axis], factor, [0]);
        int[] order = [0, 1, 2];
        return moved.Permute([.. order[..axis], 3, .. order[axis..]]);
    }

    /// <summary>L[k, bond i] for the four bonds: the triangular factor of what lies to the left.</summary>
    private Tensor<T>[] FromLeft(Tensor<T>[] ring)
        => Circulate([0, 1, 2, 3], (last, i) => last is null ? ring[i].Clone() : algebra.Contract(last, [1], ring[i], [0]), [0, 1, 2], 3);

    /// <summary>R[k, bond i]: the triangular factor of what lies to the right, which begins with tensor i + 1.</summary>
    private Tensor<T>[] FromRight(Tensor<T>[] ring)
        => Circulate(
            [2, 1, 0, 3],
            (last, i) => last is null ? ring[(i + 1) % 4].Clone() : algebra.Contract(ring[(i + 1) % 4], [3], last, [1]),
            [1, 2, 3],
            0);

    private Tensor<T>[] Circulate(int[] bonds, Func<Tensor<T>?, int, Tensor<T>> push, int[] rows, int column)
    {
        var found = new Tensor<T>[4];
        Tensor<T>? last = null;
        for (int pass = 0; pass < Passes; pass++)
        {
            Tensor<T> before = found[bonds[3]];
            foreach (int bond in bonds)
            {
                using Tensor<T> pushed = push(last, bond);
                last = Unit(GradedQr.Compute(algebra.Kernels, pushed, rows, [column]).R);
                found[bond] = last;
            }

            if (before is not null && Change(before, last!) < Settled)
                break;
        }

        return found;
    }

    private static Tensor<T> Unit(Tensor<T> tensor)
    {
        double norm = TensorAlgebra<T>.Norm(tensor);
        return norm > 0 && double.IsFinite(norm)
            ? TensorAlgebra<T>.Scale(tensor, Scalar.FromReal<T>(1 / norm))
            : throw new ArithmeticException($"The tensors of a plaquette multiply to a tensor of norm {norm}: all weights cancel or vanish, or the numbers left the range of doubles.");
    }

    private static double Change(Tensor<T> before, Tensor<T> after)
    {
        if (!before.Legs.SequenceEqual(after.Legs))
            return double.PositiveInfinity;
        using Tensor<T> difference = TensorAlgebra<T>.Add(after, before, -T.One);
        return TensorAlgebra<T>.Norm(difference);
    }
}
