using System.Collections.Immutable;

namespace TensorRG.Tensors.Decompositions;

/// <summary>A positive diagonal matrix on a bond, such as its singular values: one array a sector, each descending.</summary>
/// <param name="leg">The bond; only its sectors matter, not its direction.</param>
/// <param name="values">For each sector of the leg as many positive numbers as it has states.</param>
public sealed class BondWeights(Leg leg, ImmutableArray<double[]> values)
{
    /// <summary>The bond.</summary>
    public Leg Leg { get; } = leg;

    /// <summary>Numbers by sector.</summary>
    public ImmutableArray<double[]> Values { get; } = values;

    /// <summary>The largest number, or 0 for an empty bond.</summary>
    public double Largest => Values.IsEmpty ? 0 : Values.Max(static v => v.Length == 0 ? 0 : v.Max());

    /// <summary>All ones.</summary>
    /// <param name="leg">The bond.</param>
    public static BondWeights Ones(Leg leg)
    {
        ArgumentNullException.ThrowIfNull(leg);
        return new BondWeights(leg, [.. leg.Sectors.Select(static s => Enumerable.Repeat(1.0, s.Dimension).ToArray())]);
    }

    /// <summary>Each number raised to a power.</summary>
    /// <param name="exponent">The power.</param>
    public BondWeights Power(double exponent) => Map(x => Math.Pow(x, exponent));

    /// <summary>Each number multiplied by a factor.</summary>
    /// <param name="factor">The factor.</param>
    public BondWeights Scale(double factor) => Map(x => x * factor);

    private BondWeights Map(Func<double, double> f) => new(Leg, [.. Values.Select(v => Array.ConvertAll(v, x => f(x)))]);
}
