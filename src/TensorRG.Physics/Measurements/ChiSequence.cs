using System.Collections.Immutable;

namespace TensorRG.Physics.Measurements;

/// <summary>The bond dimensions of a measurement and the bar that its values carry.</summary>
internal static class ChiSequence
{
    /// <summary>How much faster than the last but one step the next step may fail to shrink: safety of the extrapolated remainder.</summary>
    private const double Safety = 10;

    /// <summary>Half, three quarters and all of the largest bond dimension, without repetitions.</summary>
    /// <param name="largest">The largest bond dimension.</param>
    public static ImmutableArray<int> Below(int largest)
        => [.. new[] { largest / 2, 3 * largest / 4, largest }.Where(static chi => chi >= 1).Distinct()];

    /// <summary>
    /// What the last step d2 after a step d1 leaves: d2 min(2, 10 d2/d1). Where the changes fall geometrically, as away from criticality, the remainder is
    /// d2 (d2/d1); where they fall as a power of chi it is of the order of d2.
    /// </summary>
    /// <param name="values">Values in ascending bond dimension.</param>
    public static double Remainder(IReadOnlyList<double> values)
    {
        if (values.Count < 2)
            return values.Count == 0 ? double.NaN : Math.Abs(values[^1]);
        double last = Math.Abs(values[^1] - values[^2]);
        if (values.Count < 3 || last == 0)
            return 2 * last;
        double before = Math.Abs(values[^2] - values[^3]);
        return last * Math.Min(2, Safety * last / before);
    }
}
