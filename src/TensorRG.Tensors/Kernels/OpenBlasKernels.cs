using System.Numerics;
using TensorRG.Tensors.Kernels.Decompositions;

namespace TensorRG.Tensors.Kernels;

/// <summary>
/// Kernels on OpenBLAS and the LAPACK inside it. Decompositions copy to columns and back; products pass strided views
/// straight through where BLAS can express them.
/// </summary>
internal sealed unsafe class OpenBlasKernels<T> : IKernels<T>
    where T : unmanaged, INumberBase<T>
{
    private readonly OpenBlasLibrary _library;
    private readonly int _threads;
    private readonly delegate* unmanaged[Cdecl]<byte*, byte*, int*, int*, int*, T*, T*, int*, T*, int*, T*, T*, int*, nint, nint, void> _gemm;
    private readonly delegate* unmanaged[Cdecl]<int*, int*, T*, int*, T*, T*, int*, int*, void> _geqrf;
    private readonly delegate* unmanaged[Cdecl]<int*, int*, int*, T*, int*, T*, T*, int*, int*, void> _orgqr;
    private readonly nint _eigen;
    private readonly nint _svd;

    /// <summary>Kernels that run on the given number of threads.</summary>
    /// <exception cref="BackendUnavailableException">The library lacks a routine.</exception>
    public OpenBlasKernels(OpenBlasLibrary library, int threads)
    {
        _library = library;
        _threads = threads;
        bool real = IsReal;
        _gemm = (delegate* unmanaged[Cdecl]<byte*, byte*, int*, int*, int*, T*, T*, int*, T*, int*, T*, T*, int*, nint, nint, void>)
            library.Symbol(real ? "dgemm_" : "zgemm_");
        _geqrf = (delegate* unmanaged[Cdecl]<int*, int*, T*, int*, T*, T*, int*, int*, void>)
            library.Symbol(real ? "dgeqrf_" : "zgeqrf_");
        _orgqr = (delegate* unmanaged[Cdecl]<int*, int*, int*, T*, int*, T*, T*, int*, int*, void>)
            library.Symbol(real ? "dorgqr_" : "zungqr_");
        _eigen = library.Symbol(real ? "dsyevd_" : "zheevd_");
        _svd = library.Symbol(real ? "dgesdd_" : "zgesdd_");
    }

    private static bool IsReal => typeof(T) == typeof(double);

    /// <inheritdoc/>
    public void Multiply(MatrixView<T> a, MatrixView<T> b, MatrixView<T> c, bool accumulate)
    {
        if (c.Rows == 0 || c.Columns == 0 || (a.Columns == 0 && accumulate))
            return;
        _library.UseThreads(_threads);
        if (IsColumnMajor(c))
        {
            MultiplyColumns(a, b, c, accumulate);
        }
        else if (IsColumnMajor(c.Transposed))
        {
            MultiplyColumns(b.Transposed, a.Transposed, c.Transposed, accumulate);
        }
        else
        {
            using AlignedBuffer<T> buffer = Columns(c, out MatrixView<T> copy);
            MultiplyColumns(a, b, copy, accumulate);
            Entry.CopyScaled(copy, c, 0);
        }
    }

    /// <inheritdoc/>
    public void OrthogonalFactor(MatrixView<T> a, MatrixView<T> r)
    {
        int m = a.Rows, n = a.Columns, info = 0, none = -1;
        if (n == 0)
            return;
        _library.UseThreads(_threads);
        using AlignedBuffer<T> buffer = BufferPool.Rent<T>((long)m * n), tau = BufferPool.Rent<T>(n);
        using AlignedBuffer<int> scales = BufferPool.Rent<int>(n);
        var q = new MatrixView<T>(buffer.Data, m, n, 1, m);
        ThinQr.Load(a, q, scales.Data);
        T size = T.Zero;
        _geqrf(&m, &n, q.Data, &m, tau.Data, &size, &none, &info);
        T generate = T.Zero;
        _orgqr(&m, &n, &n, q.Data, &m, tau.Data, &generate, &none, &info);
        int length = Math.Max((int)Scalar.RealPart(size), (int)Scalar.RealPart(generate));
        using AlignedBuffer<T> work = BufferPool.Rent<T>(length);
        _geqrf(&m, &n, q.Data, &m, tau.Data, work.Data, &length, &info);
        HouseholderQr.TakeR(q, r);
        _orgqr(&m, &n, &n, q.Data, &m, tau.Data, work.Data, &length, &info);
        HouseholderQr.MakeDiagonalPositive(q, r);
        ThinQr.Unscale(r, scales.Data);
        Entry.CopyScaled(q, a, 0);
    }

    /// <inheritdoc/>
    public void HermitianEigen(MatrixView<T> a, Span<double> values, MatrixView<T> vectors)
    {
        int n = a.Rows, info;
        if (n == 0)
            return;
        Entry.FiniteLargestPart(a, "Eigenproblem");
        _library.UseThreads(_threads);
        using AlignedBuffer<T> buffer = Columns(a, out MatrixView<T> v);
        using AlignedBuffer<double> w = BufferPool.Rent<double>(n);
        info = IsReal ? RealEigen(n, (double*)v.Data, w.Data) : ComplexEigen(n, v.Data, w.Data);
        if (info != 0)
            throw new DecompositionException($"Eigenproblem of size {n}: LAPACK did not converge (info {info}).");
        for (int j = 0; j < n; j++)
        {
            values[j] = w.Data[n - 1 - j];
            Entry.CopyScaled(v.Slice(0, n - 1 - j, n, 1), vectors.Slice(0, j, n, 1), 0);
        }
    }

    /// <inheritdoc/>
    public void SingularValues(MatrixView<T> a, MatrixView<T> u, Span<double> s, MatrixView<T> v)
    {
        int m = a.Rows, n = a.Columns, k = Math.Min(m, n);
        if (k == 0)
            return;
        Entry.FiniteLargestPart(a, "Singular values");
        _library.UseThreads(_threads);
        using AlignedBuffer<T> buffer = Columns(a, out MatrixView<T> copy);
        using AlignedBuffer<T> left = BufferPool.Rent<T>((long)m * k), right = BufferPool.Rent<T>((long)k * n);
        using AlignedBuffer<double> values = BufferPool.Rent<double>(k);
        int info = Svd(m, n, k, copy.Data, values.Data, left.Data, right.Data);
        if (info != 0)
            throw new DecompositionException($"Singular values of {m} x {n}: LAPACK did not converge (info {info}).");
        values.Span.CopyTo(s);
        Entry.CopyScaled(new MatrixView<T>(left.Data, m, k, 1, m), u, 0);
        Entry.CopyScaled(new MatrixView<T>(right.Data, k, n, 1, k).Adjoint, v, 0);
    }

    /// <summary>Whether BLAS can take the matrix as it lies.</summary>
    private static bool IsColumnMajor(MatrixView<T> a)
        => a.RowStride == 1 && a.ColumnStride >= Math.Max(1, a.Rows) && a.ColumnStride <= int.MaxValue;

    private static AlignedBuffer<T> Columns(MatrixView<T> a, out MatrixView<T> copy)
    {
        AlignedBuffer<T> buffer = BufferPool.Rent<T>((long)a.Rows * a.Columns);
        copy = new MatrixView<T>(buffer.Data, a.Rows, a.Columns, 1, Math.Max(1, a.Rows));
        Entry.CopyScaled(a, copy, 0);
        return buffer;
    }

    /// <summary>How BLAS should read the matrix, or null where only a copy will do.</summary>
    private static char? Operation(MatrixView<T> a)
    {
        bool conjugated = a.Conjugated && !IsReal;
        if (IsColumnMajor(a) && !conjugated)
            return 'N';
        if (!IsColumnMajor(a.Transposed))
            return null;
        return conjugated ? 'C' : 'T';
    }

    private void MultiplyColumns(MatrixView<T> a, MatrixView<T> b, MatrixView<T> c, bool accumulate)
    {
        using AlignedBuffer<T>? first = Operation(a) is null ? Columns(a, out a) : null;
        using AlignedBuffer<T>? second = Operation(b) is null ? Columns(b, out b) : null;
        byte operationA = (byte)Operation(a)!.Value, operationB = (byte)Operation(b)!.Value;
        int m = c.Rows, n = c.Columns, k = a.Columns;
        int lda = (int)(operationA == 'N' ? a.ColumnStride : a.RowStride);
        int ldb = (int)(operationB == 'N' ? b.ColumnStride : b.RowStride);
        int ldc = (int)c.ColumnStride;
        T alpha = T.One, beta = accumulate ? T.One : T.Zero;
        _gemm(&operationA, &operationB, &m, &n, &k, &alpha, a.Data, &lda, b.Data, &ldb, &beta, c.Data, &ldc, 1, 1);
    }

    private int RealEigen(int n, double* a, double* w)
    {
        var routine = (delegate* unmanaged[Cdecl]<byte*, byte*, int*, double*, int*, double*, double*, int*, int*, int*, int*, nint, nint, void>)_eigen;
        byte job = (byte)'V', triangle = (byte)'L';
        int info = 0, length = 1 + (6 * n) + (2 * n * n), integers = 3 + (5 * n);
        using AlignedBuffer<double> work = BufferPool.Rent<double>(length);
        using AlignedBuffer<int> iwork = BufferPool.Rent<int>(integers);
        routine(&job, &triangle, &n, a, &n, w, work.Data, &length, iwork.Data, &integers, &info, 1, 1);
        return info;
    }

    private int ComplexEigen(int n, T* a, double* w)
    {
        var routine = (delegate* unmanaged[Cdecl]<byte*, byte*, int*, T*, int*, double*, T*, int*, double*, int*, int*, int*, int*, nint, nint, void>)_eigen;
        byte job = (byte)'V', triangle = (byte)'L';
        int info = 0, length = (64 * n) + (n * n), reals = 1 + (5 * n) + (2 * n * n), integers = 3 + (5 * n);
        using AlignedBuffer<T> work = BufferPool.Rent<T>(length);
        using AlignedBuffer<double> rwork = BufferPool.Rent<double>(reals);
        using AlignedBuffer<int> iwork = BufferPool.Rent<int>(integers);
        routine(&job, &triangle, &n, a, &n, w, work.Data, &length, rwork.Data, &reals, iwork.Data, &integers, &info, 1, 1);
        return info;
    }

    private int Svd(int m, int n, int k, T* a, double* s, T* u, T* v)
    {
        byte job = (byte)'S';
        int info = 0, length = -1;
        T size = T.Zero;
        using AlignedBuffer<int> iwork = BufferPool.Rent<int>(8L * k);
        long reals = Math.Max((5L * k * k) + (5L * k), (2L * Math.Max(m, n) * k) + (2L * k * k) + k);
        using AlignedBuffer<double>? rwork = IsReal ? null : BufferPool.Rent<double>(reals);
        Call(&size, &length);
        length = (int)Scalar.RealPart(size);
        using AlignedBuffer<T> work = BufferPool.Rent<T>(length);
        Call(work.Data, &length);
        return info;

        void Call(T* workspace, int* workLength)
        {
            int rows = m, columns = n, inner = k, result = 0;
            byte jobCopy = job;
            if (IsReal)
            {
                ((delegate* unmanaged[Cdecl]<byte*, int*, int*, T*, int*, double*, T*, int*, T*, int*, T*, int*, int*, int*, nint, void>)_svd)(
                    &jobCopy, &rows, &columns, a, &rows, s, u, &rows, v, &inner, workspace, workLength, iwork.Data, &result, 1);
            }
            else
            {
                ((delegate* unmanaged[Cdecl]<byte*, int*, int*, T*, int*, double*, T*, int*, T*, int*, T*, int*, double*, int*, int*, nint, void>)_svd)(
                    &jobCopy, &rows, &columns, a, &rows, s, u, &rows, v, &inner, workspace, workLength, rwork!.Data, iwork.Data, &result, 1);
            }

            info = result;
        }
    }
}
