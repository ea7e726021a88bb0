using System.Numerics;
using System.Runtime.CompilerServices;

namespace TensorRG.Tensors.Kernels;

/// <summary>
/// The single-threaded matrix product around a micro-kernel. The sum over k is cut into slabs that depend on k only;
/// within a slab each element is one chain of fused multiply-adds, and slabs are added in order. No other choice made
/// here (packing, blocks, tiles) touches the bits. A complex matrix is multiplied as a real one: see <see cref="TileEnd"/>.
/// </summary>
/// <typeparam name="T"><see cref="double"/> or <see cref="Complex"/>.</typeparam>
/// <typeparam name="TKernel">The micro-kernel.</typeparam>
internal unsafe struct GemmDriver<T, TKernel>
    where T : unmanaged, INumberBase<T>
    where TKernel : struct, IMicroKernel
{
    private const int MaxDepth = 384;

    // Blocks in real numbers: rows of A that stay in the second-level cache, columns of B in the third.
    private const int RowBlock = 126;
    private const int ColumnBlock = 576;

    private readonly GemmScratch _scratch;
    private readonly MatrixView<T> _c;
    private readonly bool _wide;
    private TileCall _call;
    private TileEnd _end;
    private bool _packA;
    private bool _packB;

    private GemmDriver(in MatrixView<T> c, bool conjugateA, bool conjugateB)
    {
        _scratch = GemmScratch.Current;
        _c = c;
        _wide = c.Rows * Reals <= 2;
        _end = new TileEnd(conjugateA, conjugateB);
    }

    private static int Reals
    {
        [MethodImpl(MethodImplOptions.AggressiveInlining)]
        get => sizeof(T) / sizeof(double);
    }

    private static int TileRows
    {
        [MethodImpl(MethodImplOptions.AggressiveInlining)]
        get => TKernel.Rows / Reals;
    }

    private static int TileColumns
    {
        [MethodImpl(MethodImplOptions.AggressiveInlining)]
        get => TKernel.Lanes * TKernel.Vectors / Reals;
    }

    /// <summary>C = A B or C += A B; no dimension is 0.</summary>
    internal static void Multiply(in MatrixView<T> a, in MatrixView<T> b, in MatrixView<T> c, bool accumulate)
    {
        var driver = new GemmDriver<T, TKernel>(c, a.Conjugated, b.Conjugated);
        int k = a.Columns;
        if (k <= MaxDepth)
        {
            driver.Slab(a, b, accumulate);
            return;
        }

        int slabs = (k + MaxDepth - 1) / MaxDepth;
        int depth = (((k + slabs - 1) / slabs) + 3) & ~3;
        for (int start = 0; start < k; start += depth)
        {
            int size = Math.Min(depth, k - start);
            driver.Slab(a.Slice(0, start, a.Rows, size), b.Slice(start, 0, size, b.Columns), accumulate || start > 0);
        }
    }

    private void Slab(in MatrixView<T> a, in MatrixView<T> b, bool accumulate)
    {
        long sizeA = (long)a.Rows * a.Columns * Reals, sizeB = (long)b.Rows * b.Columns * Reals;
        _packA = a.ColumnStride != 1 && sizeA > 4096 && b.Columns > 2 * TileColumns;
        _packB = !_wide && (b.ColumnStride != 1 || (sizeB > 4096 && a.Rows > 4 * TileRows));
        _packB |= b.ColumnStride != 1;
        nint row = a.RowStride * Reals;
        _call = new TileCall(
            a.Columns,
            _packA ? 2 : row * 2 / Reals,
            _packA || Reals == 2 ? 1 : row,
            _packA ? TKernel.Rows : a.ColumnStride * Reals,
            _packB ? TKernel.Lanes * TKernel.Vectors : b.RowStride * Reals,
            _c.RowStride,
            accumulate);
        int step = ColumnBlock / Reals / TileColumns * TileColumns;
        for (int j = 0; j < b.Columns; j += step)
            Columns(a, b, j, Math.Min(step, b.Columns - j));
    }

    /// <summary>One block of columns of B and C, times all row blocks of A.</summary>
    private void Columns(in MatrixView<T> a, in MatrixView<T> b, int firstColumn, int columns)
    {
        double* packedB = _packB ? PackB(b, firstColumn, columns) : null;
        int blocks = ((a.Rows * Reals) + RowBlock - 1) / RowBlock;
        int step = ((((a.Rows + blocks - 1) / blocks) + TileRows - 1) / TileRows) * TileRows;
        for (int i = 0; i < a.Rows; i += step)
        {
            int rows = Math.Min(step, a.Rows - i);
            double* packedA = _packA ? PackA(a, i, rows) : null;
            Block(a, b, packedA, packedB, i, rows, firstColumn, columns);
        }
    }

    private double* PackB(in MatrixView<T> b, int firstColumn, int columns)
    {
        nint panel = (nint)TileColumns * b.Rows;
        int panels = (columns + TileColumns - 1) / TileColumns;
        T* packed = (T*)_scratch.Right(panel * panels * Reals);
        T* target = packed;
        for (int j = 0; j < columns; j += TileColumns, target += panel)
            PackPanel(b, firstColumn + j, Math.Min(TileColumns, columns - j), target);
        return (double*)packed;
    }

    /// <summary>Columns of B side by side, padded with zeros to the width of a tile.</summary>
    private static void PackPanel(in MatrixView<T> b, int firstColumn, int columns, T* target)
    {
        if (columns < TileColumns)
            System.Runtime.InteropServices.NativeMemory.Clear(target, (nuint)(TileColumns * b.Rows * sizeof(T)));
        T* source = b.Data + (firstColumn * b.ColumnStride);
        PanelCopy.Run(source, b.RowStride, b.ColumnStride, b.Rows, columns, target, TileColumns);
    }

    private double* PackA(in MatrixView<T> a, int firstRow, int rows)
    {
        nint panel = (nint)TileRows * a.Columns;
        int tiles = (rows + TileRows - 1) / TileRows;
        T* packed = (T*)_scratch.Left(panel * tiles * Reals);
        T* target = packed;
        for (int tile = 0; tile < tiles; tile++, target += panel)
        {
            Split(rows, tiles, tile, out int start, out int size);
            T* source = a.Data + ((firstRow + start) * a.RowStride);
            PanelCopy.Run(source, a.ColumnStride, a.RowStride, a.Columns, size, target, TileRows);
        }

        return (double*)packed;
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private void Block(
        in MatrixView<T> a, in MatrixView<T> b, double* packedA, double* packedB, int i, int rows, int firstColumn, int columns)
    {
        int width = _wide && packedB is null ? TKernel.Lanes * TKernel.WideVectors / Reals : TileColumns;
        double* left = packedA is null ? (double*)(a.Data + (i * a.RowStride)) : packedA;
        nint leftStep = (packedA is null ? a.RowStride : a.Columns) * Reals;
        TileCall call = _call;
        for (int j = 0; j < columns; j += width)
        {
            width = columns - j < width ? TileColumns : width;
            int size = Math.Min(width, columns - j);
            double* right;
            if (packedB is not null)
            {
                right = packedB + ((nint)j * a.Columns * Reals);
            }
            else if (size * Reals % TKernel.Lanes == 0)
            {
                right = (double*)(b.Data + firstColumn + j);
            }
            else
            {
                // The last vector would read past the row: a padded copy.
                right = _scratch.Right((long)TileColumns * a.Columns * Reals);
                PackPanel(b, firstColumn + j, size, (T*)right);
                call = _call with { BStep = TKernel.Lanes * TKernel.Vectors };
            }

            Panel(call, left, leftStep, packedA is not null, right, i, rows, firstColumn + j, size);
        }
    }

    /// <summary>All row tiles of a block against one panel of B.</summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private void Panel(
        in TileCall call, double* left, nint leftStep, bool packed, double* right, int i, int rows, int j, int columns)
    {
        int tiles = (rows + TileRows - 1) / TileRows;
        int vectors = ((columns * Reals) + TKernel.Lanes - 1) / TKernel.Lanes;
        bool direct = Reals == 1 && _c.ColumnStride == 1 && columns == vectors * TKernel.Lanes;
        double* tile = _scratch.Tile;
        TileCall aside = call with { CRow = vectors * TKernel.Lanes, Accumulate = false };
        T* c = _c.Data + (i * _c.RowStride) + (j * _c.ColumnStride);
        for (int t = 0; t < tiles; t++)
        {
            Split(rows, tiles, t, out int start, out int size);
            double* from = left + ((packed ? t * TileRows : start) * leftStep);
            T* to = c + (start * _c.RowStride);
            if (direct)
            {
                TKernel.Run(size, vectors, call, from, right, (double*)to);
                continue;
            }

            TKernel.Run(size * Reals, vectors, aside, from, right, tile);
            _end.Write(tile, aside.CRow, size, columns, to, _c.RowStride, _c.ColumnStride, call.Accumulate);
        }
    }

    /// <summary>Cuts rows into tiles whose sizes differ by at most one, so that none is too thin to run at full speed.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static void Split(int rows, int tiles, int tile, out int start, out int size)
    {
        int small = rows / tiles, larger = rows - (small * tiles);
        start = (tile * small) + Math.Min(tile, larger);
        size = tile < larger ? small + 1 : small;
    }
}
