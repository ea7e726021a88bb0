using System.Numerics;
using TensorRG.Tensors;
using TensorRG.Tensors.Decompositions;

namespace TensorRG.CoarseGraining.Loop;

/// <summary>
/// Entanglement filtering (S. Yang, Z.-C. Gu, X.-G. Wen, Phys. Rev. Lett. 118, 110504 (2017)): triangular factors are passed round the plaquette until they
/// settle; what they annihilate on a bond is entanglement that never leaves the plaquette. With L from the left and R from the right of a bond and
/// L R = U s V the bond is replaced by R V^H s^(-1/2) times s^(-1/2) U^H L.
/// </summary>
/// <remarks>Every bond of the network belongs to one plaquette of the colour that is filtered, so that the same factors serve the outer legs.</remarks>
/// <typeparam name="T">Element type.</typeparam>
/// <param name="algebra">Contractions and kernels.</param>
internal sealed class EntanglementFilter<T>(TensorAlgebra<T> algebra)
    where T : unmanaged, INumberBase<T>
{
    public static int Passes = 60;
    public static double Settled = 1e-13;
    public static double Floor = 1e-12;
    private readonly TensorAlgebra<T> _algebra = algebra;

    /// <summary>A, B with all four kinds of bonds filtered, and the singular values on the bonds of the ring: A.r, B.d, A.l, B.u.</summary>
    public (Tensor<T> A, Tensor<T> B, BondWeights[] Weights) Apply(Tensor<T> a, Tensor<T> b)
    {
        Tensor<T>[] ring = PlaquetteRing.Of(a, b);
        Tensor<T>[] left = FromLeft(ring), right = FromRight(ring);
        var weights = new BondWeights[4];
        int[] legA = [3, 0, 1, 2], legB = [1, 2, 3, 0];
        for (int bond = 0; bond < 4; bond++)
        {
            using Tensor<T> product = _algebra.Contract(left[bond], [1], right[bond], [1]);
            TruncatedSvd<T> svd = DenseSvd.Compute(_algebra.Kernels, product, [0], [1], new CutRule(int.MaxValue, 0, Floor));
            weights[bond] = svd.Weights.Scale(1 / svd.Weights.Largest);
            BondWeights root = svd.Weights.Power(-0.5);
            using Tensor<T> v = svd.V.Conjugate(), u = svd.U.Conjugate();
            using Tensor<T> forward = TensorAlgebra<T>.ScaleLeg(_algebra.Contract(right[bond], [0], v, [1]), 1, root);  // [left of next, y]
            using Tensor<T> backward = TensorAlgebra<T>.ScaleLeg(_algebra.Contract(left[bond], [0], u, [0]), 1, root); // [right of this, y]
            (a, b) = bond % 2 == 0
                ? (Replace(a, legA[bond], forward), Replace(b, legB[bond], backward))
                : (Replace(a, legA[bond], backward), Replace(b, legB[bond], forward));
        }

        return (a, b, weights);
    }

    private Tensor<T> Replace(Tensor<T> tensor, int axis, Tensor<T> factor)
    {
        using Tensor<T> moved = _algebra.Contract(tensor, [axis], factor, [0]);
        int[] order = [0, 1, 2];
        return moved.Permute([.. order[..axis], 3, .. order[axis..]]);
    }

    /// <summary>L[k, right bond of tensor i] for i = 0..3.</summary>
    private Tensor<T>[] FromLeft(Tensor<T>[] ring)
    {
        var found = new Tensor<T>[4];
        Tensor<T>? last = null;
        for (int pass = 0; pass < Passes; pass++)
        {
            Tensor<T>? before = found[3];
            for (int i = 0; i < 4; i++)
            {
                Tensor<T> pushed = last is null ? ring[i] : _algebra.Contract(last, [1], ring[i], [0]);
                last = Unit(GradedQr.Compute(_algebra.Kernels, pushed, [0, 1, 2], [3]).R);
                found[i] = last;
            }

            if (before is not null && Change(before, last!) < Settled)
                break;
        }

        return found;
    }

    /// <summary>R[k, left bond of tensor i + 1] for i = 0..3.</summary>
    private Tensor<T>[] FromRight(Tensor<T>[] ring)
    {
        var found = new Tensor<T>[4];
        Tensor<T>? last = null;
        for (int pass = 0; pass < Passes; pass++)
        {
            Tensor<T>? before = found[3];
            for (int i = 2; i >= -1; i--)
            {
                Tensor<T> tensor = ring[i + 1];
                Tensor<T> pushed = last is null ? tensor : _algebra.Contract(tensor, [3], last, [1]);
                last = Unit(GradedQr.Compute(_algebra.Kernels, pushed, [1, 2, 3], [0]).R);
                found[(i + 4) % 4] = last;
            }

            if (before is not null && Change(before, last!) < Settled)
                break;
        }

        return found;
    }

    private static Tensor<T> Unit(Tensor<T> tensor) => TensorAlgebra<T>.Scale(tensor, Scalar.FromReal<T>(1 / TensorAlgebra<T>.Norm(tensor)));

    private static double Change(Tensor<T> before, Tensor<T> after)
        => before.Legs.SequenceEqual(after.Legs) ? TensorAlgebra<T>.Norm(TensorAlgebra<T>.Add(after, before, -T.One)) : double.PositiveInfinity;
}
