using System.Numerics;
using TensorRG.Tensors.Kernels;

namespace TensorRG.Tensors;

/// <summary>Copies between a tensor and a slice of one of its legs.</summary>
internal static class SliceCopy
{
    public static unsafe void Run<T>(Tensor<T> whole, int axis, int sector, int start, Tensor<T> slice, bool intoSlice)
        where T : unmanaged, INumberBase<T>
    {
        Span<int> sectors = stackalloc int[whole.Rank];
        Span<int> extents = stackalloc int[3];
        Span<nint> wholeStrides = stackalloc nint[3];
        Span<nint> sliceStrides = stackalloc nint[3];
        for (int block = 0; block < slice.Layout.Count; block++)
        {
            slice.Layout.Sectors(block).CopyTo(sectors);
            sectors[axis] = sector;
            int source = whole.Layout.Find(sectors);
            ReadOnlySpan<int> dimensions = slice.Layout.Dimensions(block);
            int outer = 1, inner = 1;
            for (int i = 0; i < dimensions.Length; i++)
            {
                outer *= i < axis ? dimensions[i] : 1;
                inner *= i > axis ? dimensions[i] : 1;
            }

            int length = whole.Legs[axis].Sectors[sector].Dimension;
            (extents[0], extents[1], extents[2]) = (outer, dimensions[axis], inner);
            (wholeStrides[0], wholeStrides[1], wholeStrides[2]) = ((nint)length * inner, inner, 1);
            (sliceStrides[0], sliceStrides[1], sliceStrides[2]) = ((nint)dimensions[axis] * inner, inner, 1);
            T* inWhole = whole.Data + whole.Layout.Offset(source) + ((long)start * inner);
            T* inSlice = slice.Data + slice.Layout.Offset(block);
            if (intoSlice)
                StridedCopy.Run(extents, inWhole, wholeStrides, inSlice, sliceStrides, false);
            else
                StridedCopy.Run(extents, inSlice, sliceStrides, inWhole, wholeStrides, false);
        }

        GC.KeepAlive(whole);
        GC.KeepAlive(slice);
    }
}
