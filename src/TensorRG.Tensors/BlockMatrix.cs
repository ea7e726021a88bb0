using System.Collections.Immutable;
using System.Numerics;
using TensorRG.Tensors.Kernels;

namespace TensorRG.Tensors;

/// <summary>
/// A tensor read as a block-diagonal matrix: some legs make the rows, the others the columns, and each total charge of
/// the rows has one dense matrix. A block that already lies in memory as such a matrix is viewed in place, all others are gathered.
/// </summary>
internal sealed unsafe class BlockMatrix<T> : IDisposable
    where T : unmanaged, INumberBase<T>
{
    private readonly AlignedBuffer<T>? _gathered;
    private readonly Dictionary<Charge, MatrixView<T>> _blocks;
    private readonly object? _owner;

    // The owner is whatever else owns memory that blocks point into; it is held so that it is not collected.
    private BlockMatrix(FusedSpace rows, FusedSpace columns, Charge flux, Dictionary<Charge, MatrixView<T>> blocks, AlignedBuffer<T>? gathered, object? owner = null)
    {
        _owner = owner;
        Rows = rows;
        Columns = columns;
        Flux = flux;
        _blocks = blocks;
        _gathered = gathered;
    }

    public FusedSpace Rows { get; }

    public FusedSpace Columns { get; }

    public Charge Flux { get; }

    /// <summary>Charges of rows for which there is a block, ascending.</summary>
    public IEnumerable<Charge> Charges => Rows.Parts.Where(p => _blocks.ContainsKey(p.Charge)).Select(static p => p.Charge);

    public bool Contains(Charge rowCharge) => _blocks.ContainsKey(rowCharge);

    public MatrixView<T> this[Charge rowCharge] => _blocks[rowCharge];

    /// <summary>Total charge of the columns that pair with rows of a charge.</summary>
    public Charge ColumnCharge(Charge rowCharge) => Rows.Group.Subtract(Flux, rowCharge);

    /// <summary>Reads a tensor as a matrix; with <paramref name="copy"/> the result never shares memory with it.</summary>
    public static BlockMatrix<T> From(Tensor<T> tensor, ReadOnlySpan<int> rowAxes, ReadOnlySpan<int> columnAxes, bool copy = false)
    {
        AbelianGroup group = GroupOf(tensor);
        var rows = new FusedSpace(group, Pick(tensor, rowAxes));
        var columns = new FusedSpace(group, Pick(tensor, columnAxes));
        int[] order = [.. rowAxes, .. columnAxes];
        var blocks = new Dictionary<Charge, MatrixView<T>>();
        var pending = new List<(FusedSpace.Part Row, FusedSpace.Part Column, long Offset)>();
        long size = 0;
        foreach (FusedSpace.Part row in rows.Parts)
        {
            FusedSpace.Part? column = columns.Find(group.Subtract(tensor.Flux, row.Charge));
            if (column is null)
                continue;
            if (!copy && TryView(tensor, row, column, order, out MatrixView<T> view))
            {
                blocks.Add(row.Charge, view);
                continue;
            }

            pending.Add((row, column, size));
            size += (long)row.Dimension * column.Dimension;
        }

        AlignedBuffer<T>? gathered = size == 0 ? null : BufferPool.Rent<T>(size);
        foreach ((FusedSpace.Part row, FusedSpace.Part column, long offset) in pending)
        {
            var view = new MatrixView<T>(gathered!.Data + offset, row.Dimension, column.Dimension);
            Move(tensor, row, column, order, view, gather: true);
            blocks.Add(row.Charge, view);
        }

        return new BlockMatrix<T>(rows, columns, tensor.Flux, blocks, gathered, tensor);
    }

    /// <summary>Space for a matrix with the given legs as rows and columns; contents undefined.</summary>
    public static BlockMatrix<T> Allocate(FusedSpace rows, FusedSpace columns, Charge flux)
    {
        long size = 0;
        foreach (FusedSpace.Part row in rows.Parts)
            size += (long)row.Dimension * (columns.Find(rows.Group.Subtract(flux, row.Charge))?.Dimension ?? 0);
        AlignedBuffer<T> memory = BufferPool.Rent<T>(size);
        var blocks = new Dictionary<Charge, MatrixView<T>>();
        long offset = 0;
        foreach (FusedSpace.Part row in rows.Parts)
        {
            if (columns.Find(rows.Group.Subtract(flux, row.Charge)) is not { } column)
                continue;
            blocks.Add(row.Charge, new MatrixView<T>(memory.Data + offset, row.Dimension, column.Dimension));
            offset += (long)row.Dimension * column.Dimension;
        }

        return new BlockMatrix<T>(rows, columns, flux, blocks, memory);
    }

    /// <summary>The tensor whose legs are those of the rows, then those of the columns.</summary>
    public Tensor<T> ToTensor()
    {
        Tensor<T> tensor = Tensor<T>.Allocate([.. Rows.Legs, .. Columns.Legs], Flux, clear: false);
        int[] order = [.. Enumerable.Range(0, tensor.Rank)];
        foreach (FusedSpace.Part row in Rows.Parts)
        {
            if (_blocks.TryGetValue(row.Charge, out MatrixView<T> view))
                Move(tensor, row, Columns.Find(ColumnCharge(row.Charge))!, order, view, gather: false);
        }

        return tensor;
    }

    /// <summary>
    /// The same numbers under other row legs that fuse to the same charges and dimensions; shares memory. A fused leg
    /// with reversed direction lists its charges negated, but its signed charges, which order the blocks here, agree.
    /// </summary>
    public BlockMatrix<T> WithRows(FusedSpace rows) => new(rows, Columns, Flux, _blocks, null, this);

    /// <summary>The transpose, in memory of its own.</summary>
    public BlockMatrix<T> Turned()
    {
        BlockMatrix<T> result = Allocate(Columns, Rows, Flux);
        foreach (Charge charge in Charges)
        {
            MatrixView<T> source = _blocks[charge], target = result._blocks[ColumnCharge(charge)];
            StridedCopy.Run(
                [target.Rows, target.Columns], source.Data, [source.ColumnStride, source.RowStride], target.Data, [target.RowStride, target.ColumnStride], false);
        }

        GC.KeepAlive(this);
        return result;
    }

    /// <summary>Sets a block to zero.</summary>
    public void Clear(Charge rowCharge)
    {
        MatrixView<T> view = _blocks[rowCharge];
        for (int i = 0; i < view.Rows; i++)
        {
            for (int j = 0; j < view.Columns; j++)
                view[i, j] = T.Zero;
        }
    }

    public void Dispose()
    {
        _gathered?.Dispose();
        GC.KeepAlive(_owner);
    }

    internal static AbelianGroup GroupOf(Tensor<T> tensor) => tensor.Rank == 0 ? AbelianGroup.Trivial : tensor.Legs[0].Group;

    private static ImmutableArray<Leg> Pick(Tensor<T> tensor, ReadOnlySpan<int> axes)
    {
        ImmutableArray<Leg>.Builder legs = ImmutableArray.CreateBuilder<Leg>(axes.Length);
        foreach (int axis in axes)
            legs.Add(tensor.Legs[axis]);
        return legs.MoveToImmutable();
    }

    /// <summary>The single block of a pair of parts as a matrix in place, where its axes merge.</summary>
    private static bool TryView(Tensor<T> tensor, FusedSpace.Part row, FusedSpace.Part column, int[] order, out MatrixView<T> view)
    {
        view = default;
        if (row.Count != 1 || column.Count != 1)
            return false;
        Span<int> sectors = stackalloc int[tensor.Rank];
        Scatter(row.Sectors(0), column.Sectors(0), order, sectors);
        int block = tensor.Layout.Find(sectors);
        ReadOnlySpan<int> dimensions = tensor.Layout.Dimensions(block);
        Span<nint> strides = stackalloc nint[tensor.Rank];
        RowMajorStrides(dimensions, strides);
        int split = row.Sectors(0).Length;
        if (!Merge(dimensions, strides, order.AsSpan(0, split), out nint rowStride)
            || !Merge(dimensions, strides, order.AsSpan(split), out nint columnStride))
            return false;
        view = new MatrixView<T>(tensor.Data + tensor.Layout.Offset(block), row.Dimension, column.Dimension, rowStride, columnStride);
        return true;
    }

    private static bool Merge(ReadOnlySpan<int> dimensions, ReadOnlySpan<nint> strides, ReadOnlySpan<int> axes, out nint stride)
    {
        stride = 1;
        nint expected = -1;
        for (int i = axes.Length - 1; i >= 0; i--)
        {
            if (dimensions[axes[i]] == 1)
                continue;
            if (expected < 0)
                stride = strides[axes[i]];
            else if (strides[axes[i]] != expected)
                return false;
            expected = strides[axes[i]] * dimensions[axes[i]];
        }

        return true;
    }

    /// <summary>Copies the blocks of a pair of parts between the tensor and the dense matrix.</summary>
    private static void Move(Tensor<T> tensor, FusedSpace.Part row, FusedSpace.Part column, int[] order, MatrixView<T> matrix, bool gather)
    {
        int rank = tensor.Rank, split = row.Count == 0 ? 0 : row.Sectors(0).Length;
        Span<int> sectors = stackalloc int[rank];
        Span<nint> blockStrides = stackalloc nint[rank];
        Span<nint> ordered = stackalloc nint[rank];
        Span<nint> matrixStrides = stackalloc nint[rank];
        Span<int> extents = stackalloc int[rank];
        for (int r = 0; r < row.Count; r++)
        {
            for (int c = 0; c < column.Count; c++)
            {
                Scatter(row.Sectors(r), column.Sectors(c), order, sectors);
                int block = tensor.Layout.Find(sectors);
                ReadOnlySpan<int> dimensions = tensor.Layout.Dimensions(block);
                RowMajorStrides(dimensions, blockStrides);
                for (int i = 0; i < rank; i++)
                {
                    extents[i] = dimensions[order[i]];
                    ordered[i] = blockStrides[order[i]];
                }

                RowMajorStrides(extents[..split], matrixStrides[..split]);
                RowMajorStrides(extents[split..], matrixStrides[split..]);
                for (int i = 0; i < rank; i++)
                    matrixStrides[i] *= i < split ? matrix.RowStride : matrix.ColumnStride;
                T* inTensor = tensor.Data + tensor.Layout.Offset(block);
                T* inMatrix = matrix.Data + (row.Offset(r) * matrix.RowStride) + (column.Offset(c) * matrix.ColumnStride);
                if (gather)
                    StridedCopy.Run(extents, inTensor, ordered, inMatrix, matrixStrides, false);
                else
                    StridedCopy.Run(extents, inMatrix, matrixStrides, inTensor, ordered, false);
            }
        }

        GC.KeepAlive(tensor);
    }

    private static void Scatter(int[] rowSectors, int[] columnSectors, int[] order, Span<int> sectors)
    {
        for (int i = 0; i < rowSectors.Length; i++)
            sectors[order[i]] = rowSectors[i];
        for (int i = 0; i < columnSectors.Length; i++)
            sectors[order[rowSectors.Length + i]] = columnSectors[i];
    }

    private static void RowMajorStrides(ReadOnlySpan<int> dimensions, Span<nint> strides)
    {
        nint stride = 1;
        for (int i = dimensions.Length - 1; i >= 0; i--)
        {
            strides[i] = stride;
            stride *= dimensions[i];
        }
    }
}
