using System.Collections.Immutable;

namespace TensorRG.Tensors;

/// <summary>
/// A product of at most four cyclic groups Z_N and U(1)'s. The group with no factor is trivial: every charge is
/// <see cref="Charge.Zero"/>, and a tensor graded by it is an ordinary dense tensor.
/// </summary>
public sealed class AbelianGroup : IEquatable<AbelianGroup>
{
    /// <summary>Largest number of factors.</summary>
    public const int MaxFactors = 4;

    /// <summary>The group without grading.</summary>
    public static readonly AbelianGroup Trivial = new([]);

    /// <summary>A product of factors: order N >= 2 for Z_N, 0 for U(1).</summary>
    /// <param name="orders">One order a factor, at most <see cref="MaxFactors"/>.</param>
    /// <exception cref="ArgumentException">Too many factors, or an order of 1 or below 0.</exception>
    public AbelianGroup(params int[] orders)
    {
        ArgumentNullException.ThrowIfNull(orders);
        if (orders.Length > MaxFactors)
            throw new ArgumentException($"A grading has at most {MaxFactors} factors, not {orders.Length}.", nameof(orders));
        if (orders.Any(static n => n is 1 or < 0))
            throw new ArgumentException("The order of a factor is 0 for U(1) or at least 2 for Z_N.", nameof(orders));
        Orders = [.. orders];
    }

    /// <summary>Order of each factor; 0 stands for U(1).</summary>
    public ImmutableArray<int> Orders { get; }

    /// <summary>Whether there is no factor.</summary>
    public bool IsTrivial => Orders.IsEmpty;

    /// <summary>The cyclic group Z_N.</summary>
    /// <param name="order">N, at least 2.</param>
    public static AbelianGroup Cyclic(int order)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(order, 2);
        return new AbelianGroup(order);
    }

    /// <summary>The sum of two charges, each component reduced to its range.</summary>
    /// <param name="a">A charge of this group.</param>
    /// <param name="b">Another.</param>
    public Charge Add(Charge a, Charge b) => Combine(a, b, 1);

    /// <summary>The difference a - b.</summary>
    /// <param name="a">A charge of this group.</param>
    /// <param name="b">Another.</param>
    public Charge Subtract(Charge a, Charge b) => Combine(a, b, -1);

    /// <summary>The opposite charge.</summary>
    /// <param name="a">A charge of this group.</param>
    public Charge Negate(Charge a) => Combine(Charge.Zero, a, -1);

    /// <summary>The charge with each Z_N component brought to 0 .. N-1 and unused components to 0.</summary>
    /// <param name="charge">Any four integers.</param>
    public Charge Normalize(Charge charge) => Combine(charge, Charge.Zero, 1);

    /// <summary>The charge as text, with as many components as the group has factors.</summary>
    /// <param name="charge">A charge of this group.</param>
    public string Text(Charge charge) => charge.ToText(Orders.Length);

    /// <inheritdoc/>
    public bool Equals(AbelianGroup? other) => other is not null && Orders.AsSpan().SequenceEqual(other.Orders.AsSpan());

    /// <inheritdoc/>
    public override bool Equals(object? obj) => Equals(obj as AbelianGroup);

    /// <inheritdoc/>
    public override int GetHashCode()
    {
        var hash = default(HashCode);
        foreach (int order in Orders)
            hash.Add(order);
        return hash.ToHashCode();
    }

    /// <summary>The trade's name: <c>Z2</c>, <c>U(1)</c>, <c>Z2 x Z3</c>, or <c>none</c>.</summary>
    public override string ToString()
        => IsTrivial ? "none" : string.Join(" x ", Orders.Select(static n => n == 0 ? "U(1)" : FormattableString.Invariant($"Z{n}")));

    private Charge Combine(Charge a, Charge b, int sign) => Orders.Length switch
    {
        0 => Charge.Zero,
        1 => new Charge(Reduce(a.First + (sign * b.First), 0)),
        _ => new Charge(
            Reduce(a.First + (sign * b.First), 0),
            Reduce(a.Second + (sign * b.Second), 1),
            Reduce(a.Third + (sign * b.Third), 2),
            Reduce(a.Fourth + (sign * b.Fourth), 3)),
    };

    private int Reduce(int value, int factor)
    {
        if (factor >= Orders.Length)
            return 0;
        int order = Orders[factor];
        if (order == 0)
            return value;
        int rest = value % order;
        return rest < 0 ? rest + order : rest;
    }
}
