using System.Globalization;
using TensorRG.CoarseGraining;

namespace TensorRG.Physics.Tests;

/// <summary>Records made up so that the right reading is known.</summary>
internal static class SyntheticFlow
{
    /// <summary>One square record a step with given X.</summary>
    public static IReadOnlyList<StepRecord> WithRatios(params double[] ratios)
        => [.. ratios.Select(static (x, n) => Step(n) with { DegeneracyRatio = x })];

    /// <summary>One record a step with given bulk estimates and discarded weights.</summary>
    public static IReadOnlyList<StepRecord> WithEstimates(params (double LogZ, double Discarded)[] steps)
        => [.. steps.Select(static (s, n) => Step(n) with { LogZPerSite = s.LogZ, LogZTorusPerSite = s.LogZ + Math.Pow(2, -n), DiscardedWeight = s.Discarded })];

    public static StepRecord Step(int step) => new()
    {
        Step = step,
        LengthScale = Math.Pow(2, step / 2.0),
        AspectRatio = 1,
        SitesPerTensor = Math.Pow(2, step),
        VerticalBond = [],
        HorizontalBond = [],
        DiscardedWeight = 0,
        LogZTorusPerSite = 1,
        TorusPhase = 0,
        LogZPerSite = 1,
        DegeneracyRatio = 1,
        Spectrum = [],
        Seconds = 0,
    };

    public static void Near(double expected, double actual, double bound)
    {
        double error = expected == actual ? 0 : Math.Abs(actual - expected) / Math.Max(1, Math.Abs(expected));
        Assert.True(error <= bound, string.Create(CultureInfo.InvariantCulture, $"expected {expected:R}, got {actual:R}, error {error:E2} > {bound:E2}"));
    }
}
