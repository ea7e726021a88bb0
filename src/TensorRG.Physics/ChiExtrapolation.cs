using System.Collections.Immutable;

namespace TensorRG.Physics;

/// <summary>
/// The limit of a bond-dimension sequence. The error of ln Z is nearly proportional to the measure D of the discarded
/// weight (common practice for truncated matrix products, measured for these schemes on exactly solved models), so the
/// value at D = 0 follows from the slope between neighbouring members; how well the slopes agree gives the bar.
/// </summary>
/// <param name="Value">The extrapolated value, or the last member where the sequence does not support extrapolation.</param>
/// <param name="IsExtrapolated">Whether it was extrapolated.</param>
/// <param name="Verdict">Why, in a sentence.</param>
public sealed record ChiExtrapolation(Estimate Value, bool IsExtrapolated, string Verdict)
{
    /// <summary>Slopes that differ by more than this factor do not carry an extrapolation.</summary>
    private const double SlopeRatio = 2;

    /// <summary>
    /// Smallest bar of an extrapolation as a fraction of the last member's own truncation bar: what slopes that agree by chance can hide.
    /// Measured on exactly solved models, where the extrapolated value is typically five times better than the last member
    /// (bond-weighted) and the bar covers 97 times in 100 or more.
    /// </summary>
    private const double OwnBarShare = 0.5;

    /// <summary>Extrapolates a sequence.</summary>
    /// <param name="points">At least one member, in ascending bond dimension.</param>
    public static ChiExtrapolation Of(IReadOnlyList<ChiPoint> points)
    {
        ArgumentNullException.ThrowIfNull(points);
        ChiPoint last = points[^1];
        if (points.Count < 3)
            return Plain(points, "Fewer than three bond dimensions: no extrapolation.");
        double other = last.Value.Parts.Where(static p => p.Name != "truncation").Sum(static p => p.Value);
        if (last.Value.Error - other <= other)
            return Plain(points, "The truncation is below the other errors: nothing to extrapolate.");
        double[] slopes = [.. Enumerable.Range(Math.Max(1, points.Count - 3), Math.Min(3, points.Count - 1)).Select(i => Slope(points[i - 1], points[i]))];
        if (!slopes.All(double.IsFinite) || slopes.Min() * slopes.Max() <= 0 || Spread(slopes) > SlopeRatio)
            return Plain(points, "Not regular: ln Z does not follow the discarded weight from one bond dimension to the next. No extrapolation.");
        double slope = slopes[^1];
        double correction = -slope * last.Measure;
        double own = last.Value.Parts.First(static p => p.Name == "truncation").Value;
        double doubt = Math.Max(slopes.Max(s => Math.Abs(s - slope)) * last.Measure, OwnBarShare * own);
        ImmutableArray<ErrorPart> parts =
        [
            new ErrorPart("extrapolation", doubt, FormattableString.Invariant($"spread of the last {slopes.Length} slopes of ln Z against D, at least half the last run's truncation bar")),
            .. last.Value.Parts.Where(static p => p.Name != "truncation"),
        ];
        return new ChiExtrapolation(new Estimate(last.Value.Value + correction, parts), true, "Extrapolated to zero discarded weight.");
    }

    private static double Slope(ChiPoint a, ChiPoint b) => (b.Value.Value - a.Value.Value) / (b.Measure - a.Measure);

    private static double Spread(double[] slopes) => slopes.Max(Math.Abs) / slopes.Min(Math.Abs);

    /// <summary>The last member; the last change joins its bar, so that a jump between members is never hidden.</summary>
    private static ChiExtrapolation Plain(IReadOnlyList<ChiPoint> points, string verdict)
    {
        ChiPoint last = points[^1];
        if (points.Count == 1)
            return new ChiExtrapolation(last.Value, false, verdict);
        double change = Math.Abs(last.Value.Value - points[^2].Value.Value);
        ErrorPart truncation = last.Value.Parts.First(static p => p.Name == "truncation");
        var widened = new ErrorPart("truncation", Math.Max(truncation.Value, Math.Min(change, 3 * truncation.Value)), truncation.Basis + ", and the last change");
        return new ChiExtrapolation(last.Value with { Parts = last.Value.Parts.Replace(truncation, widened) }, false, verdict);
    }
}
