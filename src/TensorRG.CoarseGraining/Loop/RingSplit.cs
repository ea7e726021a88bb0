using System.Collections.Immutable;
using System.Numerics;
using TensorRG.Tensors;
using TensorRG.Tensors.Decompositions;

namespace TensorRG.CoarseGraining.Loop;

/// <summary>
/// Splits the tensors of a ring between their outer legs by truncated singular value decompositions. The bonds of the ring carry the square roots of the
/// filter's singular values meanwhile: what the rest of the ring lets through counts, what it suppresses does not.
/// </summary>
/// <typeparam name="T">Element type.</typeparam>
/// <param name="algebra">Contractions and kernels.</param>
/// <param name="cut">How many states the new bonds keep.</param>
internal sealed class RingSplit<T>(TensorAlgebra<T> algebra, CutRule cut)
    where T : unmanaged, INumberBase<T>
{
    /// <summary>Eight pieces, two a tensor: S_2i[left, first outer, new] and S_(2i+1)[new, second outer, right].</summary>
    /// <param name="ring">M_0 to M_3.</param>
    /// <param name="weights">Weights of the bonds behind M_0 to M_3.</param>
    /// <param name="discarded">Largest discarded weight.</param>
    /// <param name="notices">Remarks on the cuts.</param>
    public Tensor<T>[] Pieces(Tensor<T>[] ring, BondWeights[] weights, out double discarded, out ImmutableArray<string> notices)
    {
        var pieces = new Tensor<T>[8];
        (discarded, notices) = (0, []);
        for (int i = 0; i < 4; i++)
        {
            BondWeights left = weights[(i + 3) % 4], right = weights[i];
            using Tensor<T> half = TensorAlgebra<T>.ScaleLeg(ring[i], 0, left.Power(0.5));
            using Tensor<T> weighted = TensorAlgebra<T>.ScaleLeg(half, 3, right.Power(0.5));
            TruncatedSvd<T> svd = DenseSvd.Compute(algebra.Kernels, weighted, [0, 1], [2, 3], cut);
            pieces[2 * i] = Piece(svd.U, 0, left, 2, svd.Weights);
            pieces[(2 * i) + 1] = Piece(svd.V, 2, right, 0, svd.Weights);
            discarded = Math.Max(discarded, svd.Truncation.DiscardedFraction);
            notices = [.. notices.Union(svd.Truncation.Notices)];
        }

        return pieces;
    }

    private static Tensor<T> Piece(Tensor<T> vectors, int oldAxis, BondWeights old, int newAxis, BondWeights singular)
    {
        using Tensor<T> unweighted = TensorAlgebra<T>.ScaleLeg(vectors, oldAxis, old.Power(-0.5));
        return TensorAlgebra<T>.ScaleLeg(unweighted, newAxis, singular.Power(0.5));
    }
}
