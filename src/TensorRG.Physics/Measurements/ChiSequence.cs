using System.Collections.Immutable;

namespace TensorRG.Physics.Measurements;

/// <summary>The bond dimensions of a measurement on the infinite lattice and the bar that its values carry.</summary>
internal static class ChiSequence
{
    /// <summary>Bar over the remainder that the steepest slope predicts; see the calibration in DEVELOPERS.md.</summary>
    private const double Safety = 3;

    /// <summary>Half, three quarters and all of the largest bond dimension, without repetitions.</summary>
    /// <param name="largest">The largest bond dimension.</param>
    public static ImmutableArray<int> Below(int largest)
        => [.. new[] { largest / 2, 3 * largest / 4, largest }.Where(static chi => chi >= 1).Distinct()];

    /// <summary>
    /// What the last value still lacks. Values move as a power p of the smallest Schmidt weight w that is kept, so the rest is at most w^p of the last
    /// state times the steepest slope |change of value / change of w^p| of the sequence. A change that is small by accident, as happens where chi falls among
    /// multiplets, hides nothing that an earlier one showed. Never more than the largest value: what melts away does not change sign.
    /// </summary>
    /// <param name="points">Values and smallest weights, in ascending bond dimension.</param>
    /// <param name="power">
    /// p. At criticality w and the error of ln Z both fall as the square of the length xi that chi resolves, a mean as xi^-x with x the scaling dimension of its
    /// leading operator.
    /// </param>
    public static double Remainder(IReadOnlyList<(double Value, double Weight)> points, double power)
    {
        if (points.Count < 2)
            return points.Count == 0 ? double.NaN : Math.Abs(points[^1].Value);
        double remainder = 0;
        for (int i = 1; i < points.Count; i++)
        {
            double change = Math.Abs(points[i].Value - points[i - 1].Value), fall = Math.Pow(points[i - 1].Weight, power) - Math.Pow(points[i].Weight, power);
            remainder = Math.Max(remainder, fall > 0 ? change * Math.Pow(points[^1].Weight, power) / fall : change);
        }

        return Math.Min(Safety * remainder, points.Max(static p => Math.Abs(p.Value)));
    }
}
