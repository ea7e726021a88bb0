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
            for (int i = 0; i < a.Rows; i++)
                largest = LargerPart(a[i, j], largest);
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

    /// <summary>Copies 2^-exponent A, as a reader sees it, to another view.</summary>
    public static void CopyScaled<T>(MatrixView<T> from, MatrixView<T> to, int exponent)
        where T : unmanaged, INumberBase<T>
    {
        if (Math.Abs(to.RowStride) > Math.Abs(to.ColumnStride))
        {
            from = from.Transposed;
            to = to.Transposed;
        }

        T factor = Scalar.FromReal<T>(Math.ScaleB(1, -exponent));
        for (int j = 0; j < to.Columns; j++)
        {
            for (int i = 0; i < to.Rows; i++)
                to[i, j] = from.Read(i, j) * factor;
        }
    }

    private static double LargerPart<T>(T value, double largest)
        where T : unmanaged, INumberBase<T>
    {
        if (typeof(T) == typeof(double))
            return Math.Max(largest, Math.Abs((double)(object)value));
        var z = (Complex)(object)value;
        return Math.Max(largest, Math.Max(Math.Abs(z.Real), Math.Abs(z.Imaginary)));
    }
}
