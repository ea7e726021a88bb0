using System.Numerics;

namespace TensorRG.Tensors.Kernels.Decompositions;

/// <summary>Filling of views with contiguous columns.</summary>
internal static unsafe class MatrixFill
{
    /// <summary>Sets every element to zero; the row stride must be one.</summary>
    public static void Clear<T>(this MatrixView<T> a)
        where T : unmanaged, INumberBase<T>
    {
        for (int j = 0; j < a.Columns; j++)
            new Span<T>(a.Data + (j * a.ColumnStride), a.Rows).Clear();
    }

    /// <summary>Sets the matrix to the identity (ones at (i, i)); the row stride must be one.</summary>
    public static void SetIdentity<T>(this MatrixView<T> a)
        where T : unmanaged, INumberBase<T>
    {
        a.Clear();
        for (int j = 0; j < Math.Min(a.Rows, a.Columns); j++)
            a.Data[j + (j * a.ColumnStride)] = T.One;
    }
}
