using System.Numerics;
using CsCheck;

namespace TensorRG.Tensors.Tests.Graded;

/// <summary>Random groups, legs and tensors, all of which follow from one number that a failing test prints.</summary>
internal sealed class RandomCase(int seed)
{
    private static readonly AbelianGroup[] Groups =
    [
        AbelianGroup.Trivial,
        AbelianGroup.Cyclic(2),
        AbelianGroup.Cyclic(3),
        new AbelianGroup(0),
        new AbelianGroup(2, 3),
        new AbelianGroup(2, 0),
    ];

    private readonly Random _random = new(seed);

    public static int GroupCount => Groups.Length;

    public AbelianGroup Group { get; } = Groups[seed % Groups.Length];

    /// <summary>
    /// Runs a check on random cases, each group in turn; a failure prints the number of the case, and
    /// <c>new RandomCase(number)</c> replays it.
    /// </summary>
    public static void Check(Action<RandomCase> check, int iterations = 60)
        => Gen.Int[0, int.MaxValue - 1].Sample(number => check(new RandomCase(number)), iter: iterations, threads: 1);

    public int Next(int count) => _random.Next(count);

    public bool Chance(double probability) => _random.NextDouble() < probability;

    public Charge Charge()
    {
        int Component(int i) => i >= Group.Orders.Length ? 0 : Group.Orders[i] == 0 ? Next(5) - 2 : Next(Group.Orders[i]);
        return new Charge(Component(0), Component(1), Component(2), Component(3));
    }

    /// <summary>One to three sectors of one to three states; now and then a leg of one state, rarely none at all.</summary>
    public Leg Leg(bool mayBeEmpty = true, int largest = 3)
    {
        Arrow arrow = Chance(0.5) ? Arrow.In : Arrow.Out;
        if (mayBeEmpty && Chance(0.03))
            return new Leg(Group, arrow, []);
        if (Chance(0.15))
            return new Leg(Group, arrow, [new Sector(Charge(), 1)]);
        var sectors = new Dictionary<Charge, int>();
        int count = 1 + Next(3);
        for (int i = 0; i < count; i++)
            sectors[Charge()] = 1 + Next(largest);
        return new Leg(Group, arrow, sectors.Select(static p => new Sector(p.Key, p.Value)));
    }

    public Leg[] Legs(int count, bool mayBeEmpty = true) => [.. Enumerable.Range(0, count).Select(_ => Leg(mayBeEmpty))];

    /// <summary>Zero, the charge of some block (so that the tensor is not empty), or any charge (so that it may be).</summary>
    public Charge Flux(params Leg[] legs)
    {
        if (Chance(0.3))
            return default;
        if (Chance(0.1) || legs.Any(static leg => leg.Sectors.IsEmpty))
            return legs.Length == 0 ? default : Group.Normalize(Charge());
        return legs.Aggregate(Tensors.Charge.Zero, (sum, leg) => Group.Add(sum, leg.SignedCharge(Next(leg.Sectors.Length))));
    }

    public T Element<T>()
        where T : unmanaged, INumberBase<T>
    {
        double re = (2 * _random.NextDouble()) - 1, im = (2 * _random.NextDouble()) - 1;
        return typeof(T) == typeof(double) ? (T)(object)re : (T)(object)new Complex(re, im);
    }

    public Tensor<T> Tensor<T>(Charge flux, params Leg[] legs)
        where T : unmanaged, INumberBase<T>
        => Tensor<T>(legs, flux);

    public Tensor<T> Tensor<T>(IEnumerable<Leg> legs, Charge flux = default)
        where T : unmanaged, INumberBase<T>
        => Tensors.Tensor<T>.FromFunction(legs, _ => Element<T>(), flux);

    public int[] Permutation(int count)
    {
        int[] order = [.. Enumerable.Range(0, count)];
        _random.Shuffle(order);
        return order;
    }
}
