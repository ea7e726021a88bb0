using System.Numerics;

namespace TensorRG.Tensors.Kernels;

/// <summary>
/// Dense matrix products in SIMD, blocked for the caches: an unrolled micro-kernel on packed panels of B, with A read in
/// place where its k-stride is 1 (the scheme of BLIS: Van Zee and van de Geijn, ACM Trans. Math. Softw. 41, 14 (2015)).
/// </summary>
public static unsafe class Gemm
{
    /// <summary>Multiply-adds below which a second thread costs more than it brings.</summary>
    private const long ThreadingWork = 128L * 128 * 128;

    /// <summary>Fewest real rows or columns given to one thread at a time.</summary>
    private const int SmallestPart = 96;

    /// <summary>
    /// C = A B, or C += A B. A is m x k, B is k x n, C is m x n, all with any strides; conjugated views of A and B are
    /// honoured. With k = 0 the product is zero. The result has the same bits for every number of threads and every path.
    /// </summary>
    /// <typeparam name="T"><see cref="double"/> or <see cref="Complex"/>.</typeparam>
    /// <param name="a">m x k.</param>
    /// <param name="b">k x n.</param>
    /// <param name="c">m x n, not conjugated, disjoint from A and B.</param>
    /// <param name="accumulate">Whether to add to C instead of overwriting it.</param>
    /// <param name="workers">Threads to use for large products.</param>
    /// <param name="path">Instruction path.</param>
    /// <exception cref="ArgumentException">The shapes do not match, or C is conjugated.</exception>
    public static void Multiply<T>(
        MatrixView<T> a, MatrixView<T> b, MatrixView<T> c, bool accumulate, Workers workers, SimdPath path)
        where T : unmanaged, INumberBase<T>
    {
        if (a.Rows != c.Rows || b.Columns != c.Columns || a.Columns != b.Rows || c.Conjugated)
            throw Mismatch(a, b, c);
        if (c.Rows == 0 || c.Columns == 0)
            return;
        if (a.Columns == 0)
        {
            if (!accumulate)
                Clear(c);
            return;
        }

        // Tiles are written along rows of C: a C whose columns are contiguous is computed as C^T = B^T A^T.
        if (c.ColumnStride != 1 && c.RowStride == 1)
            Dispatch(b.Transposed, a.Transposed, c.Transposed, accumulate, workers, path);
        else
            Dispatch(a, b, c, accumulate, workers, path);
    }

    private static void Dispatch<T>(
        in MatrixView<T> a, in MatrixView<T> b, in MatrixView<T> c, bool accumulate, Workers workers, SimdPath path)
        where T : unmanaged, INumberBase<T>
    {
        int reals = sizeof(T) / sizeof(double);
        if (workers.Threads > 1 && (double)c.Rows * c.Columns * a.Columns * reals * reals >= ThreadingWork)
            Share(a, b, c, accumulate, workers, path);
        else
            Single(a, b, c, accumulate, path);
    }

    private static void Single<T>(
        in MatrixView<T> a, in MatrixView<T> b, in MatrixView<T> c, bool accumulate, SimdPath path)
        where T : unmanaged, INumberBase<T>
    {
        switch (path)
        {
            case SimdPath.Avx512:
                GemmDriver<T, Avx512MicroKernel>.Multiply(a, b, c, accumulate);
                break;
            case SimdPath.Avx2:
                GemmDriver<T, Avx2MicroKernel>.Multiply(a, b, c, accumulate);
                break;
            default:
                GemmDriver<T, PortableMicroKernel>.Multiply(a, b, c, accumulate);
                break;
        }
    }

    /// <summary>Cuts C into strips of rows, or of columns where it is wide; each strip is a product of its own, so the bits do not change.</summary>
    private static void Share<T>(
        MatrixView<T> a, MatrixView<T> b, MatrixView<T> c, bool accumulate, Workers workers, SimdPath path)
        where T : unmanaged, INumberBase<T>
    {
        // Packing A twice costs more than packing B twice, so rows are cut first.
        bool byColumns = c.Columns > 2L * c.Rows;
        int length = byColumns ? c.Columns : c.Rows;
        int strip = StripLength(length, sizeof(T) / sizeof(double), workers.Threads);
        workers.Run((length + strip - 1) / strip, part =>
        {
            int start = part * strip, size = Math.Min(strip, length - start);
            if (byColumns)
                Single(a, b.Slice(0, start, b.Rows, size), c.Slice(0, start, c.Rows, size), accumulate, path);
            else
                Single(a.Slice(start, 0, size, a.Columns), b, c.Slice(start, 0, size, c.Columns), accumulate, path);
        });
    }

    /// <summary>About two strips a thread even out a busy machine; a multiple of 24 fills the tiles of every path.</summary>
    private static int StripLength(int length, int reals, int threads)
    {
        int smallest = SmallestPart / reals;
        int strips = Math.Clamp(length / smallest / threads, 1, 2) * threads;
        int strip = (length + strips - 1) / strips;
        return (strip + 23) / 24 * 24;
    }

    private static void Clear<T>(in MatrixView<T> c)
        where T : unmanaged, INumberBase<T>
    {
        for (int i = 0; i < c.Rows; i++)
        {
            for (int j = 0; j < c.Columns; j++)
                c[i, j] = T.Zero;
        }
    }

    private static ArgumentException Mismatch<T>(in MatrixView<T> a, in MatrixView<T> b, in MatrixView<T> c)
        where T : unmanaged, INumberBase<T>
        => new($"Cannot form C ({c.Rows} x {c.Columns}{(c.Conjugated ? ", conjugated" : string.Empty)}) = "
            + $"A ({a.Rows} x {a.Columns}) B ({b.Rows} x {b.Columns}): the shapes must match and C must not be conjugated.");
}
