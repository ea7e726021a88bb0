using System.Numerics;

namespace TensorRG.Tensors.Kernels.Decompositions;

/// <summary>
/// Elementary reflectors H = 1 - tau v v^H with v[0] = 1, and products of them in compact form 1 - V T V^H
/// (Schreiber and Van Loan, SIAM J. Sci. Stat. Comput. 10, 53 (1989)).
/// </summary>
internal static unsafe class Reflector
{
    /// <summary>
    /// Overwrites x with the v of the reflector for which H^H x = beta e_0, beta real. Returns beta.
    /// What is too small to square without loss counts as zero, else H would not be unitary.
    /// </summary>
    public static double Generate<T>(T* x, int n, out T tau)
        where T : unmanaged, INumberBase<T>
    {
        tau = T.Zero;
        if (n == 0)
            return 0;
        T alpha = x[0];
        double real = Scalar.RealPart(alpha);
        double imaginary = Scalar.ToComplex(alpha).Imaginary;
        double tail = VectorOps.SumOfSquares(x + 1, n - 1);
        x[0] = T.One;
        if (tail <= Entry.TinySquare)
        {
            new Span<T>(x + 1, n - 1).Clear();
            tail = 0;
            if (imaginary * imaginary <= Entry.TinySquare)
                return real;
        }

        double beta = -Math.CopySign(Math.Sqrt((real * real) + (imaginary * imaginary) + tail), real);
        tau = (Scalar.FromReal<T>(beta) - alpha) / Scalar.FromReal<T>(beta);
        VectorOps.Scale(T.One / (alpha - Scalar.FromReal<T>(beta)), x + 1, n - 1);
        return beta;
    }

    /// <summary>C := (1 - f v v^H) C on contiguous columns; f is tau for H and conj(tau) for H^H.</summary>
    public static void Apply<T>(T* v, T factor, T* c, nint ld, int rows, int columns)
        where T : unmanaged, INumberBase<T>
    {
        const int Chunk = 32;
        T* overlaps = stackalloc T[Chunk];
        for (int first = 0; first < columns; first += Chunk)
        {
            int width = Math.Min(Chunk, columns - first);
            T* block = c + (first * ld);

            // The adjoint of what is wanted: (column^H v), so conjugate on use.
            Panels.AdjointTimes(block, ld, rows, width, v, overlaps);
            for (int j = 0; j < width; j++)
                VectorOps.AddScaled(-(factor * Scalar.Conjugate(overlaps[j])), v, block + (j * ld), rows);
        }
    }

    /// <summary>C := H_0 ... H_(k-1) C, or its adjoint (H_0 ... H_(k-1))^H C, by three matrix products.</summary>
    public static void ApplyBlock<T>(ManagedKernels<T> kernels, MatrixView<T> v, T* tau, MatrixView<T> c, bool adjoint)
        where T : unmanaged, INumberBase<T>
    {
        int k = v.Columns;
        if (k == 0 || c.Columns == 0)
            return;
        using AlignedBuffer<T> small = BufferPool.Rent<T>(2L * k * k);
        using AlignedBuffer<T> wide = BufferPool.Rent<T>(2L * k * c.Columns);
        var t = new MatrixView<T>(small.Data, k, k);
        FormNegativeT(kernels, v, tau, t, new MatrixView<T>(small.Data + (k * k), k, k));
        var projected = new MatrixView<T>(wide.Data, k, c.Columns);
        var weighted = new MatrixView<T>(wide.Data + ((nint)k * c.Columns), k, c.Columns);
        kernels.Multiply(v.Adjoint, c, projected, false);
        kernels.Multiply(adjoint ? t.Adjoint : t, projected, weighted, false);
        kernels.Multiply(v, weighted, c, true);
    }

    private static void FormNegativeT<T>(ManagedKernels<T> kernels, MatrixView<T> v, T* tau, MatrixView<T> t, MatrixView<T> gram)
        where T : unmanaged, INumberBase<T>
    {
        kernels.Multiply(v.Adjoint, v, gram, false);
        for (int i = 0; i < t.Columns; i++)
        {
            for (int r = 0; r < t.Rows; r++)
                t[r, i] = r == i ? -tau[i] : T.Zero;
            for (int r = 0; r < i; r++)
            {
                T sum = T.Zero;
                for (int p = r; p < i; p++)
                    sum += t[r, p] * gram[p, i];
                t[r, i] = -tau[i] * sum;
            }
        }
    }
}
