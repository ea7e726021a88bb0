using System.Numerics;

namespace TensorRG.Tensors.Kernels.Decompositions;

/// <summary>
/// Thin singular value decomposition: a rectangular matrix is first reduced to its square R; then one-sided Jacobi for
/// small sizes, bidiagonalisation and implicit QR for large ones.
/// </summary>
internal static unsafe class SingularValueSolver
{
    /// <summary>
    /// Up to this size Jacobi is used, for its high relative accuracy at the same cost; at 24 bidiagonalisation takes
    /// three fifths of the time, at 100 a third.
    /// </summary>
    private const int LargestJacobi = 16;

    /// <summary>A = U diag(s) V^H; A is left unchanged.</summary>
    public static void Solve<T>(ManagedKernels<T> kernels, MatrixView<T> a, MatrixView<T> u, Span<double> s, MatrixView<T> v)
        where T : unmanaged, INumberBase<T>
    {
        if (a.Rows < a.Columns)
        {
            // A^H = V s U^H: swap the roles.
            Solve(kernels, a.Adjoint, v, s, u);
            return;
        }

        int m = a.Rows, n = a.Columns;
        if (n == 0)
            return;
        int exponent = Entry.Exponent(Entry.FiniteLargestPart(a, "Singular values"));
        using AlignedBuffer<T> work = BufferPool.Rent<T>(((long)m * n) + (3L * n * n));
        var matrix = new MatrixView<T>(work.Data, m, n, 1, m);
        T* squares = work.Data + ((nint)m * n);
        var core = new MatrixView<T>(squares, n, n, 1, n);
        var left = new MatrixView<T>(squares + ((nint)n * n), n, n, 1, n);
        var right = new MatrixView<T>(squares + ((nint)2 * n * n), n, n, 1, n);
        Entry.CopyScaled(a, m > n ? matrix : core, exponent);
        if (m > n)
            ThinQr.Factor(kernels, matrix, core);
        SolveSquare(kernels, core, left, s, right);
        if (m > n)
            kernels.Multiply(matrix, left, u, false);
        else
            Entry.CopyScaled(left, u, 0);
        Entry.CopyScaled(right, v, 0);
        for (int i = 0; i < n; i++)
            s[i] = Math.ScaleB(s[i], exponent);
    }

    private static void SolveSquare<T>(ManagedKernels<T> kernels, MatrixView<T> a, MatrixView<T> u, Span<double> s, MatrixView<T> v)
        where T : unmanaged, INumberBase<T>
    {
        if (a.Rows <= LargestJacobi)
            JacobiSvd.Solve(kernels, a, u, s, v);
        else
            SolveByBidiagonal(kernels, a, u, s, v);
    }

    /// <summary>Bidiagonalisation, implicit QR, back-transformation.</summary>
    internal static void SolveByBidiagonal<T>(ManagedKernels<T> kernels, MatrixView<T> a, MatrixView<T> u, Span<double> s, MatrixView<T> v)
        where T : unmanaged, INumberBase<T>
    {
        int n = a.Rows;
        using AlignedBuffer<double> bidiagonal = BufferPool.RentZeroed<double>(2L * n);
        using var reduction = new BidiagonalReduction<T>(kernels, a);
        Span<double> d = bidiagonal.Span[..n], e = bidiagonal.Span[n..];
        reduction.Reduce(d, e);
        using var left = new RotationBatch(kernels.Workers, n);
        using var right = new RotationBatch(kernels.Workers, n);
        new BidiagonalQr(d, e, left, right).Solve();
        Collect(left, right, d, u, s, v);
        reduction.ApplyLeft(u);
        reduction.ApplyRight(v);
    }

    private static void Collect<T>(
        RotationBatch left, RotationBatch right, Span<double> d, MatrixView<T> u, Span<double> s, MatrixView<T> v)
        where T : unmanaged, INumberBase<T>
    {
        int n = d.Length;
        double[] sizes = new double[n];
        for (int i = 0; i < n; i++)
            sizes[i] = Math.Abs(d[i]);
        int[] order = Ordering.Descending(sizes);
        for (int k = 0; k < n; k++)
        {
            s[k] = sizes[order[k]];
            double sign = double.IsNegative(d[order[k]]) ? -1 : 1;
            double* x = left.Row(order[k]), y = right.Row(order[k]);
            for (int i = 0; i < n; i++)
            {
                u[i, k] = Scalar.FromReal<T>(x[i]);
                v[i, k] = Scalar.FromReal<T>(sign * y[i]);
            }
        }
    }
}
