using System.Collections.Immutable;
using System.Numerics;

namespace TensorRG.Tensors;

/// <summary>Operations that move or relabel elements without arithmetic.</summary>
public static class TensorShape
{
    /// <summary>The tensor with its legs in another order: leg i of the result is leg <c>order[i]</c> of the argument.</summary>
    /// <typeparam name="T">Element type.</typeparam>
    /// <param name="tensor">Any tensor.</param>
    /// <param name="order">A permutation of 0 .. rank-1.</param>
    /// <exception cref="ArgumentException">Not a permutation.</exception>
    public static Tensor<T> Permute<T>(this Tensor<T> tensor, params int[] order)
        where T : unmanaged, INumberBase<T>
    {
        ArgumentNullException.ThrowIfNull(tensor);
        ArgumentNullException.ThrowIfNull(order);
        if (order.Length != tensor.Rank || !order.Order().SequenceEqual(Enumerable.Range(0, tensor.Rank)))
            throw new ArgumentException($"[{string.Join(", ", order)}] is not a permutation of {tensor.Rank} axes.", nameof(order));
        using BlockMatrix<T> matrix = BlockMatrix<T>.From(tensor, order, [], copy: true);
        return matrix.ToTensor();
    }

    /// <summary>
    /// The complex conjugate with every arrow reversed and the flux negated, so that contracting it with the original
    /// over all legs gives the squared norm.
    /// </summary>
    /// <typeparam name="T">Element type.</typeparam>
    /// <param name="tensor">Any tensor.</param>
    public static Tensor<T> Conjugate<T>(this Tensor<T> tensor)
        where T : unmanaged, INumberBase<T>
    {
        ArgumentNullException.ThrowIfNull(tensor);
        ImmutableArray<Leg> legs = [.. tensor.Legs.Select(static leg => leg.Dual)];
        Tensor<T> result = Tensor<T>.Allocate(legs, BlockMatrix<T>.GroupOf(tensor).Negate(tensor.Flux), clear: false);
        ReadOnlySpan<T> source = tensor.Elements;
        Span<T> target = result.Elements;
        for (int i = 0; i < source.Length; i++)
            target[i] = Scalar.Conjugate(source[i]);
        return result;
    }

    /// <summary>
    /// Replaces neighbouring legs by one: its sectors are the total charges, and within a sector the combinations follow
    /// in lexicographic order of the original sectors. <see cref="Split{T}"/> undoes it.
    /// </summary>
    /// <typeparam name="T">Element type.</typeparam>
    /// <param name="tensor">Any tensor.</param>
    /// <param name="first">First of the legs to fuse.</param>
    /// <param name="count">How many to fuse, at least 1.</param>
    /// <param name="arrow">Direction of the fused leg.</param>
    public static Tensor<T> Fuse<T>(this Tensor<T> tensor, int first, int count, Arrow arrow)
        where T : unmanaged, INumberBase<T>
    {
        ArgumentNullException.ThrowIfNull(tensor);
        ArgumentOutOfRangeException.ThrowIfLessThan(count, 1);
        ArgumentOutOfRangeException.ThrowIfNegative(first);
        ArgumentOutOfRangeException.ThrowIfGreaterThan(first + count, tensor.Rank);
        int[] fused = [.. Enumerable.Range(first, count)];
        int[] others = Axes.Others(tensor.Rank, fused);
        using BlockMatrix<T> matrix = BlockMatrix<T>.From(tensor, fused, others, copy: true);
        Leg leg = matrix.Rows.ToLeg(arrow);
        var rows = new FusedSpace(leg.Group, [leg]);
        using BlockMatrix<T> relabelled = matrix.WithRows(rows);
        using Tensor<T> front = relabelled.ToTensor();
        return front.Permute([.. Enumerable.Range(1, first), 0, .. Enumerable.Range(first + 1, front.Rank - first - 1)]);
    }

    /// <summary>Undoes <see cref="Fuse{T}"/>: replaces a fused leg by the legs it was made of.</summary>
    /// <typeparam name="T">Element type.</typeparam>
    /// <param name="tensor">Any tensor.</param>
    /// <param name="axis">The fused leg.</param>
    /// <param name="legs">The original legs, in order.</param>
    /// <exception cref="ArgumentException">The leg is not the fusion of these legs.</exception>
    public static Tensor<T> Split<T>(this Tensor<T> tensor, int axis, params Leg[] legs)
        where T : unmanaged, INumberBase<T>
    {
        ArgumentNullException.ThrowIfNull(tensor);
        ArgumentNullException.ThrowIfNull(legs);
        var space = new FusedSpace(tensor.Legs[axis].Group, [.. legs]);
        if (!space.ToLeg(tensor.Legs[axis].Arrow).Equals(tensor.Legs[axis]))
            throw new ArgumentException($"Leg {axis} ({tensor.Legs[axis]}) is not the fusion of {string.Join("; ", legs.AsEnumerable())}.", nameof(legs));
        using BlockMatrix<T> matrix = BlockMatrix<T>.From(tensor, [axis], Axes.Others(tensor.Rank, [axis]), copy: true);
        using BlockMatrix<T> relabelled = matrix.WithRows(space);
        using Tensor<T> front = relabelled.ToTensor();
        int n = legs.Length;
        return front.Permute([.. Enumerable.Range(n, axis), .. Enumerable.Range(0, n), .. Enumerable.Range(n + axis, front.Rank - n - axis)]);
    }

