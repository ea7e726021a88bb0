using System.Numerics;
using TensorRG.Tensors;

namespace TensorRG.CoarseGraining.Loop;

/// <summary>
/// The four tensors round one plaquette of the checkerboard, clockwise from the north-west: A, B, A, B, read as M[bond to the previous, first outer leg,
/// second outer leg, bond to the next].
/// </summary>
internal static class PlaquetteRing
{
    /// <summary>Order in which the legs u, l, d, r of each corner's tensor are read.</summary>
    private static readonly int[][] Orders = [[2, 1, 0, 3], [1, 0, 3, 2], [0, 3, 2, 1], [3, 2, 1, 0]];

    /// <summary>The leg of A on bond i of the ring, which joins tensors i and i + 1; bond i has the same kind wherever it occurs.</summary>
    private static readonly int[] OnA = [3, 0, 1, 2];

    /// <summary>The leg of B on bond i of the ring.</summary>
    private static readonly int[] OnB = [1, 2, 3, 0];

    /// <summary>The ring; the tensors are new.</summary>
    /// <param name="a">A[u, l, d, r].</param>
    /// <param name="b">B[u, l, d, r].</param>
    public static Tensor<T>[] Of<T>(Tensor<T> a, Tensor<T> b)
        where T : unmanaged, INumberBase<T>
        => [a.Permute(Orders[0]), b.Permute(Orders[1]), a.Permute(Orders[2]), b.Permute(Orders[3])];

    /// <summary>The leg of A on a kind of bond.</summary>
    /// <param name="bond">0 to 3.</param>
    public static int LegOfA(int bond) => OnA[bond];

    /// <summary>The leg of B on a kind of bond.</summary>
    /// <param name="bond">0 to 3.</param>
    public static int LegOfB(int bond) => OnB[bond];
}
