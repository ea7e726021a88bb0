using System.Numerics;

namespace TensorRG.Tensors.Kernels.Decompositions;

/// <summary>
/// Thin QR by Cholesky applied twice (Yamamoto, Nakatsukasa, Yanagisawa, Fukaya, ETNA 44, 306 (2015)), on columns
/// scaled to comparable size, with Householder reflectors where the Gram matrix is too close to singular.
/// </summary>
internal static unsafe class ThinQr
{
    private const int SolveBlock = 16;

    /// <summary>
    /// Smallest Cholesky pivot accepted, relative to the column's squared norm. The first Q is then orthonormal to
    /// about n eps / pivot, far below what the second pass needs; <see cref="LargestDefect"/> checks that it was so.
    /// </summary>
    private const double SmallestPivot = 1e-11;

    private const double LargestDefect = 0.05;

    /// <summary>A (m x n, m >= n) := Q, with R upper triangular, diagonal real and non-negative.</summary>
    public static void Factor<T>(ManagedKernels<T> kernels, MatrixView<T> a, MatrixView<T> r)
        where T : unmanaged, INumberBase<T>
    {
        int m = a.Rows, n = a.Columns;
        if (n == 0)
            return;
        if (m < n)
            throw new ArgumentException($"Thin QR needs at least as many rows as columns, not {m} x {n}.");
        using AlignedBuffer<T> work = BufferPool.Rent<T>((long)m * n);
        using AlignedBuffer<T> small = BufferPool.Rent<T>(3L * n * n);
        using AlignedBuffer<int> scales = BufferPool.Rent<int>(n);
        var w = new MatrixView<T>(work.Data, m, n, 1, m);
        Load(a, w, scales.Data);
        if (!TryCholeskyTwice(kernels, w, r, small.Data))
        {
            Load(a, w, scales.Data);
            HouseholderQr.Factor(kernels, w, r);
        }

        Entry.CopyScaled(w, a, 0);
        Unscale(r, scales.Data);
    }

    /// <summary>W := A with every column scaled by the power of two, 2^-scales[j], that brings its largest part near one.</summary>
    /// <exception cref="DecompositionException">A holds a NaN or infinity.</exception>
    public static void Load<T>(MatrixView<T> a, MatrixView<T> w, int* scales)
        where T : unmanaged, INumberBase<T>
    {
        Entry.CopyScaled(a, w, 0);
        for (int j = 0; j < a.Columns; j++)
        {
            MatrixView<T> column = w.Slice(0, j, a.Rows, 1);
            scales[j] = Entry.Exponent(Entry.FiniteLargestPart(column, "Thin QR"));
            if (scales[j] != 0)
                Entry.Scale(column, scales[j]);
        }
    }

    /// <summary>Undoes <see cref="Load"/> on R.</summary>
    public static void Unscale<T>(MatrixView<T> r, int* scales)
        where T : unmanaged, INumberBase<T>
    {
        for (int j = 0; j < r.Columns; j++)
        {
            if (scales[j] != 0)
                Entry.Scale(r.Slice(0, j, r.Rows, 1), -scales[j]);
        }
    }

    private static bool TryCholeskyTwice<T>(ManagedKernels<T> kernels, MatrixView<T> w, MatrixView<T> r, T* small)
        where T : unmanaged, INumberBase<T>
    {
        int n = w.Columns;
        var first = new MatrixView<T>(small, n, n);
        var second = new MatrixView<T>(small + ((nint)n * n), n, n);
        kernels.Multiply(w.Adjoint, w, first, false);
        if (!TryCholesky(first))
            return false;
        SolveRight(kernels, w, first);
        kernels.Multiply(w.Adjoint, w, second, false);
        if (!NearIdentity(second) || !TryCholesky(second))
            return false;
        SolveRight(kernels, w, second);
        kernels.Multiply(second, first, r, false);
        return true;
    }

    /// <summary>G = R^H R in place with zeros below the diagonal; false where a pivot is too small (or NaN).</summary>
    private static bool TryCholesky<T>(MatrixView<T> g)
        where T : unmanaged, INumberBase<T>
    {
        int n = g.Columns;
        for (int j = 0; j < n; j++)
        {
            T* row = g.Data + (j * g.RowStride);
            double before = Scalar.RealPart(row[j]);
            for (int k = 0; k < j; k++)
            {
                T* above = g.Data + (k * g.RowStride);
                VectorOps.AddScaled(-Scalar.Conjugate(above[j]), above + j, row + j, n - j);
            }

            double pivot = Scalar.RealPart(row[j]);
            if (!(pivot > SmallestPivot * before) || !double.IsFinite(pivot))
                return false;
            new Span<T>(row, j).Clear();
            VectorOps.Scale(Scalar.FromReal<T>(1 / Math.Sqrt(pivot)), row + j, n - j);
            row[j] = Scalar.FromReal<T>(Math.Sqrt(pivot));
        }

        return true;
    }

    private static bool NearIdentity<T>(MatrixView<T> g)
        where T : unmanaged, INumberBase<T>
    {
        double sum = 0;
        for (int i = 0; i < g.Rows; i++)
        {
            for (int j = 0; j < g.Columns; j++)
                sum += Scalar.SquaredMagnitude(g[i, j] - (i == j ? T.One : T.Zero));
        }

        return sum <= LargestDefect * LargestDefect;
    }

    /// <summary>W := W R^-1 by substitution: backward stable row by row, which a product with R^-1 is not.</summary>
    private static void SolveRight<T>(ManagedKernels<T> kernels, MatrixView<T> w, MatrixView<T> r)
        where T : unmanaged, INumberBase<T>
    {
        int m = w.Rows, n = w.Columns;
        using AlignedBuffer<T> buffer = BufferPool.Rent<T>((long)n * SolveBlock);
        for (int j = 0; j < n; j += SolveBlock)
        {
            int width = Math.Min(SolveBlock, n - j);
            if (j > 0)
            {
                var negative = new MatrixView<T>(buffer.Data, j, width);
                for (int k = 0; k < j; k++)
                {
                    for (int c = 0; c < width; c++)
                        negative[k, c] = -r[k, j + c];
                }

                kernels.Multiply(w.Slice(0, 0, m, j), negative, w.Slice(0, j, m, width), true);
            }

            SolveBlockRight(w, r, j, width);
        }
    }

    private static void SolveBlockRight<T>(MatrixView<T> w, MatrixView<T> r, int first, int width)
        where T : unmanaged, INumberBase<T>
    {
        for (int j = first; j < first + width; j++)
        {
            T* column = w.Data + (j * w.ColumnStride);
            for (int k = first; k < j; k++)
                VectorOps.AddScaled(-r[k, j], w.Data + (k * w.ColumnStride), column, w.Rows);
            VectorOps.Scale(T.One / r[j, j], column, w.Rows);
        }
    }
}
