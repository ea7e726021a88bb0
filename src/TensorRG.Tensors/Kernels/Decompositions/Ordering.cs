namespace TensorRG.Tensors.Kernels.Decompositions;

/// <summary>Stable order of spectra.</summary>
internal static class Ordering
{
    /// <summary>Indices by descending key; equal keys keep their order.</summary>
    public static int[] Descending(ReadOnlySpan<double> keys)
    {
        int[] order = new int[keys.Length];
        double[] negative = new double[keys.Length];
        for (int i = 0; i < order.Length; i++)
        {
            order[i] = i;
            negative[i] = -keys[i];
        }

        Array.Sort(order, (x, y) => negative[x] != negative[y] ? negative[x].CompareTo(negative[y]) : x.CompareTo(y));
        return order;
    }
}
