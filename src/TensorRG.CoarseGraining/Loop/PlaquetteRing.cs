using System.Numerics;
using TensorRG.Tensors;

namespace TensorRG.CoarseGraining.Loop;

/// <summary>
/// The four tensors round one plaquette, clockwise from the north-west: A, B, A, B with the legs [bond to the previous, first outer, second outer,
/// bond to the next].
/// </summary>
internal static class PlaquetteRing
{
    /// <summary>Order in which the legs u, l, d, r of a corner's tensor are read.</summary>
    private static readonly int[][] Orders = [[2, 1, 0, 3], [1, 0, 3, 2], [0, 3, 2, 1], [3, 2, 1, 0]];

    /// <summary>The ring; the tensors are new.</summary>
    /// <param name="a">A[u, l, d, r].</param>
    /// <param name="b">B[u, l, d, r].</param>
    public static Tensor<T>[] Of<T>(Tensor<T> a, Tensor<T> b)
        where T : unmanaged, INumberBase<T>
        => [a.Permute(Orders[0]), b.Permute(Orders[1]), a.Permute(Orders[2]), b.Permute(Orders[3])];
}
