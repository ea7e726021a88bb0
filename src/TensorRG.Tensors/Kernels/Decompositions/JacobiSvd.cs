using System.Numerics;

namespace TensorRG.Tensors.Kernels.Decompositions;

/// <summary>
/// Singular values of a small square matrix by one-sided Jacobi on the adjoint of its pivoted triangular factor
/// (Drmac and Veselic, SIAM J. Matrix Anal. Appl. 29, 1322 (2008)): few sweeps, and small values to high relative accuracy.
/// </summary>
internal static unsafe class JacobiSvd
{
    private const int MaxSweeps = 40;

    /// <summary>
    /// A = U diag(s) V^H for a square A with largest element near one; A is destroyed. All views have unit row stride.
    /// </summary>
    public static void Solve<T>(ManagedKernels<T> kernels, MatrixView<T> a, MatrixView<T> u, Span<double> s, MatrixView<T> v)
        where T : unmanaged, INumberBase<T>
    {
        int n = a.Rows;
        using AlignedBuffer<T> reflectors = BufferPool.RentZeroed<T>((long)n * n);
        using AlignedBuffer<T> stacked = BufferPool.RentZeroed<T>(2L * n * n);
        using AlignedBuffer<T> tau = BufferPool.Rent<T>(n);
        using AlignedBuffer<int> order = BufferPool.Rent<int>(n);
        var h = new MatrixView<T>(reflectors.Data, n, n, 1, n);
        HouseholderQr.FactorPivoted(a, h, tau.Data, order.Data);
        var x = new MatrixView<T>(stacked.Data, 2 * n, n, 1, 2 * n);
        StackAdjoint(a, x);
        Iterate(x, n);
        Collect(x, order.Data, u, s, v);
        HouseholderQr.ApplyQ(kernels, h, tau.Data, u);
    }

    /// <summary>Column k becomes (R^H)_k on top of e_k, so that one rotation serves both.</summary>
    private static void StackAdjoint<T>(MatrixView<T> r, MatrixView<T> x)
        where T : unmanaged, INumberBase<T>
    {
        int n = r.Columns;
        for (int k = 0; k < n; k++)
        {
            for (int i = k; i < n; i++)
                x[i, k] = Scalar.Conjugate(r[k, i]);
            x[n + k, k] = T.One;
        }
    }

    private static void Iterate<T>(MatrixView<T> x, int n)
        where T : unmanaged, INumberBase<T>
    {
        double tolerance = Math.ScaleB(Math.Max(4, Math.Sqrt(n)), -53);
        using AlignedBuffer<double> norms = BufferPool.Rent<double>(n);
        for (int sweep = 0; sweep < MaxSweeps; sweep++)
        {
            bool rotated = false;
            for (int p = 0; p < n; p++)
                norms.Data[p] = VectorOps.SumOfSquares(x.Data + (p * x.ColumnStride), n);
            for (int p = 0; p < n; p++)
            {
                for (int q = p + 1; q < n; q++)
                    rotated |= Orthogonalise(x, n, p, q, norms.Data, tolerance);
            }

            if (!rotated)
                return;
        }

        throw new DecompositionException($"Singular values of size {n}: {MaxSweeps} Jacobi sweeps did not converge.");
    }

    private static bool Orthogonalise<T>(MatrixView<T> x, int n, int p, int q, double* norms, double tolerance)
        where T : unmanaged, INumberBase<T>
    {
        double alpha = norms[p], beta = norms[q];
        if (alpha < Entry.TinySquare || beta < Entry.TinySquare)
            return false;
        T* left = x.Data + (p * x.ColumnStride), right = x.Data + (q * x.ColumnStride);
        T gamma = VectorOps.Dot(left, right, n);
        double size = Scalar.Magnitude(gamma);
        if (size <= tolerance * Math.Sqrt(alpha) * Math.Sqrt(beta))
            return false;
        double zeta = (beta - alpha) / (2 * size);
        double t = Math.CopySign(1, zeta) / (Math.Abs(zeta) + Math.Sqrt(1 + (zeta * zeta)));
        double c = 1 / Math.Sqrt(1 + (t * t));
        ColumnRotation.Apply(left, right, x.Rows, c, gamma * Scalar.FromReal<T>(c * t / size));
        if (Math.Abs(t) * size > 0.1 * Math.Min(alpha, beta))
        {
            // The short update cancels here: measure again.
            norms[p] = VectorOps.SumOfSquares(left, n);
            norms[q] = VectorOps.SumOfSquares(right, n);
        }
        else
        {
            norms[p] = alpha - (t * size);
            norms[q] = beta + (t * size);
        }

        return true;
    }

    /// <summary>Splits the columns into s, the right vectors P X / s and the inner left vectors, by descending s.</summary>
    private static void Collect<T>(MatrixView<T> x, int* pivots, MatrixView<T> u, Span<double> s, MatrixView<T> v)
        where T : unmanaged, INumberBase<T>
    {
        int n = x.Columns, rank = 0;
        double[] norms = new double[n];
        for (int k = 0; k < n; k++)
        {
            double square = VectorOps.SumOfSquares(x.Data + (k * x.ColumnStride), n);
            norms[k] = square < Entry.TinySquare ? 0 : Math.Sqrt(square);
            rank += norms[k] > 0 ? 1 : 0;
        }

        int[] order = Ordering.Descending(norms);
        for (int k = 0; k < n; k++)
        {
            T* column = x.Data + (order[k] * x.ColumnStride);
            s[k] = norms[order[k]];

            // Hundreds of rotations stretch a unit vector by as many roundings: normalise.
            double stretch = Math.Sqrt(VectorOps.SumOfSquares(column + n, n));
            VectorOps.ScaledCopy(Scalar.FromReal<T>(1 / stretch), column + n, u.Data + (k * u.ColumnStride), n);
            T inverse = Scalar.FromReal<T>(s[k] > 0 ? 1 / s[k] : 0);
            for (int i = 0; i < n; i++)
                v[pivots[i], k] = column[i] * inverse;
        }

        OrthonormalCompletion.Complete(v, rank);
    }
}
