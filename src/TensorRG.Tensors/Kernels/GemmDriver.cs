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
[SkipLocalsInit]
internal unsafe struct GemmDriver<T, TKernel>
    where T : unmanaged, INumberBase<T>
    where TKernel : struct, IMicroKernel
{
    private const int MaxDepth = 384;

    // Blocks in real numbers: rows of A that stay in the second-level cache, columns of B in the third.
    private const int RowBlock = 126;
    private const int ColumnBlock = 576;

    // Real numbers in a first-level cache, and columns beyond which a row-major A is packed.
    private const int SmallSize = 4096;
    private const int ManyColumns = 288;

    private readonly MatrixView<T> _c;
    private readonly bool _wide;
    private TileCall _call;
    private readonly TileEnd _end;
    private bool _packA;
    private bool _packB;

    private GemmDriver(in MatrixView<T> c, bool conjugateA, bool conjugateB)
    {
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
        if (IsSimple(a, b, c))
        {
            MultiplySimple(a, b, c, accumulate);
            return;
        }

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

    /// <summary>Whether whole vectors can go from B to C without any packing: the bulk of the many small products.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static bool IsSimple(in MatrixView<T> a, in MatrixView<T> b, in MatrixView<T> c)
        => Reals == 1 && b.ColumnStride == 1 && c.ColumnStride == 1 && b.Columns % TKernel.Lanes == 0
            && a.Rows > 2 && a.Columns <= MaxDepth
            && (long)a.Rows * a.Columns <= SmallSize && (long)b.Rows * b.Columns <= SmallSize;

    /// <summary>The loop over tiles alone, with the least possible work around it.</summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private static void MultiplySimple(in MatrixView<T> a, in MatrixView<T> b, in MatrixView<T> c, bool accumulate)
    {
        TileCall call;
        call.Depth = a.Columns;
        call.APair = 2 * a.RowStride;
        call.AOdd = a.RowStride;
        call.AStep = a.ColumnStride;
        call.BStep = b.RowStride;
        call.CRow = c.RowStride;
        call.Accumulate = accumulate;
        var tiles = new RowTiles(a.Rows, TKernel.Rows);
        for (int j = 0; j < b.Columns; j += TileColumns)
        {
            int vectors = Math.Min(TileColumns, b.Columns - j) / TKernel.Lanes;
            double* left = (double*)a.Data, to = (double*)(c.Data + j);
            for (int t = 0; t < tiles.Count; t++)
            {
                int size = t < tiles.Larger ? tiles.Size + 1 : tiles.Size;
                TKernel.Run(size, vectors, call, left, (double*)(b.Data + j), to);
                left += size * a.RowStride;
                to += size * c.RowStride;
            }
        }
    }

    private void Slab(in MatrixView<T> a, in MatrixView<T> b, bool accumulate)
    {
        _packA = PacksA(a, b.Columns);
        _packB = b.ColumnStride != 1 || PacksB(b, a.Rows);
        nint row = a.RowStride * Reals;
        _call.Depth = a.Columns;
        _call.APair = _packA ? 2 : row * 2 / Reals;
        _call.AOdd = _packA || Reals == 2 ? 1 : row;
        _call.AStep = _packA ? TKernel.Rows : a.ColumnStride * Reals;
        _call.CRow = _c.RowStride;
        _call.Accumulate = accumulate;
        int step = ColumnBlock / Reals / TileColumns * TileColumns;
        for (int j = 0; j < b.Columns; j += step)
            Columns(a, b, j, Math.Min(step, b.Columns - j));
    }

    /// <summary>
    /// In place is faster while A is small or meets few columns. Beyond that a strided A wastes cache lines, and a long
    /// row-major one competes with itself for the same cache sets (measured: 10 % at 1024^3).
    /// </summary>
    private static bool PacksA(in MatrixView<T> a, int columns)
    {
        long size = (long)a.Rows * a.Columns * Reals;
        if (size <= SmallSize)
            return false;
        return a.ColumnStride == 1 ? columns * Reals > ManyColumns : columns > 2 * TileColumns;
    }

    /// <summary>A copy of B pays once it is read by several tiles of rows and is too large for the first-level cache.</summary>
    private bool PacksB(in MatrixView<T> b, int rows)
        => !_wide && (long)b.Rows * b.Columns * Reals > SmallSize && rows > 4 * TileRows;

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

    private static double* PackB(in MatrixView<T> b, int firstColumn, int columns)
    {
        nint panel = (nint)TileColumns * b.Rows;
        int panels = (columns + TileColumns - 1) / TileColumns;
        T* packed = (T*)GemmScratch.Current.Right(panel * panels * Reals);
        T* target = packed;
        for (int j = 0; j < columns; j += TileColumns, target += panel)
            PackPanel(b, firstColumn + j, Math.Min(TileColumns, columns - j), target);
        return (double*)packed;
    }

    /// <summary>Columns of B side by side, padded with zeros to whole vectors.</summary>
    private static void PackPanel(in MatrixView<T> b, int firstColumn, int columns, T* target)
    {
        T* source = b.Data + (firstColumn * b.ColumnStride);
        if (columns == TileColumns)
            PanelCopy.Run(source, b.RowStride, b.ColumnStride, b.Rows, columns, target, TileColumns);
        else
            PanelCopy.RunPadded(source, b.RowStride, b.ColumnStride, b.Rows, columns, target, TileColumns);
    }

    private static double* PackA(in MatrixView<T> a, int firstRow, int rows)
    {
        nint panel = (nint)TileRows * a.Columns;
        var tiles = new RowTiles(rows, TileRows);
        T* packed = (T*)GemmScratch.Current.Left(panel * tiles.Count * Reals);
        T* target = packed;
        T* source = a.Data + (firstRow * a.RowStride);
        for (int tile = 0; tile < tiles.Count; tile++, target += panel)
        {
            int size = tile < tiles.Larger ? tiles.Size + 1 : tiles.Size;
            PanelCopy.Run(source, a.ColumnStride, a.RowStride, a.Columns, size, target, TileRows);
            source += size * a.RowStride;
        }

        return (double*)packed;
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private void Block(
        in MatrixView<T> a, in MatrixView<T> b, double* packedA, double* packedB, int i, int rows, int firstColumn, int columns)
    {
        var tiles = new RowTiles(rows, TileRows);
        int width = _wide && packedB is null ? TKernel.Lanes * TKernel.WideVectors / Reals : TileColumns;
        double* left = packedA is null ? (double*)(a.Data + (i * a.RowStride)) : packedA;
        nint leftStep = (packedA is null ? a.RowStride : 0) * Reals, leftTile = packedA is null ? 0 : (nint)TKernel.Rows * a.Columns;
        T* c = _c.Data + (i * _c.RowStride) + (firstColumn * _c.ColumnStride);
        for (int j = 0; j < columns; j += width)
        {
            width = columns - j < width ? TileColumns : width;
            int size = Math.Min(width, columns - j);
            nint step = TKernel.Lanes * TKernel.Vectors;
            double* right;
            if (packedB is not null)
            {
                right = packedB + ((nint)j * a.Columns * Reals);
            }
            else if (size * Reals % TKernel.Lanes == 0)
            {
                right = (double*)(b.Data + firstColumn + j);
                step = b.RowStride * Reals;
            }
            else
            {
                // The last vector would read past the row: a padded copy.
                right = GemmScratch.Current.Right((long)TileColumns * a.Columns * Reals);
                PackPanel(b, firstColumn + j, size, (T*)right);
            }

            _call.BStep = step;
            if (Reals == 1 && _c.ColumnStride == 1 && size % TKernel.Lanes == 0)
                DirectTiles(tiles, left, leftStep, leftTile, right, (double*)(c + j), size / TKernel.Lanes);
            else
                TilesAside(tiles, left, leftStep, leftTile, right, c + (j * _c.ColumnStride), size);
        }
    }

    /// <summary>All row tiles of a block against one panel of B, written by the micro-kernel.</summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private readonly void DirectTiles(
        in RowTiles tiles, double* left, nint leftStep, nint leftTile, double* right, double* c, int vectors)
    {
        for (int t = 0; t < tiles.Count; t++)
        {
            int size = t < tiles.Larger ? tiles.Size + 1 : tiles.Size;
            TKernel.Run(size, vectors, _call, left, right, c);
            left += (size * leftStep) + leftTile;
            c += size * _c.RowStride;
        }
    }

    /// <summary>The same through a tile beside C, for ragged edges, strided columns and complex numbers.</summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private readonly void TilesAside(
        in RowTiles tiles, double* left, nint leftStep, nint leftTile, double* right, T* c, int columns)
    {
        int vectors = ((columns * Reals) + TKernel.Lanes - 1) / TKernel.Lanes;
        double* tile = GemmScratch.Current.Tile;
        TileCall aside = _call;
        aside.CRow = vectors * TKernel.Lanes;
        aside.Accumulate = false;
        for (int t = 0; t < tiles.Count; t++)
        {
            int size = t < tiles.Larger ? tiles.Size + 1 : tiles.Size;
            TKernel.Run(size * Reals, vectors, aside, left, right, tile);
            _end.Write(tile, aside.CRow, size, columns, c, _c.RowStride, _c.ColumnStride, _call.Accumulate);
            left += (size * leftStep) + leftTile;
            c += size * _c.RowStride;
        }
    }
}
