using System.Numerics;
using TensorRG.Tensors.Kernels;

namespace TensorRG.Tensors.Tests.Kernels;

/// <summary>How a test matrix lies in memory.</summary>
public enum Layout
{
    RowMajor,
    ColumnMajor,
    PaddedRows,
    Scattered,
    ReversedRows,
}

/// <summary>A random matrix in a guarded buffer: cells outside the matrix hold a marker that must survive.</summary>
internal sealed unsafe class StridedMatrix<T> : IDisposable
    where T : unmanaged, INumberBase<T>
{
    private readonly AlignedBuffer<T> _buffer;
    private readonly bool[] _used;

    public StridedMatrix(int rows, int columns, Layout layout, Random random, bool conjugated = false)
    {
        (nint row, nint column) = layout switch
        {
            Layout.RowMajor => ((nint)columns, (nint)1),
            Layout.ColumnMajor => (1, rows),
            Layout.PaddedRows => (columns + 3, 1),
            Layout.Scattered => ((3 * columns) + 2, 3),
            _ => (-columns, 1),
        };
        long first = layout == Layout.ReversedRows ? (long)columns * Math.Max(rows - 1, 0) : 0;
        long last = first + (Math.Max(rows - 1, 0) * Math.Abs(row)) + (Math.Max(columns - 1, 0) * column);
        _buffer = BufferPool.Rent<T>(last + 20);
        _buffer.Span.Fill(Marker);
        View = new MatrixView<T>(_buffer.Data + 8 + first, rows, columns, row, column, conjugated);
        _used = new bool[_buffer.Length];
        for (int i = 0; i < rows; i++)
        {
            for (int j = 0; j < columns; j++)
            {
                _used[8 + first + (i * row) + (j * column)] = true;
                View[i, j] = Element(random);
            }
        }
    }

    public static T Marker => Scalar.FromReal<T>(-12345.5);

    public MatrixView<T> View { get; }

    public static T Element(Random random)
    {
        double re = random.NextDouble() - 0.5, im = random.NextDouble() - 0.5;
        return typeof(T) == typeof(double) ? (T)(object)re : (T)(object)new Complex(re, im);
    }

    public void AssertGuardsIntact()
    {
        Span<T> cells = _buffer.Span;
        for (int i = 0; i < cells.Length; i++)
            Assert.True(_used[i] || cells[i] == Marker, $"cell {i} outside the matrix was written");
    }

    public T[] ToArray()
    {
        var result = new T[View.Rows * View.Columns];
        for (int i = 0; i < View.Rows; i++)
        {
            for (int j = 0; j < View.Columns; j++)
                result[(i * View.Columns) + j] = View[i, j];
        }

        return result;
    }

    public void Dispose() => _buffer.Dispose();
}
