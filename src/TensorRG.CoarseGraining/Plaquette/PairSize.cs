using System.Numerics;
using TensorRG.Tensors;

namespace TensorRG.CoarseGraining.Plaquette;

/// <summary>Decides whether pairs of pieces fit in memory.</summary>
internal static class PairSize
{
    /// <summary>Most elements of a dense pair: 256 MB of doubles, four of which may exist at once.</summary>
    private const double MostElements = 1 << 25;

    /// <summary>Whether both pairs of the ring are small enough to be formed.</summary>
    public static bool Fits<T>(Tensor<T> a, Tensor<T> b, Tensor<T> c, Tensor<T> d)
        where T : unmanaged, INumberBase<T>
        => Elements(a, b) <= MostElements && Elements(c, d) <= MostElements;

    private static double Elements<T>(Tensor<T> first, Tensor<T> second)
        where T : unmanaged, INumberBase<T>
        => (double)first.Legs[0].Dimension * first.Legs[1].Dimension * second.Legs[0].Dimension * second.Legs[2].Dimension;
}
