using System.Numerics;
using TensorRG.Tensors;

namespace TensorRG.CoarseGraining.Plaquette;

/// <summary>Decides whether a step forms the four-leg tensor, from operation counts weighed by measurement.</summary>
internal static class PlaquetteCost
{
    /// <summary>Largest explicit tensor, in elements of the dense array: 256 MB of doubles.</summary>
    private const double LargestTensor = 1 << 25;

    /// <summary>Whether forming T costs less than applying the ring to blocks of vectors.</summary>
    public static bool PrefersTensor<T>(Tensor<T> first, Tensor<T> second, int bondDimension)
        where T : unmanaged, INumberBase<T>
    {
        double x = first.Legs[0].Dimension, y = second.Legs[0].Dimension, inner = Math.Max(first.Legs[1].Dimension, bondDimension / 2.0);
        double elements = x * x * y * y;
        return elements <= LargestTensor && Math.Min(x, y) * inner <= 64 * 64;
    }
}
