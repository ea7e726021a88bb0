using System.Numerics;

namespace TensorRG.Tensors.Kernels.Decompositions;

/// <summary>
/// Q^H A Q = T, real symmetric tridiagonal, for a Hermitian A, by Householder reflectors gathered in panels: half the
/// work is matrix times vector, the other half one matrix product per panel (Dongarra, Sorensen, Hammarling,
/// J. Comput. Appl. Math. 27, 215 (1989)).
/// </summary>
internal sealed unsafe class TridiagonalReduction<T> : IDisposable
    where T : unmanaged, INumberBase<T>
{
    private const int Block = 32;
    private const int UpdateWidth = 128;

    private readonly ManagedKernels<T> _kernels;
    private readonly MatrixView<T> _a;
    private readonly int _n;
    private readonly AlignedBuffer<T> _reflectors;
    private readonly AlignedBuffer<T> _panel;
    private readonly AlignedBuffer<T> _vectors;
    private readonly MatrixView<T> _v;
    private readonly MatrixView<T> _w;
    private readonly T* _tau;
    private readonly T* _small;

    /// <summary>Prepares the reduction of A, which <see cref="Reduce"/> destroys.</summary>
    /// <param name="kernels">Matrix products.</param>
    /// <param name="a">n x n with unit row stride; only the lower triangle is read.</param>
    public TridiagonalReduction(ManagedKernels<T> kernels, MatrixView<T> a)
    {
        _kernels = kernels;
        _a = a;
        _n = a.Rows;
        _reflectors = BufferPool.RentZeroed<T>((long)_n * _n);
        _panel = BufferPool.Rent<T>(5L * Block * _n);
        _vectors = BufferPool.Rent<T>(_n + (2 * Block));
        _v = new MatrixView<T>(_reflectors.Data, _n, _n, 1, _n);
        _w = new MatrixView<T>(_panel.Data, _n, Block, 1, _n);
        _tau = _vectors.Data;
        _small = _vectors.Data + _n;
    }

    /// <summary>Computes the diagonal d (n) and off-diagonal e (n, the last unused).</summary>
    public void Reduce(Span<double> d, Span<double> e)
    {
        for (int first = 0; first < _n; first += Block)
        {
            int width = Math.Min(Block, _n - first);
            _w.Slice(0, 0, _n, width).Clear();
            for (int j = first; j < first + width; j++)
                ReduceColumn(first, j, d, e);
            UpdateTrailing(first, width);
        }
    }

    /// <summary>C := Q C.</summary>
    public void ApplyQ(MatrixView<T> c)
    {
        for (int first = (_n - 1) / Block * Block; first >= 0 && _n > 1; first -= Block)
        {
            int width = Math.Min(Block, _n - 1 - first);
            int top = first + 1;
            if (width > 0)
            {
                Reflector.ApplyBlock(
                    _kernels, _v.Slice(top, first, _n - top, width), _tau + first, c.Slice(top, 0, _n - top, c.Columns), adjoint: false);
            }
        }
    }

    /// <summary>Gives the memory back.</summary>
    public void Dispose()
    {
        _reflectors.Dispose();
        _panel.Dispose();
        _vectors.Dispose();
    }

    private void ReduceColumn(int first, int j, Span<double> d, Span<double> e)
    {
        int done = j - first;
        T* column = &_a.Data[j + (j * _a.ColumnStride)];
        SubtractPanel(first, done, j, column);
        d[j] = Scalar.RealPart(column[0]);
        int length = _n - j - 1;
        if (length == 0)
            return;
        T* v = &_v.Data[j + 1 + (j * _v.ColumnStride)];
        new Span<T>(column + 1, length).CopyTo(new Span<T>(v, length));
        e[j] = Reflector.Generate(v, length, out _tau[j]);
        FormW(first, done, j, v, length);
    }

    /// <summary>Brings rows j and below of column j up to date with the panel: a -= V conj(W_j) + W conj(V_j).</summary>
    private void SubtractPanel(int first, int done, int j, T* column)
    {
        if (done == 0)
            return;
        T* v = &_v.Data[j + (first * _v.ColumnStride)], w = &_w.Data[j];
        for (int p = 0; p < done; p++)
        {
            _small[p] = -Scalar.Conjugate(w[p * _w.ColumnStride]);
            _small[Block + p] = -Scalar.Conjugate(v[p * _v.ColumnStride]);
        }

        Panels.AddTimes(v, _v.ColumnStride, _n - j, done, _small, column);
        Panels.AddTimes(w, _w.ColumnStride, _n - j, done, _small + Block, column);
    }

    /// <summary>w = tau (A v - V W^H v - W V^H v) - (tau/2) (w^H v) v, for which H^H A H = A - v w^H - w v^H.</summary>
    private void FormW(int first, int done, int j, T* v, int length)
    {
        int top = j + 1;
        T* w = &_w.Data[top + (done * _w.ColumnStride)];
        T* oldV = &_v.Data[top + (first * _v.ColumnStride)], oldW = &_w.Data[top];
        Panels.HermitianTimes(_kernels.Workers, &_a.Data[top + (top * _a.ColumnStride)], _a.ColumnStride, length, v, w);
        Panels.AdjointTimes(oldW, _w.ColumnStride, length, done, v, _small);
        Panels.AdjointTimes(oldV, _v.ColumnStride, length, done, v, _small + Block);
        VectorOps.Scale(-T.One, _small, done);
        VectorOps.Scale(-T.One, _small + Block, done);
        Panels.AddTimes(oldV, _v.ColumnStride, length, done, _small, w);
        Panels.AddTimes(oldW, _w.ColumnStride, length, done, _small + Block, w);
        VectorOps.Scale(_tau[j], w, length);
        T half = -_tau[j] * VectorOps.Dot(w, v, length) * Scalar.FromReal<T>(0.5);
        VectorOps.AddScaled(half, v, w, length);
    }

    /// <summary>A -= V W^H + W V^H on the lower triangle behind the panel, as [V W] [-W -V]^H by blocks of columns.</summary>
    private void UpdateTrailing(int first, int width)
    {
        int top = first + width, rows = _n - top;
        if (rows == 0)
            return;
        T* left = _panel.Data + ((nint)Block * _n), right = left + ((nint)2 * Block * _n);
        for (int p = 0; p < width; p++)
        {
            T* v = &_v.Data[top + ((first + p) * _v.ColumnStride)], w = &_w.Data[top + (p * _w.ColumnStride)];
            for (int i = 0; i < rows; i++)
            {
                left[i + ((nint)p * rows)] = v[i];
                left[i + ((nint)(width + p) * rows)] = w[i];
                right[i + ((nint)p * rows)] = -w[i];
                right[i + ((nint)(width + p) * rows)] = -v[i];
            }
        }

        var l = new MatrixView<T>(left, rows, 2 * width, 1, rows);
        var r = new MatrixView<T>(right, rows, 2 * width, 1, rows);
        for (int j = 0; j < rows; j += UpdateWidth)
        {
            int columns = Math.Min(UpdateWidth, rows - j);
            _kernels.Multiply(
                l.Slice(j, 0, rows - j, 2 * width),
                r.Slice(j, 0, columns, 2 * width).Adjoint,
                _a.Slice(top + j, top + j, rows - j, columns),
                true);
        }
    }
}
