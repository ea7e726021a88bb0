using System.Numerics;

namespace TensorRG.Tensors.Kernels.Decompositions;

/// <summary>
/// H^H A G = B, real upper bidiagonal, for a square A, by Householder reflectors from both sides gathered in panels
/// (Dongarra, Sorensen, Hammarling, J. Comput. Appl. Math. 27, 215 (1989)). Within a panel the current matrix is
/// A - V Y^H - X U^H, where V and U hold the left and right reflectors.
/// </summary>
internal sealed unsafe class BidiagonalReduction<T> : IDisposable
    where T : unmanaged, INumberBase<T>
{
    private const int Block = 32;

    private readonly ManagedKernels<T> _kernels;
    private readonly MatrixView<T> _a;
    private readonly int _n;
    private readonly AlignedBuffer<T> _buffer;
    private readonly MatrixView<T> _v;
    private readonly MatrixView<T> _u;
    private readonly MatrixView<T> _x;
    private readonly MatrixView<T> _y;
    private readonly T* _leftTau;
    private readonly T* _rightTau;
    private readonly T* _row;
    private readonly T* _small;

    /// <summary>Prepares the reduction of A, which <see cref="Reduce"/> destroys.</summary>
    /// <param name="kernels">Matrix products.</param>
    /// <param name="a">n x n with unit row stride.</param>
    public BidiagonalReduction(ManagedKernels<T> kernels, MatrixView<T> a)
    {
        _kernels = kernels;
        _a = a;
        _n = a.Rows;
        nint square = (nint)_n * _n, panel = (nint)_n * Block;
        _buffer = BufferPool.RentZeroed<T>((2 * square) + (2 * panel) + (3 * _n) + Block);
        _v = new MatrixView<T>(_buffer.Data, _n, _n, 1, _n);
        _u = new MatrixView<T>(_v.Data + square, _n, _n, 1, _n);
        _x = new MatrixView<T>(_u.Data + square, _n, Block, 1, _n);
        _y = new MatrixView<T>(_x.Data + panel, _n, Block, 1, _n);
        _leftTau = _y.Data + panel;
        _rightTau = _leftTau + _n;
        _row = _rightTau + _n;
        _small = _row + _n;
    }

    /// <summary>Computes the diagonal d (n) and superdiagonal e (n, the last unused).</summary>
    public void Reduce(Span<double> d, Span<double> e)
    {
        for (int first = 0; first < _n; first += Block)
        {
            int width = Math.Min(Block, _n - first);
            _x.Clear();
            _y.Clear();
            for (int j = first; j < first + width; j++)
            {
                d[j] = ReduceColumn(first, j);
                if (j < _n - 1)
                    e[j] = ReduceRow(first, j);
            }

            UpdateTrailing(first, width);
        }
    }

    /// <summary>C := H C, H the product of the left reflectors.</summary>
    public void ApplyLeft(MatrixView<T> c) => HouseholderQr.ApplyQ(_kernels, _v, _leftTau, c);

    /// <summary>C := G C, G the product of the right reflectors.</summary>
    public void ApplyRight(MatrixView<T> c)
    {
        if (_n > 1)
            HouseholderQr.ApplyQ(_kernels, _u.Slice(1, 0, _n - 1, _n - 1), _rightTau, c.Slice(1, 0, _n - 1, c.Columns));
    }

    /// <summary>Gives the memory back.</summary>
    public void Dispose() => _buffer.Dispose();

    /// <summary>Updates column j, makes its reflector v, and y = tau (A^H v - Y V^H v - U X^H v). Returns d_j.</summary>
    private double ReduceColumn(int first, int j)
    {
        int done = j - first, length = _n - j, after = length - 1;
        T* column = At(_a, j, j);
        ConjugateRow(_y, j, 0, done);
        Panels.AddTimes(At(_v, j, first), _n, length, done, _small, column);
        ConjugateRow(_u, j, first, done);
        Panels.AddTimes(At(_x, j, 0), _n, length, done, _small, column);
        T* v = At(_v, j, j);
        new Span<T>(column, length).CopyTo(new Span<T>(v, length));
        double beta = Reflector.Generate(v, length, out _leftTau[j]);
        T* y = At(_y, j + 1, done);
        Panels.AdjointTimes(_kernels.Workers, column + _a.ColumnStride, _a.ColumnStride, length, after, v, y);
        ProjectOut(At(_v, j, first), length, v, At(_y, j + 1, 0), after, done, y);
        ProjectOut(At(_x, j, 0), length, v, At(_u, j + 1, first), after, done, y);
        VectorOps.Scale(_leftTau[j], y, after);
        return beta;
    }

    /// <summary>Updates row j, makes its reflector u, and x = tau (A u - V Y^H u - X U^H u). Returns e_j.</summary>
    private double ReduceRow(int first, int j)
    {
        int done = j - first, after = _n - j - 1;

        // The conjugated row, so that u is an ordinary column reflector: c -= Y conj(V_j) + U conj(X_j).
        for (int k = 0; k < after; k++)
            _row[k] = Scalar.Conjugate(_a[j, j + 1 + k]);
        ConjugateRow(_v, j, first, done + 1);
        Panels.AddTimes(At(_y, j + 1, 0), _n, after, done + 1, _small, _row);
        ConjugateRow(_x, j, 0, done);
        Panels.AddTimes(At(_u, j + 1, first), _n, after, done, _small, _row);
        T* u = At(_u, j + 1, j);
        new Span<T>(_row, after).CopyTo(new Span<T>(u, after));
        double beta = Reflector.Generate(u, after, out _rightTau[j]);
        T* x = At(_x, j + 1, done);
        Panels.AddTimes(_kernels.Workers, At(_a, j + 1, j + 1), _a.ColumnStride, after, after, u, x);
        ProjectOut(At(_y, j + 1, 0), after, u, At(_v, j + 1, first), after, done + 1, x);
        ProjectOut(At(_u, j + 1, first), after, u, At(_x, j + 1, 0), after, done, x);
        VectorOps.Scale(_rightTau[j], x, after);
        return beta;
    }

    private void UpdateTrailing(int first, int width)
    {
        int top = first + width, rest = _n - top;
        if (rest == 0)
            return;
        MatrixView<T> trailing = _a.Slice(top, top, rest, rest);
        MatrixView<T> y = _y.Slice(top, 0, rest, width), x = _x.Slice(top, 0, rest, width);
        for (int p = 0; p < width; p++)
        {
            VectorOps.Scale(-T.One, At(y, 0, p), rest);
            VectorOps.Scale(-T.One, At(x, 0, p), rest);
        }

        _kernels.Multiply(_v.Slice(top, first, rest, width), y.Adjoint, trailing, true);
        _kernels.Multiply(x, _u.Slice(top, first, rest, width).Adjoint, trailing, true);
    }

    private static T* At(MatrixView<T> a, int i, int j) => a.Data + i + (j * a.ColumnStride);

    /// <summary>small[p] = -conj(m[row, column + p]).</summary>
    private void ConjugateRow(MatrixView<T> m, int row, int column, int count)
    {
        for (int p = 0; p < count; p++)
            _small[p] = -Scalar.Conjugate(*At(m, row, column + p));
    }

    /// <summary>target -= Right (Left^H vector), Left and Right with n as column stride.</summary>
    private void ProjectOut(T* left, int leftRows, T* vector, T* right, int rightRows, int columns, T* target)
    {
        Panels.AdjointTimes(left, _n, leftRows, columns, vector, _small);
        VectorOps.Scale(-T.One, _small, columns);
        Panels.AddTimes(right, _n, rightRows, columns, _small, target);
    }
}
