using System.Collections.Immutable;

namespace TensorRG.Physics;

/// <summary>A number with its error bar and what the bar is made of.</summary>
/// <param name="Value">The number.</param>
/// <param name="Parts">Contributions to the bar, added up.</param>
public sealed record Estimate(double Value, ImmutableArray<ErrorPart> Parts)
{
    /// <summary>The error bar: the sum of the parts.</summary>
    public double Error => Parts.Sum(static p => p.Value);

    /// <summary>The difference to another number: bars add up, part by part of one name.</summary>
    /// <param name="other">What is taken away.</param>
    public Estimate Minus(Estimate other)
    {
        ArgumentNullException.ThrowIfNull(other);
        return new(Value - other.Value, [.. Parts.Concat(other.Parts).GroupBy(static p => p.Name).Select(static g => g.First() with { Value = g.Sum(static p => p.Value) })]);
    }

    /// <summary>The number and its bar multiplied by an exact factor.</summary>
    /// <param name="factor">Any number.</param>
    public Estimate Times(double factor)
        => new(Value * factor, [.. Parts.Select(p => p with { Value = p.Value * Math.Abs(factor) })]);
}
