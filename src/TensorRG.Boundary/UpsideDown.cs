using System.Numerics;
using TensorRG.Tensors;

namespace TensorRG.Boundary;

/// <summary>The network turned upside down.</summary>
internal static class UpsideDown
{
    private const double Equal = 1e-14;

    /// <summary>A'[u, l, d, r] = A[d, l, u, r], with the vertical arrows again from u to d.</summary>
    public static Tensor<T> Of<T>(Tensor<T> row)
        where T : unmanaged, INumberBase<T>
    {
        using Tensor<T> swapped = row.Permute(2, 1, 0, 3);
        using Tensor<T> half = swapped.ReverseArrow(0);
        return half.ReverseArrow(2);
    }

    /// <summary>Whether two tensors are equal to round-off.</summary>
    public static bool Same<T>(Tensor<T> a, Tensor<T> b)
        where T : unmanaged, INumberBase<T>
    {
        if (!a.Legs.SequenceEqual(b.Legs))
            return false;
        using Tensor<T> difference = TensorAlgebra<T>.Add(a, b, -T.One);
        return TensorAlgebra<T>.LargestMagnitude(difference) <= Equal * TensorAlgebra<T>.LargestMagnitude(a);
    }
}
