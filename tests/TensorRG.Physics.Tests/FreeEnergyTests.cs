using TensorRG.CoarseGraining;

namespace TensorRG.Physics.Tests;

public sealed class FreeEnergyTests
{
    public static TheoryData<string> Schemes() => new(SchemeRegistry.All.Select(static s => s.Name));

    [Theory]
    [MemberData(nameof(Schemes))]
    public void The_bar_is_made_of_the_discarded_weights_the_last_steps_and_round_off(string name)
    {
        SchemeDefinition scheme = SchemeRegistry.Find(name)!;
        const double w = 1e-6;
        IReadOnlyList<StepRecord> records = SyntheticFlow.WithEstimates((double.NaN, 0), (2.5, 0), (2.01, w), (2.001, w), (2.0004, w));
        Estimate estimate = FreeEnergy.LogZPerSite(records, scheme, 3);
        Assert.Equal(2.0004, estimate.Value);
        TruncationLaw law = scheme.TruncationLaw;
        double perVertex = ((law.Factor * Math.Pow(w, law.Power)) + (law.AmplitudeFactor * Math.Sqrt(w))) * ((1 / 2.0) + (1 / 4.0) + (1 / 8.0));
        SyntheticFlow.Near(1, Part(estimate, "truncation") / (perVertex / 3), 1e-12);
        SyntheticFlow.Near(0.009, Part(estimate, "steps"), 1e-12);
        Assert.InRange(Part(estimate, "round-off"), 2e-16, 1e-14);
        SyntheticFlow.Near(estimate.Parts.Sum(static p => p.Value), estimate.Error, 1e-15);
        Assert.All(estimate.Parts, static p => Assert.False(string.IsNullOrWhiteSpace(p.Basis)));
    }

    /// <summary>A chance agreement of the last two estimates must not shrink the bar.</summary>
    [Fact]
    public void The_larger_of_the_last_two_changes_counts()
    {
        IReadOnlyList<StepRecord> records = SyntheticFlow.WithEstimates((double.NaN, 0), (2, 0), (1.9, 0), (1.9, 0));
        SyntheticFlow.Near(0.1, Part(FreeEnergy.LogZPerSite(records, SchemeRegistry.Default, 1), "steps"), 1e-12);
    }

    [Fact]
    public void A_flow_of_one_record_gives_the_torus_with_an_honest_bar()
    {
        IReadOnlyList<StepRecord> records = SyntheticFlow.WithEstimates((double.NaN, 0)) is [var first] ? [first with { LogZTorusPerSite = 1.5 }] : [];
        Estimate estimate = FreeEnergy.LogZPerSite(records, SchemeRegistry.Default, 1);
        Assert.Equal(1.5, estimate.Value);
        Assert.True(estimate.Error >= 1.5, "nothing is known about the infinite lattice yet");
    }

    [Fact]
    public void With_one_bulk_estimate_the_distance_from_the_torus_is_the_bar()
    {
        IReadOnlyList<StepRecord> records = SyntheticFlow.WithEstimates((double.NaN, 0), (2, 0));
        SyntheticFlow.Near(0.5, Part(FreeEnergy.LogZPerSite(records, SchemeRegistry.Default, 1), "steps"), 1e-12);
    }

    [Fact]
    public void A_flow_without_records_is_an_error_of_the_caller()
        => Assert.ThrowsAny<ArgumentException>(static () => FreeEnergy.LogZPerSite([], SchemeRegistry.Default, 1));

    [Fact]
    public void An_exact_factor_multiplies_value_and_bar()
    {
        var estimate = new Estimate(2, [new ErrorPart("steps", 0.25, "x"), new ErrorPart("round-off", 0.5, "y")]);
        Estimate scaled = estimate.Times(-3);
        Assert.Equal((-6, 2.25), (scaled.Value, scaled.Error));
    }

    private static double Part(Estimate estimate, string name) => estimate.Parts.Single(p => p.Name == name).Value;
}
