using System.Numerics;

namespace TensorRG.Tensors;

/// <summary>The inner loops of a partial trace.</summary>
internal static class TensorTrace
{
    /// <summary>Adds one block's contribution, if its traced sectors agree.</summary>
    public static unsafe void AddBlock<T>(Tensor<T> a, int block, ReadOnlySpan<int> first, ReadOnlySpan<int> second, ReadOnlySpan<int> free, Tensor<T> result)
        where T : unmanaged, INumberBase<T>
    {
        ReadOnlySpan<int> sectors = a.Layout.Sectors(block), dimensions = a.Layout.Dimensions(block);
        for (int i = 0; i < first.Length; i++)
        {
            if (sectors[first[i]] != sectors[second[i]])
                return;
        }

        Span<nint> strides = stackalloc nint[a.Rank];
        nint stride = 1;
        for (int axis = a.Rank - 1; axis >= 0; axis--)
        {
            strides[axis] = stride;
            stride *= dimensions[axis];
        }

        Span<int> target = stackalloc int[free.Length];
        Span<int> extents = stackalloc int[free.Length + first.Length];
        Span<nint> steps = stackalloc nint[free.Length + first.Length];
        for (int i = 0; i < free.Length; i++)
        {
            target[i] = sectors[free[i]];
            extents[i] = dimensions[free[i]];
            steps[i] = strides[free[i]];
        }

        for (int i = 0; i < first.Length; i++)
        {
            extents[free.Length + i] = dimensions[first[i]];
            steps[free.Length + i] = strides[first[i]] + strides[second[i]];
        }

        T* output = result.Data + result.Layout.Offset(result.Layout.Find(target));
        Accumulate(extents, steps, free.Length, a.Data + a.Layout.Offset(block), ref output);
    }

    /// <summary>Loops over the free extents in row-major order and sums over the traced ones.</summary>
    private static unsafe void Accumulate<T>(ReadOnlySpan<int> extents, ReadOnlySpan<nint> steps, int free, T* source, ref T* output)
        where T : unmanaged, INumberBase<T>
    {
        if (free == 0)
        {
            *output++ += Sum(extents, steps, source);
            return;
        }

        for (int i = 0; i < extents[0]; i++)
            Accumulate(extents[1..], steps[1..], free - 1, source + (i * steps[0]), ref output);
    }

    private static unsafe T Sum<T>(ReadOnlySpan<int> extents, ReadOnlySpan<nint> steps, T* source)
        where T : unmanaged, INumberBase<T>
    {
        if (extents.IsEmpty)
            return *source;
        T sum = T.Zero;
        for (int i = 0; i < extents[0]; i++)
            sum += Sum(extents[1..], steps[1..], source + (i * steps[0]));
        return sum;
    }
}
