using System.Numerics;

namespace TensorRG.Tensors.Kernels;

/// <summary>
/// A rectangular window on pinned or native memory: element (i, j) lies at
/// <c>Data[i * RowStride + j * ColumnStride]</c>. It owns nothing and checks bounds in Debug builds only.
/// </summary>
/// <typeparam name="T">Element type, <see cref="double"/> or <see cref="Complex"/>.</typeparam>
/// <param name="data">Address of element (0, 0); the memory must stay pinned while the view is used.</param>
/// <param name="rows">Number of rows, at least 0.</param>
/// <param name="columns">Number of columns, at least 0.</param>
/// <param name="rowStride">Distance in elements between rows.</param>
/// <param name="columnStride">Distance in elements between columns.</param>
/// <param name="conjugated">Whether a reader takes the complex conjugate of each element; never set on an output.</param>
public readonly unsafe struct MatrixView<T>(
    T* data, int rows, int columns, nint rowStride, nint columnStride, bool conjugated = false)
    where T : unmanaged, INumberBase<T>
{
    /// <summary>A row-major view without gaps.</summary>
    /// <param name="data">Address of element (0, 0).</param>
    /// <param name="rows">Number of rows.</param>
    /// <param name="columns">Number of columns, also the row stride.</param>
    public MatrixView(T* data, int rows, int columns)
        : this(data, rows, columns, columns, 1)
    {
    }

    /// <summary>Address of element (0, 0).</summary>
    public T* Data { get; } = data;

    /// <summary>Number of rows.</summary>
    public int Rows { get; } = rows;

    /// <summary>Number of columns.</summary>
    public int Columns { get; } = columns;

    /// <summary>Distance in elements from a row to the next.</summary>
    public nint RowStride { get; } = rowStride;

    /// <summary>Distance in elements from a column to the next.</summary>
    public nint ColumnStride { get; } = columnStride;

    /// <summary>Whether readers take the complex conjugate of each stored element.</summary>
    public bool Conjugated { get; } = conjugated;

    /// <summary>The stored element (i, j), without conjugation.</summary>
    /// <param name="i">Row, from 0.</param>
    /// <param name="j">Column, from 0.</param>
    public ref T this[int i, int j]
    {
        get
        {
            System.Diagnostics.Debug.Assert((uint)i < (uint)Rows && (uint)j < (uint)Columns, "index outside the matrix");
            return ref Data[(i * RowStride) + (j * ColumnStride)];
        }
    }

    /// <summary>The transpose, as a view on the same memory.</summary>
    public MatrixView<T> Transposed => new(Data, Columns, Rows, ColumnStride, RowStride, Conjugated);

    /// <summary>The conjugate transpose, as a view on the same memory.</summary>
    public MatrixView<T> Adjoint => new(Data, Columns, Rows, ColumnStride, RowStride, !Conjugated);

    /// <summary>The complex conjugate, as a view on the same memory.</summary>
    public MatrixView<T> Conjugate => new(Data, Rows, Columns, RowStride, ColumnStride, !Conjugated);

    /// <summary>The same window further on in memory.</summary>
    /// <param name="distance">How many elements further.</param>
    public MatrixView<T> Advanced(nint distance) => new(Data + distance, Rows, Columns, RowStride, ColumnStride, Conjugated);

    /// <summary>The element (i, j) as a reader sees it: conjugated where the view says so.</summary>
    /// <param name="i">Row, from 0.</param>
    /// <param name="j">Column, from 0.</param>
    public T Read(int i, int j) => Conjugated ? Scalar.Conjugate(this[i, j]) : this[i, j];

    /// <summary>A window on part of this view.</summary>
    /// <param name="row">First row.</param>
    /// <param name="column">First column.</param>
    /// <param name="rows">Number of rows.</param>
    /// <param name="columns">Number of columns.</param>
    public MatrixView<T> Slice(int row, int column, int rows, int columns)
    {
        System.Diagnostics.Debug.Assert(row >= 0 && rows >= 0 && row + rows <= Rows, "rows outside the matrix");
        System.Diagnostics.Debug.Assert(column >= 0 && columns >= 0 && column + columns <= Columns, "columns outside the matrix");
        return new(Data + (row * RowStride) + (column * ColumnStride), rows, columns, RowStride, ColumnStride, Conjugated);
    }
}
