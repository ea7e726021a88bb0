using System.Numerics;

namespace TensorRG.Tensors.Kernels.Decompositions;

/// <summary>
/// Householder QR on contiguous columns, plain and blocked or with column pivoting. Slower than Cholesky-QR, but Q is
/// orthonormal whatever the matrix.
/// </summary>
internal static unsafe class HouseholderQr
{
    /// <summary>Columns reduced one by one before the rest is updated by matrix products.</summary>
    private const int Panel = 16;

    /// <summary>Reflectors applied together; wider than a panel, for the sake of the products.</summary>
    private const int Block = 32;

    /// <summary>
    /// Overwrites A (m x n, m >= n, unit row stride) with Q and writes R with a real non-negative diagonal.
    /// </summary>
    public static void Factor<T>(ManagedKernels<T> kernels, MatrixView<T> a, MatrixView<T> r)
        where T : unmanaged, INumberBase<T>
    {
        int n = a.Columns;
        using AlignedBuffer<T> reflectors = BufferPool.RentZeroed<T>((long)a.Rows * n);
        using AlignedBuffer<T> factors = BufferPool.Rent<T>(n);
        var v = new MatrixView<T>(reflectors.Data, a.Rows, n, 1, a.Rows);
        for (int j = 0; j < n; j += Panel)
        {
            int width = Math.Min(Panel, n - j);
            FactorPanel(a, v, factors.Data, j, width);
            Reflector.ApplyBlock(
                kernels,
                v.Slice(j, j, a.Rows - j, width),
                factors.Data + j,
                a.Slice(j, j + width, a.Rows - j, n - j - width),
                adjoint: true);
        }

        TakeR(a, r);
        a.SetIdentity();
        ApplyQ(kernels, v, factors.Data, a);
        MakeDiagonalPositive(a, r);
    }

    /// <summary>
    /// Pivoted QR of a square A P = Q R, in place: R is left on and above the diagonal of A, the reflectors go to V.
    /// Column order[k] of the original is column k of Q R. The column with the largest remaining norm goes next.
    /// </summary>
    public static void FactorPivoted<T>(MatrixView<T> a, MatrixView<T> v, T* tau, int* order)
        where T : unmanaged, INumberBase<T>
    {
        int n = a.Columns;
        for (int j = 0; j < n; j++)
            order[j] = j;
        for (int j = 0; j < n; j++)
        {
            int best = LargestColumn(a, j);
            if (best != j)
            {
                (order[j], order[best]) = (order[best], order[j]);
                new Span<T>(&a.Data[j * a.ColumnStride], n).Swap(new Span<T>(&a.Data[best * a.ColumnStride], n));
            }

            FactorPanel(a, v, tau, j, 1);
            Reflector.Apply(&v.Data[j + (j * v.ColumnStride)], Scalar.Conjugate(tau[j]), &a.Data[j + ((j + 1) * a.ColumnStride)], a.ColumnStride, n - j, n - j - 1);
        }
    }

    /// <summary>C := Q C, Q the product of all reflectors in the columns of V.</summary>
    public static void ApplyQ<T>(ManagedKernels<T> kernels, MatrixView<T> v, T* tau, MatrixView<T> c)
        where T : unmanaged, INumberBase<T>
    {
        int n = v.Columns;
        for (int j = (n - 1) / Block * Block; j >= 0 && n > 0; j -= Block)
        {
            int width = Math.Min(Block, n - j);
            Reflector.ApplyBlock(
                kernels, v.Slice(j, j, v.Rows - j, width), tau + j, c.Slice(j, 0, c.Rows - j, c.Columns), adjoint: false);
        }
    }

    private static void FactorPanel<T>(MatrixView<T> a, MatrixView<T> v, T* tau, int first, int width)
        where T : unmanaged, INumberBase<T>
    {
        for (int j = first; j < first + width; j++)
        {
            T* column = &a.Data[j + (j * a.ColumnStride)];
            T* vector = &v.Data[j + (j * v.ColumnStride)];
            int length = a.Rows - j;
            new Span<T>(column, length).CopyTo(new Span<T>(vector, length));
            double beta = Reflector.Generate(vector, length, out tau[j]);
            column[0] = Scalar.FromReal<T>(beta);
            Reflector.Apply(vector, Scalar.Conjugate(tau[j]), column + a.ColumnStride, a.ColumnStride, length, first + width - j - 1);
        }
    }

    private static int LargestColumn<T>(MatrixView<T> a, int from)
        where T : unmanaged, INumberBase<T>
    {
        int best = from;
        double largest = -1;
        for (int j = from; j < a.Columns; j++)
        {
            double norm = VectorOps.SumOfSquares(&a.Data[from + (j * a.ColumnStride)], a.Rows - from);
            if (norm > largest)
                (best, largest) = (j, norm);
        }

        return best;
    }

    /// <summary>R := the upper triangle of A.</summary>
    public static void TakeR<T>(MatrixView<T> a, MatrixView<T> r)
        where T : unmanaged, INumberBase<T>
    {
        for (int i = 0; i < r.Rows; i++)
        {
            for (int j = 0; j < r.Columns; j++)
                r[i, j] = i <= j ? a[i, j] : T.Zero;
        }
    }

    /// <summary>Flips the sign of columns of Q and rows of R until the real diagonal of R is non-negative.</summary>
    public static void MakeDiagonalPositive<T>(MatrixView<T> q, MatrixView<T> r)
        where T : unmanaged, INumberBase<T>
    {
        for (int i = 0; i < r.Rows; i++)
        {
            if (!double.IsNegative(Scalar.RealPart(r[i, i])))
                continue;
            for (int j = i; j < r.Columns; j++)
                r[i, j] = -r[i, j];
            VectorOps.Scale(-T.One, &q.Data[i * q.ColumnStride], q.Rows);
        }
    }
}
