using System.Collections.Immutable;
using System.Numerics;
using TensorRG.Tensors.Kernels;

namespace TensorRG.Tensors;

/// <summary>
/// A tensor with graded legs. It stores only the blocks that conserve charge: the charges of ingoing legs minus those
/// of outgoing legs add up to <see cref="Flux"/>. A tensor whose legs carry the trivial group has one block: an ordinary dense
/// row-major array, last leg fastest.
/// </summary>
/// <remarks>
/// Elements live in pinned, pooled memory. <see cref="Dispose"/> gives it back early; a tensor that is never disposed
/// is collected as usual.
/// </remarks>
/// <typeparam name="T">Element type, <see cref="double"/> or <see cref="Complex"/>.</typeparam>
public sealed class Tensor<T> : IDisposable
    where T : unmanaged, INumberBase<T>
{
    private readonly AlignedBuffer<T> _buffer;

    private Tensor(ImmutableArray<Leg> legs, Charge flux, BlockLayout layout, AlignedBuffer<T> buffer)
    {
        Legs = legs;
        Flux = flux;
        Layout = layout;
        _buffer = buffer;
    }

    /// <summary>The legs, in storage order.</summary>
    public ImmutableArray<Leg> Legs { get; }

    /// <summary>Total charge: ingoing minus outgoing.</summary>
    public Charge Flux { get; }

    /// <summary>Number of legs.</summary>
    public int Rank => Legs.Length;

    /// <summary>Number of blocks that conserve charge.</summary>
    public int BlockCount => Layout.Count;

    /// <summary>Number of stored elements, over all blocks.</summary>
    public long StoredCount => Layout.TotalSize;

    /// <summary>All stored elements: the blocks in lexicographic order of their sectors, each row-major.</summary>
    public Span<T> Elements => _buffer.Span[..checked((int)StoredCount)];

    internal BlockLayout Layout { get; }

    internal unsafe T* Data => _buffer.Data;

    /// <summary>A tensor of zeros.</summary>
    /// <param name="legs">Legs, all of one group.</param>
    /// <param name="flux">Total charge; zero for an invariant tensor.</param>
    /// <exception cref="ArgumentException">The legs belong to different groups.</exception>
    public static Tensor<T> Zeros(IEnumerable<Leg> legs, Charge flux = default)
        => Allocate([.. legs], flux, clear: true);

    /// <summary>A tensor from a function of the positions on its legs; blocks that break charge conservation are not asked for.</summary>
    /// <param name="legs">Legs, all of one group.</param>
    /// <param name="element">Value at given positions, counted from 0 along each whole leg.</param>
    /// <param name="flux">Total charge.</param>
    public static Tensor<T> FromFunction(IEnumerable<Leg> legs, Func<ReadOnlyMemory<int>, T> element, Charge flux = default)
    {
        ArgumentNullException.ThrowIfNull(element);
        Tensor<T> result = Allocate([.. legs], flux, clear: false);
        int[] position = new int[result.Rank];
        Span<T> elements = result.Elements;
        foreach ((long at, int[] local, int block) in result.Positions())
        {
            ReadOnlySpan<int> sectors = result.Layout.Sectors(block);
            for (int axis = 0; axis < position.Length; axis++)
                position[axis] = local[axis] + result.Legs[axis].Start(sectors[axis]);
            elements[(int)at] = element(position);
        }

        return result;
    }

    /// <summary>The element at given positions along whole legs; zero where charge conservation forbids a value.</summary>
    /// <param name="position">One position a leg, from 0.</param>
    public T At(params ReadOnlySpan<int> position)
    {
        if (position.Length != Rank)
            throw new ArgumentException($"A tensor with {Rank} legs takes {Rank} positions, not {position.Length}.", nameof(position));
        Span<int> sectors = stackalloc int[Rank];
        Span<int> local = stackalloc int[Rank];
        for (int axis = 0; axis < Rank; axis++)
            (sectors[axis], local[axis]) = Legs[axis].Locate(position[axis]);
        int block = Layout.Find(sectors);
        if (block < 0)
            return T.Zero;
        ReadOnlySpan<int> dimensions = Layout.Dimensions(block);
        long at = 0;
        for (int axis = 0; axis < Rank; axis++)
            at = (at * dimensions[axis]) + local[axis];
        return Elements[(int)(Layout.Offset(block) + at)];
    }

    /// <summary>A copy with its own memory.</summary>
    public Tensor<T> Clone()
    {
        Tensor<T> copy = Allocate(Legs, Flux, clear: false);
        Elements.CopyTo(copy.Elements);
        return copy;
    }

    /// <summary>Gives the memory back to the pool; any further access to elements throws.</summary>
    public void Dispose() => _buffer.Dispose();

    /// <summary>For example <c>[in 0:2 1:2; out 0:2 1:2]</c>.</summary>
    public override string ToString() => "[" + string.Join("; ", Legs) + "]";

    internal static Tensor<T> Allocate(ImmutableArray<Leg> legs, Charge flux, bool clear)
    {
        for (int i = 1; i < legs.Length; i++)
        {
            if (!legs[i].Group.Equals(legs[0].Group))
                throw new ArgumentException($"Leg {i} is graded by {legs[i].Group}, leg 0 by {legs[0].Group}.", nameof(legs));
        }

        var layout = new BlockLayout(legs, flux);
        AlignedBuffer<T> buffer = clear ? BufferPool.RentZeroed<T>(layout.TotalSize) : BufferPool.Rent<T>(layout.TotalSize);
        return new Tensor<T>(legs, flux, layout, buffer);
    }

    /// <summary>Walks over all stored elements: storage position, position within the block, block. The arrays are reused.</summary>
    internal IEnumerable<(long At, int[] Local, int Block)> Positions()
    {
        int[] local = new int[Rank];
        for (int block = 0; block < Layout.Count; block++)
        {
            Array.Clear(local);
            long offset = Layout.Offset(block), size = Layout.Size(block);
            for (long k = 0; k < size; k++)
            {
                yield return (offset + k, local, block);
                Step(local, block);
            }
        }
    }

    private void Step(int[] local, int block)
    {
        ReadOnlySpan<int> dimensions = Layout.Dimensions(block);
        for (int axis = Rank - 1; axis >= 0; axis--)
        {
            if (++local[axis] < dimensions[axis])
                return;
            local[axis] = 0;
        }
    }
}
