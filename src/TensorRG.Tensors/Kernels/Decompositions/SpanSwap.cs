namespace TensorRG.Tensors.Kernels.Decompositions;

/// <summary>Exchange of two columns.</summary>
internal static class SpanSwap
{
    /// <summary>Exchanges the contents of two spans of equal length.</summary>
    public static void Swap<T>(this Span<T> left, Span<T> right)
    {
        for (int i = 0; i < left.Length; i++)
            (left[i], right[i]) = (right[i], left[i]);
    }
}
