namespace TensorRG.Physics.Tests;

public sealed class ChiExtrapolationTests
{
    private const double Limit = 0.9296953983416103;

    [Fact]
    public void A_sequence_linear_in_the_discarded_weight_is_extrapolated_to_its_limit()
    {
        ChiExtrapolation result = ChiExtrapolation.Of(Sequence(static d => 0.4 * d, 1e-4, 1e-5, 1e-6));
        Assert.True(result.IsExtrapolated);
        SyntheticFlow.Near(Limit, result.Value.Value, 1e-14);
        Assert.InRange(result.Value.Error, 0.5e-6, 0.51e-6);
        Assert.Equal(["extrapolation", "steps", "round-off"], result.Value.Parts.Select(static p => p.Name));
    }

    /// <summary>Errors that grow like D^p with p near one are not linear, yet the limit lies within the bar.</summary>
    [Theory]
    [InlineData(0.9)]
    [InlineData(0.95)]
    [InlineData(1.05)]
    [InlineData(1.1)]
    public void The_bar_covers_the_limit_of_a_nearly_linear_sequence(double power)
    {
        ChiExtrapolation result = ChiExtrapolation.Of(Sequence(d => -Math.Pow(d, power), 1e-3, 3e-4, 1e-4, 3e-5, 1e-5));
        Assert.True(result.IsExtrapolated);
        Assert.True(Math.Abs(result.Value.Value - Limit) <= result.Value.Error, $"{result.Value.Value - Limit:E2} outside {result.Value.Error:E2}");
    }

    [Fact]
    public void Only_the_last_four_members_decide()
    {
        ChiPoint[] points = [Point(4, 5, 1e-2), .. Sequence(static d => d, 1e-3, 1e-4, 1e-5, 1e-6)];
        ChiExtrapolation result = ChiExtrapolation.Of(points);
        Assert.True(result.IsExtrapolated);
        SyntheticFlow.Near(Limit, result.Value.Value, 1e-14);
    }

    [Theory]
    [InlineData(1e-5, -1e-6, 1e-7)]
    [InlineData(1e-4, 1e-6, 9e-7)]
    [InlineData(1e-5, 1e-5, 1e-7)]
    public void An_irregular_sequence_is_refused_and_its_last_change_joins_the_bar(double first, double second, double third)
    {
        ChiPoint[] points = [Point(8, first, 1e-4), Point(16, second, 1e-5), Point(32, third, 1e-6)];
        ChiExtrapolation result = ChiExtrapolation.Of(points);
        Assert.False(result.IsExtrapolated);
        Assert.Equal(points[^1].Value.Value, result.Value.Value);
        Assert.Contains("Not regular", result.Verdict, StringComparison.Ordinal);
        double expected = Math.Clamp(Math.Abs(second - third), 1e-6, 3e-6);
        SyntheticFlow.Near(1, result.Value.Parts.Single(static p => p.Name == "truncation").Value / expected, 1e-8);
    }

    [Fact]
    public void Equal_discarded_weights_do_not_divide_by_zero()
    {
        ChiExtrapolation result = ChiExtrapolation.Of([Point(8, 1e-4, 1e-5), Point(16, 1e-5, 1e-5), Point(32, 1e-6, 1e-5)]);
        Assert.False(result.IsExtrapolated);
        Assert.True(double.IsFinite(result.Value.Value + result.Value.Error));
    }

    [Fact]
    public void One_or_two_members_are_too_few()
    {
        ChiPoint one = Point(8, 1e-4, 1e-4);
        Assert.Same(one.Value, ChiExtrapolation.Of([one]).Value);
        ChiExtrapolation two = ChiExtrapolation.Of([one, Point(16, 1e-5, 1e-5)]);
        Assert.False(two.IsExtrapolated);
        Assert.Contains("Fewer than three", two.Verdict, StringComparison.Ordinal);
        Assert.Equal(Limit + 1e-5, two.Value.Value);
    }

    [Fact]
    public void A_truncation_below_the_other_errors_is_left_alone()
    {
        ChiPoint[] points = [Point(8, 1e-4, 1e-4, steps: 1e-3), Point(16, 1e-5, 1e-5, steps: 1e-3), Point(32, 1e-6, 1e-6, steps: 1e-3)];
        ChiExtrapolation result = ChiExtrapolation.Of(points);
        Assert.False(result.IsExtrapolated);
        Assert.Contains("nothing to extrapolate", result.Verdict, StringComparison.Ordinal);
        Assert.True(result.Value.Error >= 1e-3);
    }

    [Fact]
    public void No_member_is_an_error_of_the_caller()
        => Assert.ThrowsAny<ArgumentException>(static () => ChiExtrapolation.Of([]));

    /// <summary>ln Z = limit + error(D), with D as the truncation part of the bar.</summary>
    private static ChiPoint[] Sequence(Func<double, double> error, params double[] measures)
        => [.. measures.Select((d, i) => Point(8 << i, error(d), d))];

    private static ChiPoint Point(int chi, double error, double measure, double steps = 1e-15)
        => new(
            chi,
            new Estimate(Limit + error, [new ErrorPart("truncation", measure, "D"), new ErrorPart("steps", steps, "s"), new ErrorPart("round-off", 1e-16, "r")]),
            measure);
}
