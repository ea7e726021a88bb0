using System.Numerics;

namespace TensorRG.Tensors.Kernels.Decompositions;

/// <summary>Hermitian eigenproblem: reduction to a real tridiagonal, implicit QL, back-transformation.</summary>
internal static unsafe class HermitianEigenSolver
{
    /// <summary>A V = V diag(values), descending; A is left unchanged.</summary>
    public static void Solve<T>(ManagedKernels<T> kernels, MatrixView<T> a, Span<double> values, MatrixView<T> vectors)
        where T : unmanaged, INumberBase<T>
    {
        int n = a.Rows;
        if (n == 0)
            return;
        int exponent = Entry.Exponent(Entry.FiniteLargestPart(a, "Eigenproblem"));
        using AlignedBuffer<T> work = BufferPool.Rent<T>((long)n * n);
        using AlignedBuffer<double> tridiagonal = BufferPool.RentZeroed<double>(2L * n);
        var matrix = new MatrixView<T>(work.Data, n, n, 1, n);
        Entry.CopyScaled(a, matrix, exponent);
        using var reduction = new TridiagonalReduction<T>(kernels, matrix);
        Span<double> d = tridiagonal.Span[..n], e = tridiagonal.Span[n..];
        reduction.Reduce(d, e);

        // QL converges from the top: a graded matrix must have its small end there.
        bool reversed = Math.Abs(d[0]) > Math.Abs(d[n - 1]);
        if (reversed)
        {
            d.Reverse();
            e[..(n - 1)].Reverse();
        }

        using var batch = new RotationBatch(kernels.Workers, n, reversed);
        TridiagonalQl.Solve(d, e, batch);
        Collect(batch, d, exponent, values, matrix);
        reduction.ApplyQ(matrix);
        Entry.CopyScaled(matrix, vectors, 0);
    }

    private static void Collect<T>(RotationBatch batch, Span<double> d, int exponent, Span<double> values, MatrixView<T> to)
        where T : unmanaged, INumberBase<T>
    {
        int[] order = Ordering.Descending(d);
        for (int j = 0; j < order.Length; j++)
        {
            values[j] = Math.ScaleB(d[order[j]], exponent);
            double* row = batch.Row(order[j]);
            for (int i = 0; i < order.Length; i++)
                to[i, j] = Scalar.FromReal<T>(row[i]);
        }
    }
}
