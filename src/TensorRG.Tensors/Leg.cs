using System.Collections.Immutable;

namespace TensorRG.Tensors;

/// <summary>
/// A graded index of a tensor: a direction and sectors in ascending order of charge. Position k of the leg runs through
/// the first sector, then the second, and so on.
/// </summary>
public sealed class Leg : IEquatable<Leg>
{
    /// <summary>A leg from its sectors, in any order; sectors of dimension 0 are dropped.</summary>
    /// <param name="group">The group that the charges belong to.</param>
    /// <param name="arrow">Direction.</param>
    /// <param name="sectors">Charges, each at most once, with dimensions >= 0.</param>
    /// <exception cref="ArgumentException">A charge appears twice or a dimension is negative.</exception>
    public Leg(AbelianGroup group, Arrow arrow, IEnumerable<Sector> sectors)
    {
        ArgumentNullException.ThrowIfNull(group);
        ArgumentNullException.ThrowIfNull(sectors);
        Group = group;
        Arrow = arrow;
        Sectors = [.. sectors
            .Where(static s => s.Dimension != 0)
            .Select(s => new Sector(group.Normalize(s.Charge), s.Dimension))
            .OrderBy(static s => s.Charge)];
        for (int i = 0; i < Sectors.Length; i++)
        {
            if (Sectors[i].Dimension < 0)
                throw new ArgumentException($"Charge {group.Text(Sectors[i].Charge)} has a negative dimension.", nameof(sectors));
            if (i > 0 && Sectors[i].Charge == Sectors[i - 1].Charge)
                throw new ArgumentException($"Charge {group.Text(Sectors[i].Charge)} appears twice.", nameof(sectors));
            Dimension += Sectors[i].Dimension;
        }
    }

    private Leg(Leg other, Arrow arrow)
    {
        Group = other.Group;
        Arrow = arrow;
        Sectors = other.Sectors;
        Dimension = other.Dimension;
    }

    /// <summary>The group that the charges belong to.</summary>
    public AbelianGroup Group { get; }

    /// <summary>Direction of the leg.</summary>
    public Arrow Arrow { get; }

    /// <summary>Sectors in ascending order of charge.</summary>
    public ImmutableArray<Sector> Sectors { get; }

    /// <summary>Total number of states.</summary>
    public int Dimension { get; }

    /// <summary>The same states with the opposite direction: what this leg can be contracted with.</summary>
    public Leg Dual => new(this, Arrow == Arrow.In ? Arrow.Out : Arrow.In);

    /// <summary>A leg without grading.</summary>
    /// <param name="dimension">Number of states, at least 0.</param>
    /// <param name="arrow">Direction.</param>
    public static Leg Plain(int dimension, Arrow arrow)
        => new(AbelianGroup.Trivial, arrow, [new Sector(Charge.Zero, dimension)]);

    /// <summary>Index of the sector of a charge, or -1.</summary>
    /// <param name="charge">A normalised charge.</param>
    public int IndexOf(Charge charge)
    {
        ReadOnlySpan<Sector> sectors = Sectors.AsSpan();
        int low = 0, high = sectors.Length - 1;
        while (low <= high)
        {
            int middle = (low + high) >>> 1;
            int order = sectors[middle].Charge.CompareTo(charge);
            if (order == 0)
                return middle;
            if (order < 0)
                low = middle + 1;
            else
                high = middle - 1;
        }

        return -1;
    }

    /// <summary>Position of the first state of a sector.</summary>
    /// <param name="sector">Index of the sector.</param>
    public int Start(int sector)
    {
        int start = 0;
        for (int i = 0; i < sector; i++)
            start += Sectors[i].Dimension;
        return start;
    }

    /// <summary>The sector that a position falls in and the position within it.</summary>
    /// <param name="position">Position along the leg, from 0.</param>
    /// <exception cref="ArgumentOutOfRangeException">The position is outside the leg.</exception>
    public (int Sector, int Local) Locate(int position)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(position);
        int rest = position;
        for (int sector = 0; sector < Sectors.Length; sector++)
        {
            if (rest < Sectors[sector].Dimension)
                return (sector, rest);
            rest -= Sectors[sector].Dimension;
        }

        throw new ArgumentOutOfRangeException(nameof(position), position, $"The leg has {Dimension} states.");
    }

    /// <summary>The charge of a sector with the sign it takes in the conservation law.</summary>
    /// <param name="sector">Index of the sector.</param>
    public Charge SignedCharge(int sector)
        => Arrow == Arrow.In ? Sectors[sector].Charge : Group.Negate(Sectors[sector].Charge);

    /// <summary>Whether two legs can be contracted: same group and sectors, opposite directions.</summary>
    /// <param name="other">The other leg.</param>
    public bool Matches(Leg other)
    {
        ArgumentNullException.ThrowIfNull(other);
        return Arrow != other.Arrow && SameStates(other);
    }

    /// <inheritdoc/>
    public bool Equals(Leg? other) => other is not null && Arrow == other.Arrow && SameStates(other);

    /// <inheritdoc/>
    public override bool Equals(object? obj) => Equals(obj as Leg);

    /// <inheritdoc/>
    public override int GetHashCode()
    {
        var hash = default(HashCode);
        hash.Add(Arrow);
        hash.Add(Group);
        foreach (Sector sector in Sectors)
            hash.Add(sector);
        return hash.ToHashCode();
    }

    /// <summary>For example <c>in 0:3 1:2</c>.</summary>
    public override string ToString()
        => (Arrow == Arrow.In ? "in" : "out")
            + string.Concat(Sectors.Select(s => FormattableString.Invariant($" {Group.Text(s.Charge)}:{s.Dimension}")));

    private bool SameStates(Leg other)
        => Group.Equals(other.Group) && (Sectors == other.Sectors || Sectors.AsSpan().SequenceEqual(other.Sectors.AsSpan()));
}
