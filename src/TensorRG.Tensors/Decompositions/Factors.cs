using System.Numerics;
using TensorRG.Tensors.Kernels;

namespace TensorRG.Tensors.Decompositions;

/// <summary>Singular triplets of one sector: column j of U and V belong to S[j].</summary>
internal sealed unsafe class Factors<T> : IDisposable
    where T : unmanaged, INumberBase<T>
{
    private readonly AlignedBuffer<T> _memory;

    public Factors(int rows, int columns, int count)
    {
        _memory = BufferPool.Rent<T>(((long)rows + columns) * count);
        U = new MatrixView<T>(_memory.Data, rows, count);
        V = new MatrixView<T>(_memory.Data + ((long)rows * count), columns, count);
        S = new double[count];
    }

    public MatrixView<T> U { get; }

    public MatrixView<T> V { get; }

    public double[] S { get; }

    public void Dispose() => _memory.Dispose();
}