    /// <summary>The same tensor with one leg's arrow reversed and its charges negated: a relabelling, no change of numbers.</summary>
    /// <typeparam name="T">Element type.</typeparam>
    /// <param name="tensor">Any tensor.</param>
    /// <param name="axis">The leg.</param>
    public static Tensor<T> ReverseArrow<T>(this Tensor<T> tensor, int axis)
        where T : unmanaged, INumberBase<T>
    {
        ArgumentNullException.ThrowIfNull(tensor);
        Leg old = tensor.Legs[axis];
        var reversed = new Leg(old.Group, old.Dual.Arrow, old.Sectors.Select(s => new Sector(old.Group.Negate(s.Charge), s.Dimension)));
        Tensor<T> result = Tensor<T>.Allocate(tensor.Legs.SetItem(axis, reversed), tensor.Flux, clear: false);
        for (int sector = 0; sector < old.Sectors.Length; sector++)
        {
            using Tensor<T> slice = tensor.Slice(axis, sector, 0, old.Sectors[sector].Dimension);
            SliceCopy.Run(result, axis, reversed.IndexOf(old.Group.Negate(old.Sectors[sector].Charge)), 0, slice, intoSlice: false);
        }

        return result;
    }

    /// <summary>Some of the states of one sector of a leg; the leg keeps only that sector.</summary>
    /// <typeparam name="T">Element type.</typeparam>
    /// <param name="tensor">Any tensor.</param>
    /// <param name="axis">The leg.</param>
    /// <param name="sector">Index of the sector.</param>
    /// <param name="start">First state within the sector.</param>
    /// <param name="count">Number of states, at least 1.</param>
    /// <exception cref="ArgumentOutOfRangeException">The states reach beyond the sector.</exception>
    public static Tensor<T> Slice<T>(this Tensor<T> tensor, int axis, int sector, int start, int count)
        where T : unmanaged, INumberBase<T>
    {
        ArgumentNullException.ThrowIfNull(tensor);
        Leg whole = tensor.Legs[axis];
        CheckStates(whole.Sectors[sector].Dimension, start, count);
        var part = new Leg(whole.Group, whole.Arrow, [new Sector(whole.Sectors[sector].Charge, count)]);
        Tensor<T> result = Tensor<T>.Allocate(tensor.Legs.SetItem(axis, part), tensor.Flux, clear: false);
        SliceCopy.Run(tensor, axis, sector, start, result, intoSlice: true);
        return result;
    }

    /// <summary>Writes a slice taken by <see cref="Slice{T}"/> back into its place in a tensor, which is changed.</summary>
    /// <typeparam name="T">Element type.</typeparam>
    /// <param name="tensor">The tensor to change.</param>
    /// <param name="axis">The sliced leg.</param>
    /// <param name="sector">Index of the sector in the whole leg.</param>
    /// <param name="start">First state within the sector.</param>
    /// <param name="slice">The slice.</param>
    /// <exception cref="ArgumentException">The slice does not have the legs and flux of a slice of this tensor at this place.</exception>
    public static void Assign<T>(this Tensor<T> tensor, int axis, int sector, int start, Tensor<T> slice)
        where T : unmanaged, INumberBase<T>
    {
        ArgumentNullException.ThrowIfNull(tensor);
        ArgumentNullException.ThrowIfNull(slice);
        Leg whole = tensor.Legs[axis];
        int count = slice.Rank > axis ? slice.Legs[axis].Dimension : 0;
        CheckStates(whole.Sectors[sector].Dimension, start, count);
        var part = new Leg(whole.Group, whole.Arrow, [new Sector(whole.Sectors[sector].Charge, count)]);
        if (slice.Flux != tensor.Flux || !tensor.Legs.SetItem(axis, part).SequenceEqual(slice.Legs))
            throw new ArgumentException($"{slice} is not a slice of leg {axis} of {tensor} in sector {sector}.", nameof(slice));
        SliceCopy.Run(tensor, axis, sector, start, slice, intoSlice: false);
    }

    // The copy itself is unchecked: a range beyond the sector would read or write foreign memory.
    private static void CheckStates(int dimension, int start, int count)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(start);
        ArgumentOutOfRangeException.ThrowIfLessThan(count, 1);
        ArgumentOutOfRangeException.ThrowIfGreaterThan(count, dimension - start);
    }
}
