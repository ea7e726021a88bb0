using System.Runtime.CompilerServices;

namespace TensorRG.Tensors.Kernels;

/// <summary>
/// A cut of rows into tiles whose sizes differ by at most one, so that none is too thin to keep the units busy: the first
/// <see cref="Larger"/> tiles have <see cref="Size"/> + 1 rows, the others <see cref="Size"/>.
/// </summary>
internal readonly struct RowTiles
{
    /// <summary>The fewest tiles of at most <paramref name="most"/> rows.</summary>
    /// <param name="rows">Rows to cut, at least 1.</param>
    /// <param name="most">Largest tile.</param>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    internal RowTiles(int rows, int most)
    {
        Count = rows <= most ? 1 : (int)((uint)(rows + most - 1) / (uint)most);
        Size = Count == 1 ? rows : (int)((uint)rows / (uint)Count);
        Larger = rows - (Count * Size);
    }

    /// <summary>Number of tiles.</summary>
    internal int Count { get; }

    /// <summary>Rows of the smaller tiles.</summary>
    internal int Size { get; }

    /// <summary>How many tiles have one row more.</summary>
    internal int Larger { get; }
}
