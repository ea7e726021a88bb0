using TensorRG.CoarseGraining;

namespace TensorRG.Physics;

/// <summary>ln Z per site of the infinite lattice, read from a flow.</summary>
public static class FreeEnergy
{
    /// <summary>Relative round-off of a sum of logarithms whose norms each carry a few units in the last place.</summary>
    private const double RoundOff = 4 * 2.2e-16;

    /// <summary>
    /// The bulk estimate of the last step. Its bar adds up: the truncation (the scheme's calibrated law on the discarded
    /// weights), the steps (how much the estimate still moves), and round-off.
    /// </summary>
    /// <param name="records">The records of a flow from step 0 on.</param>
    /// <param name="scheme">The scheme that made them.</param>
    /// <param name="sitesPerVertex">Lattice sites per network vertex.</param>
    public static Estimate LogZPerSite(IReadOnlyList<StepRecord> records, SchemeDefinition scheme, double sitesPerVertex)
    {
        ArgumentNullException.ThrowIfNull(records);
        ArgumentNullException.ThrowIfNull(scheme);
        double measure = scheme.TruncationLaw.Measure(records);
        double value = double.IsNaN(records[^1].LogZPerSite) ? records[^1].LogZTorusPerSite : records[^1].LogZPerSite;
        return new Estimate(
            value,
            [
                new ErrorPart("truncation", scheme.TruncationLaw.Bar(records) / sitesPerVertex, FormattableString.Invariant($"discarded weights (D = {measure:0.0e+00}) by the law measured on exactly solved models")),
                new ErrorPart("steps", StepError(records), "how much the last steps still moved it"),
                new ErrorPart("round-off", RoundOff * Math.Max(1, Math.Abs(value)), "a few units in the last place"),
            ]);
    }

    /// <summary>
    /// The larger of the last two changes of the bulk estimate; the torus value's distance from it where no two changes
    /// are known yet.
    /// </summary>
    private static double StepError(IReadOnlyList<StepRecord> records)
    {
        double[] bulk = [.. records.Select(static r => r.LogZPerSite).Where(double.IsFinite)];
        if (bulk.Length >= 3)
            return Math.Max(Math.Abs(bulk[^1] - bulk[^2]), Math.Abs(bulk[^2] - bulk[^3]));
        return bulk.Length == 0 ? Math.Abs(records[^1].LogZTorusPerSite) : Math.Abs(records[^1].LogZTorusPerSite - bulk[^1]);
    }
}
