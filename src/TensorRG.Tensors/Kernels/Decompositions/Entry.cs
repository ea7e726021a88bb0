using System.Numerics;

namespace TensorRG.Tensors.Kernels.Decompositions;

/// <summary>
/// What every decomposition does at the door: measure the largest element, refuse NaN and infinity, and copy scaled by a
/// power of two, so that squares neither overflow nor vanish inside. Scaling by a power of two is exact.
/// </summary>
internal static unsafe class Entry
{
    /// <summary>A squared norm below this, in a matrix of largest element one, counts as zero.</summary>
    public const double TinySquare = 1e-280;

    /// <summary>The largest |real or imaginary part|; NaN or infinity where the view holds one.</summary>
    public static double LargestPart<T>(MatrixView<T> a)
        where T : unmanaged, INumberBase<T>
    {
        if (Math.Abs(a.RowStride) > Math.Abs(a.ColumnStride))
            a = a.Transposed;
        double largest = 0;
        for (int j = 0; j < a.Columns; j++)
        {
            T* column = a.Data + (j * a.ColumnStride);
            if (a.RowStride == 1)
            {
                largest = Math.Max(largest, VectorOps.MaxAbs(column, a.Rows));
                continue;
            }

            for (int i = 0; i < a.Rows; i++)
                largest = Math.Max(largest, VectorOps.MaxAbs(column + (i * a.RowStride), 1));
        }

        return largest;
    }

    /// <summary>The largest part of the matrix, or an exception if it is not finite.</summary>
    public static double FiniteLargestPart<T>(MatrixView<T> a, string task)
        where T : unmanaged, INumberBase<T>
    {
        double largest = LargestPart(a);
        if (!double.IsFinite(largest))
            throw new DecompositionException($"{task} of {a.Rows} x {a.Columns}: the matrix holds NaN or infinity.");
        return largest;
    }

    /// <summary>The exponent e for which 2^-e brings a largest part near one; zero for a zero matrix.</summary>
    public static int Exponent(double largest) => largest == 0 ? 0 : Math.Clamp(Math.ILogB(largest), -1020, 1020);

    /// <summary>Copies 2^-exponent A, as a reader sees it, to another view that does not overlap.</summary>
    public static void CopyScaled<T>(MatrixView<T> from, MatrixView<T> to, int exponent)
        where T : unmanaged, INumberBase<T>
    {
        if (to.Rows == 0 || to.Columns == 0)
            return;
        StridedCopy.Run(
            [to.Rows, to.Columns], from.Data, [from.RowStride, from.ColumnStride], to.Data, [to.RowStride, to.ColumnStride], from.Conjugated);
        if (exponent != 0)
            Scale(to, exponent);
    }

    /// <summary>A := 2^-exponent A.</summary>
    public static void Scale<T>(MatrixView<T> a, int exponent)
        where T : unmanaged, INumberBase<T>
    {
        if (Math.Abs(a.RowStride) > Math.Abs(a.ColumnStride))
            a = a.Transposed;
        double factor = Math.ScaleB(1, -exponent);
        for (int j = 0; j < a.Columns; j++)
        {
            T* column = a.Data + (j * a.ColumnStride);
            if (a.RowStride == 1)
            {
                VectorOps.ScaleReal(factor, column, a.Rows);
                continue;
            }

            for (int i = 0; i < a.Rows; i++)
                VectorOps.ScaleReal(factor, column + (i * a.RowStride), 1);
        }
    }
}
