namespace TensorRG.Reports.Tests;

public class TicksTests
{
    [Fact]
    public void Decades_carry_the_labels_and_their_multiples_the_minor_ticks()
    {
        var ticks = Ticks.Logarithmic(new AxisRange(-9.2, -5.8));
        Assert.Equal(["10⁻⁹", "10⁻⁸", "10⁻⁷", "10⁻⁶"], Labels(ticks));
        Assert.Contains(ticks, t => Math.Abs(t.Position - Math.Log10(3e-8)) <= 1e-12 && !t.IsMajor && t.Label.Length == 0);
        Assert.Equal(4 + 3 + 3 * 8, ticks.Count(t => t.Position <= -6 + 1e-12)); // 4 decades, 7 to 9 e-10, three full sets
    }

    [Fact]
    public void Many_decades_are_thinned_evenly_and_keep_their_ticks()
    {
        var ticks = Ticks.Logarithmic(new AxisRange(-30, 0));
        Assert.Equal(["10⁻²⁸", "10⁻²⁴", "10⁻²⁰", "10⁻¹⁶", "10⁻¹²", "10⁻⁸", "10⁻⁴", "10⁰"], Labels(ticks));
        Assert.Equal(31, ticks.Length);
    }

    [Fact]
    public void Less_than_two_decades_label_two_and_five_as_well()
    {
        Assert.Equal(["2×10⁻⁶", "5×10⁻⁶", "10⁻⁵", "2×10⁻⁵"], Labels(Ticks.Logarithmic(new AxisRange(-5.8, -4.6))));
        Assert.Equal(["2e-06", "5e-06", "1e-05", "2e-05"], Labels(Ticks.Logarithmic(new AxisRange(-5.8, -4.6), superscripts: false)));
        Assert.Equal(["0.02", "0.05", "10⁻¹", "0.2"], Labels(Ticks.Logarithmic(new AxisRange(-1.8, -0.6))));
    }

    [Fact]
    public void A_fraction_of_a_decade_gets_round_values()
    {
        Assert.Equal(["4", "6", "8"], Labels(Ticks.Logarithmic(new AxisRange(Math.Log10(2.8), Math.Log10(9.5)))));
        Assert.Equal(["3×10⁻⁸", "4×10⁻⁸", "5×10⁻⁸"], Labels(Ticks.Logarithmic(new AxisRange(Math.Log10(2.5e-8), Math.Log10(5.5e-8)))));
    }

    [Theory]
    [InlineData(0, 1, "0.0 0.1 0.2 0.3 0.4 0.5 0.6 0.7 0.8 0.9 1.0")]
    [InlineData(-1, 13, "0 2 4 6 8 10 12")]
    [InlineData(-0.3, 0.3, "-0.3 -0.2 -0.1 0.0 0.1 0.2 0.3")]
    [InlineData(0.92969539795, 0.92969539905, "0.9296953980 0.9296953982 0.9296953984 0.9296953986 0.9296953988 0.9296953990")]
    public void Linear_ticks_are_round_with_the_decimals_they_need(double low, double high, string expected) =>
        Assert.Equal(expected, string.Join(' ', Labels(Ticks.Linear(new AxisRange(low, high)))));

    [Fact]
    public void A_common_power_is_taken_out_of_tiny_and_huge_numbers_only()
    {
        Assert.Equal(0, Ticks.CommonPower(new AxisRange(0, 1)));
        Assert.Equal(-8, Ticks.CommonPower(new AxisRange(1e-8, 5e-8)));
        Assert.Equal(6, Ticks.CommonPower(new AxisRange(-2e6, 1)));
        Assert.Equal(["2", "3", "4", "5"], Labels(Ticks.Linear(new AxisRange(2e-8, 5e-8), 3, -8)));
    }

    [Theory]
    [InlineData(-0.5, 10.5)]
    [InlineData(-1, 1)]
    [InlineData(-0.1, 2.1)]
    [InlineData(-2, 52)]
    public void Whole_ticks_are_whole(double low, double high)
    {
        var ticks = Ticks.Whole(new AxisRange(low, high));
        Assert.NotEmpty(ticks);
        Assert.All(ticks, t => Assert.Equal(Math.Round(t.Position), t.Position, 1e-9));
    }

    [Fact]
    public void Ticks_at_values_drop_labels_that_would_touch_and_values_that_cannot_be_shown()
    {
        var ticks = Ticks.At([32, 8, 16, 24, 25, 8, 0, double.NaN], AxisScale.Logarithmic, new AxisRange(0.8, 1.6));
        Assert.Equal(["8", "16", "24", "", "32"], ticks.Select(t => t.Label));
    }

    [Theory]
    [InlineData(AxisScale.Linear, 5, 4.75, 5.25)]
    [InlineData(AxisScale.Linear, 0, -1, 1)]
    [InlineData(AxisScale.Logarithmic, -5, -5.5, -4.5)]
    public void Equal_values_get_a_range_with_room(AxisScale scale, double value, double low, double high)
    {
        var range = AxisRange.Around([value, value, double.NaN], scale);
        Assert.Equal((low, high), (range.Low, range.High));
    }

    private static IEnumerable<string> Labels(IEnumerable<AxisTick> ticks) => ticks.Where(t => t.Label.Length > 0).Select(t => t.Label);
}
