namespace TensorRG.Tensors;

/// <summary>Small helpers on lists of axes.</summary>
internal static class Axes
{
    /// <summary>The axes of a tensor of some rank that are not in a list, ascending.</summary>
    public static int[] Others(int rank, ReadOnlySpan<int> taken)
    {
        int[] others = new int[rank - taken.Length];
        int n = 0;
        for (int axis = 0; axis < rank; axis++)
        {
            if (taken.Contains(axis))
                continue;
            if (n == others.Length)
                throw new ArgumentException("An axis is named twice.", nameof(taken));
            others[n++] = axis;
        }

        if (n != others.Length)
            throw new ArgumentException($"An axis is outside 0..{rank - 1}.", nameof(taken));
        return others;
    }
}
