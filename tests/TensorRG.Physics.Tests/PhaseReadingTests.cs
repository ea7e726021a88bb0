using TensorRG.CoarseGraining;

namespace TensorRG.Physics.Tests;

public sealed class PhaseReadingTests
{
    [Theory]
    [InlineData(1, "one phase, disordered")]
    [InlineData(2, "2 coexisting phases, ordered")]
    [InlineData(3, "3 coexisting phases, ordered")]
    public void X_that_settles_at_an_integer_counts_the_phases(int phases, string words)
    {
        PhaseReading reading = PhaseReading.Of(SyntheticFlow.WithRatios(1.4, 1.6, 1.2 + (0.5 * (phases - 1)), phases + 0.1, phases + 0.01, phases, phases));
        Assert.Equal(phases, reading.Phases);
        Assert.Equal(4, reading.SettledAt, 12);
        Assert.True(double.IsNaN(reading.Plateau));
        Assert.Contains(words, reading.Summary, StringComparison.Ordinal);
        Assert.Contains("from length 4 on", reading.Summary, StringComparison.Ordinal);
    }

    /// <summary>The universal ratio of the square Ising model at T_c, 1.7636 (Z.-C. Gu, X.-G. Wen, Phys. Rev. B 80, 155131 (2009)).</summary>
    [Fact]
    public void A_rest_at_a_universal_number_is_critical()
    {
        PhaseReading reading = PhaseReading.Of(SyntheticFlow.WithRatios([1.3, 1.6, .. Enumerable.Repeat(1.7636, 12)]));
        Assert.Null(reading.Phases);
        Assert.True(double.IsNaN(reading.SettledAt));
        Assert.Equal(1.7636, reading.Plateau);
        Assert.Contains("critical, as far as these steps reach", reading.Summary, StringComparison.Ordinal);
    }

    [Fact]
    public void A_rest_that_ends_in_a_basin_is_told_with_both()
    {
        PhaseReading reading = PhaseReading.Of(SyntheticFlow.WithRatios([1.3, 1.6, .. Enumerable.Repeat(1.7636, 8), 1.8, 1.9, 2.001, 2, 2]));
        Assert.Equal(2, reading.Phases);
        Assert.Equal(64, reading.SettledAt, 10);
        Assert.Equal(1.7636, reading.Plateau);
        Assert.Contains("X rests at 1.764 from length 2 to 23, then goes to 2", reading.Summary, StringComparison.Ordinal);
    }

    [Fact]
    public void A_short_rest_and_a_drift_are_no_plateau()
    {
        Assert.True(double.IsNaN(PhaseReading.Of(SyntheticFlow.WithRatios(1.3, 1.5, 1.5, 1.5, 1.5, 1.5, 1.7, 1, 1)).Plateau));
        PhaseReading drifting = PhaseReading.Of(SyntheticFlow.WithRatios([.. Enumerable.Range(0, 20).Select(static n => 1.2 + (0.02 * n))]));
        Assert.True(double.IsNaN(drifting.Plateau));
        Assert.Null(drifting.Phases);
        Assert.Contains("has not settled: more steps are needed", drifting.Summary, StringComparison.Ordinal);
    }

    [Fact]
    public void A_long_rest_at_an_integer_is_not_called_critical()
    {
        PhaseReading reading = PhaseReading.Of(SyntheticFlow.WithRatios([.. Enumerable.Repeat(2.0, 10), 1.5, 1.1, 1, 1]));
        Assert.Equal(1, reading.Phases);
        Assert.True(double.IsNaN(reading.Plateau));
    }

    [Fact]
    public void One_step_at_an_integer_has_not_settled()
    {
        Assert.Null(PhaseReading.Of(SyntheticFlow.WithRatios(1)).Phases);
        Assert.Null(PhaseReading.Of(SyntheticFlow.WithRatios(1.5, 1.3, 1)).Phases);
    }

    [Theory]
    [InlineData(double.NaN)]
    [InlineData(double.PositiveInfinity)]
    [InlineData(-3)]
    [InlineData(0)]
    public void What_is_no_number_of_phases_never_settles(double ratio)
        => Assert.Null(PhaseReading.Of(SyntheticFlow.WithRatios(1.5, ratio, ratio, ratio, ratio)).Phases);

    [Fact]
    public void Oblong_blocks_are_left_out()
    {
        StepRecord[] records = [.. SyntheticFlow.WithRatios(1.4, 7, 1.2, 7, 1, 7, 1, 7, 1, 7).Select(static (r, n) => r with { AspectRatio = n % 2 == 1 ? 2 : 1 })];
        PhaseReading reading = PhaseReading.Of(records);
        Assert.Equal(1, reading.Phases);
        Assert.Equal(4, reading.SettledAt, 12);
    }

    [Fact]
    public void No_record_is_an_error_of_the_caller()
        => Assert.ThrowsAny<ArgumentException>(static () => PhaseReading.Of([]));
}
