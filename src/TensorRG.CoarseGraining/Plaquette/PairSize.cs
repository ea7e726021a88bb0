using System.Numerics;
using TensorRG.Tensors;

namespace TensorRG.CoarseGraining.Plaquette;

/// <summary>Decides whether pairs of pieces fit in memory.</summary>
internal static class PairSize
{
    /// <summary>Most elements of a dense pair: 128 MB of doubles, five of which may exist at once; grading divides that by the number of charges.</summary>
    private const double MostElements = 1 << 24;

    /// <summary>A dense pair at bond dimension 48.</summary>
    private const double SmallElements = 48 * 48 * 48 * 48;

    /// <summary>Whether both pairs of the ring are small enough to be formed.</summary>
    public static bool Fits<T>(Tensor<T> a, Tensor<T> b, Tensor<T> c, Tensor<T> d)
        where T : unmanaged, INumberBase<T>
        => Elements(a, b) <= MostElements && Elements(c, d) <= MostElements;

    /// <summary>Whether matrix products of this size gain little from a second thread.</summary>
    public static bool IsSmall<T>(Tensor<T> a, Tensor<T> b)
        where T : unmanaged, INumberBase<T>
        => Elements(a, b) <= SmallElements;

    private static double Elements<T>(Tensor<T> first, Tensor<T> second)
        where T : unmanaged, INumberBase<T>
        => (double)first.Legs[0].Dimension * first.Legs[1].Dimension * second.Legs[0].Dimension * second.Legs[2].Dimension;
}
