using System.Numerics;

namespace TensorRG.Tensors.Kernels.Decompositions;

/// <summary>Completes a set of orthonormal columns.</summary>
internal static unsafe class OrthonormalCompletion
{
    /// <summary>
    /// Sets columns <paramref name="from"/> and later to unit vectors orthogonal to all before them. Each starts from
    /// the axis that the columns so far cover least, so that Gram-Schmidt applied twice is enough.
    /// </summary>
    /// <param name="q">Unit row stride; columns before <paramref name="from"/> orthonormal.</param>
    /// <param name="from">First column to set.</param>
    public static void Complete<T>(MatrixView<T> q, int from)
        where T : unmanaged, INumberBase<T>
    {
        if (from == q.Columns)
            return;
        double[] cover = new double[q.Rows];
        for (int j = 0; j < from; j++)
            AddCover(q, j, cover);
        using AlignedBuffer<T> overlaps = BufferPool.Rent<T>(q.Columns);
        for (int j = from; j < q.Columns; j++)
        {
            T* column = q.Data + (j * q.ColumnStride);
            new Span<T>(column, q.Rows).Clear();
            column[LeastCovered(cover)] = T.One;
            for (int pass = 0; pass < 3; pass++)
                Orthonormalise(q, j, column, overlaps.Data);
            AddCover(q, j, cover);
        }
    }

    private static void Orthonormalise<T>(MatrixView<T> q, int j, T* column, T* overlaps)
        where T : unmanaged, INumberBase<T>
    {
        Panels.AdjointTimes(q.Data, q.ColumnStride, q.Rows, j, column, overlaps);
        VectorOps.Scale(-T.One, overlaps, j);
        Panels.AddTimes(q.Data, q.ColumnStride, q.Rows, j, overlaps, column);
        double norm = Math.Sqrt(VectorOps.SumOfSquares(column, q.Rows));
        VectorOps.Scale(Scalar.FromReal<T>(1 / norm), column, q.Rows);
    }

    private static void AddCover<T>(MatrixView<T> q, int j, double[] cover)
        where T : unmanaged, INumberBase<T>
    {
        for (int i = 0; i < cover.Length; i++)
            cover[i] += Scalar.SquaredMagnitude(q[i, j]);
    }

    private static int LeastCovered(double[] cover)
    {
        int best = 0;
        for (int i = 1; i < cover.Length; i++)
            best = cover[i] < cover[best] ? i : best;
        return best;
    }
}
