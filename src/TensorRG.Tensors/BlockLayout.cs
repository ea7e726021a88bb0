using System.Collections.Immutable;

namespace TensorRG.Tensors;

/// <summary>
/// Which blocks a tensor with given legs holds, and where. A block is a choice of one sector a leg that conserves
/// charge: the sum over ingoing legs minus the sum over outgoing legs equals the flux. Blocks follow one another in
/// lexicographic order of the sector indices, each row-major (last leg fastest), without gaps.
/// </summary>
internal sealed class BlockLayout
{
    private readonly int[] _lookup;
    private readonly int[] _sectors;
    private readonly int[] _dimensions;
    private readonly long[] _offsets;

    public BlockLayout(ImmutableArray<Leg> legs, Charge flux)
    {
        Rank = legs.Length;
        var sectors = new List<int>();
        var dimensions = new List<int>();
        var offsets = new List<long>();
        if (Rank == 0)
        {
            _lookup = [flux == Charge.Zero ? 0 : -1];
            if (flux == Charge.Zero)
                offsets.Add(0);
            TotalSize = offsets.Count;
        }
        else
        {
            _lookup = new int[LookupSize(legs)];
            int[] index = new int[Rank];
            for (int slot = 0; slot < _lookup.Length; slot++)
            {
                _lookup[slot] = -1;
                if (!Complete(legs, flux, index))
                {
                    Advance(legs, index);
                    continue;
                }

                _lookup[slot] = offsets.Count;
                offsets.Add(TotalSize);
                long size = 1;
                for (int axis = 0; axis < Rank; axis++)
                {
                    int dimension = legs[axis].Sectors[index[axis]].Dimension;
                    sectors.Add(index[axis]);
                    dimensions.Add(dimension);
                    size *= dimension;
                }

                TotalSize += size;
                Advance(legs, index);
            }
        }

        _sectors = [.. sectors];
        _dimensions = [.. dimensions];
        _offsets = [.. offsets];
        SectorCounts = [.. legs.Select(static leg => leg.Sectors.Length)];
    }

    /// <summary>Number of legs.</summary>
    public int Rank { get; }

    /// <summary>Number of blocks.</summary>
    public int Count => _offsets.Length;

    /// <summary>Number of elements in all blocks.</summary>
    public long TotalSize { get; }

    private ImmutableArray<int> SectorCounts { get; }

    /// <summary>Sector index of each leg in a block.</summary>
    public ReadOnlySpan<int> Sectors(int block) => _sectors.AsSpan(block * Rank, Rank);

    /// <summary>Dimension of each leg in a block.</summary>
    public ReadOnlySpan<int> Dimensions(int block) => _dimensions.AsSpan(block * Rank, Rank);

    /// <summary>Position of the first element of a block.</summary>
    public long Offset(int block) => _offsets[block];

    /// <summary>Number of elements of a block.</summary>
    public long Size(int block) => (block + 1 < Count ? _offsets[block + 1] : TotalSize) - _offsets[block];

    /// <summary>The block with these sectors, or -1 where charge conservation forbids it.</summary>
    public int Find(ReadOnlySpan<int> sectors)
    {
        int slot = 0;
        for (int axis = 0; axis < Rank - 1; axis++)
            slot = (slot * SectorCounts[axis]) + sectors[axis];
        int block = _lookup[slot];
        return block >= 0 && (Rank == 0 || _sectors[(block * Rank) + Rank - 1] == sectors[Rank - 1]) ? block : -1;
    }

    private static int LookupSize(ImmutableArray<Leg> legs)
    {
        int size = legs[^1].Sectors.Length == 0 ? 0 : 1;
        for (int axis = 0; axis < legs.Length - 1; axis++)
            size = checked(size * legs[axis].Sectors.Length);
        return size;
    }

    /// <summary>Sets the sector of the last leg from charge conservation; false where it has none.</summary>
    private static bool Complete(ImmutableArray<Leg> legs, Charge flux, int[] index)
    {
        Leg last = legs[^1];
        Charge rest = flux;
        for (int axis = 0; axis < legs.Length - 1; axis++)
            rest = last.Group.Subtract(rest, legs[axis].SignedCharge(index[axis]));
        if (last.Arrow == Arrow.Out)
            rest = last.Group.Negate(rest);
        index[^1] = last.IndexOf(rest);
        return index[^1] >= 0;
    }

    private static void Advance(ImmutableArray<Leg> legs, int[] index)
    {
        for (int axis = legs.Length - 2; axis >= 0; axis--)
        {
            if (++index[axis] < legs[axis].Sectors.Length)
                return;
            index[axis] = 0;
        }
    }
}
