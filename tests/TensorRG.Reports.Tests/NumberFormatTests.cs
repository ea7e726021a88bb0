using System.Globalization;

namespace TensorRG.Reports.Tests;

public class NumberFormatTests
{
    // Parenthesised uncertainty as CODATA prints it; the form above the decimal point, 12.3(1.2), is common practice.
    [Theory]
    [InlineData(0.92969539834, 1.6e-10, "0.92969539834(16)")]
    [InlineData(-0.92969539834, 1.6e-10, "-0.92969539834(16)")]
    [InlineData(0.92969539834161, 1.6e-10, "0.92969539834(16)")]
    [InlineData(12.34, 1.2, "12.3(1.2)")]
    [InlineData(123.4, 12, "123(12)")]
    [InlineData(12346, 120, "1.235(12)e04")]
    [InlineData(12345, 1.2, "12345.0(1.2)")]
    [InlineData(1234567, 12, "1234567(12)")]
    [InlineData(12345678, 12, "1.2345678(12)e07")]
    [InlineData(0.00012345, 1.2e-8, "0.000123450(12)")]
    [InlineData(0.000012345, 1.2e-9, "1.23450(12)e-05")]
    [InlineData(1.5e300, 2e298, "1.500(20)e300")]
    [InlineData(1.5e-300, 2e-302, "1.500(20)e-300")]
    [InlineData(5e-324, 5e-324, "4.9(4.9)e-324")]
    [InlineData(1.7976931348623157e308, 1e307, "1.80(10)e308")]
    public void Value_and_error_bar(double value, double error, string expected) =>
        Assert.Equal(expected, NumberFormat.WithError(value, error));

    [Theory]
    [InlineData(0.001, 0.5, "0.00(50)")]
    [InlineData(-0.001, 0.5, "0.00(50)")]
    [InlineData(0.7, 50, "1(50)")]
    [InlineData(0.3, 50, "0(50)")]
    [InlineData(3, 5000, "0.0(5.0)e03")]
    [InlineData(60, 5000, "0.1(5.0)e03")]
    [InlineData(40, 5000, "0.0(5.0)e03")]
    [InlineData(0, 0.012, "0.000(12)")]
    [InlineData(0, 1e-20, "0.0(1.0)e-20")]
    public void Error_larger_than_the_value(double value, double error, string expected) =>
        Assert.Equal(expected, NumberFormat.WithError(value, error));

    [Theory]
    [InlineData(0.5, 0.0996, "0.50(10)")]
    [InlineData(0.5, 0.00999, "0.500(10)")]
    [InlineData(0.9996, 0.0095, "0.9996(95)")]
    [InlineData(9.9996, 0.012, "10.000(12)")]
    [InlineData(99996, 120, "1.0000(12)e05")]
    [InlineData(9999999.6, 12, "1.0000000(12)e07")]
    public void Rounding_that_carries(double value, double error, string expected) =>
        Assert.Equal(expected, NumberFormat.WithError(value, error));

    [Theory]
    [InlineData(0.5, 0, "0.5(0)")]
    [InlineData(-0.0, 0, "0(0)")]
    [InlineData(1e-20, 0, "1(0)e-20")]
    [InlineData(0.5, double.NaN, "0.5(?)")]
    [InlineData(0.5, double.PositiveInfinity, "0.5(inf)")]
    [InlineData(double.NaN, 1, "NaN")]
    [InlineData(double.NaN, double.NaN, "NaN")]
    [InlineData(double.PositiveInfinity, 1, "inf")]
    [InlineData(double.NegativeInfinity, 0, "-inf")]
    public void Unknown_and_unbounded(double value, double error, string expected) =>
        Assert.Equal(expected, NumberFormat.WithError(value, error));

    [Theory]
    [InlineData(0.9296953983416102, 1e-20, "0.92969539834161019(1)")]
    [InlineData(0.9296953983416102, 5.4e-17, "0.92969539834161019(6)")]
    [InlineData(1234.5, 1e-300, "1234.5000000000000(1)")]
    public void No_more_digits_than_a_double_holds_and_the_error_rounds_up(double value, double error, string expected) =>
        Assert.Equal(expected, NumberFormat.WithError(value, error));

    [Theory]
    [InlineData(1, "0.9(1)")]
    [InlineData(2, "0.93(12)")]
    [InlineData(4, "0.9297(1234)")]
    public void Digits_of_the_error_can_be_chosen(int digits, string expected) =>
        Assert.Equal(expected, NumberFormat.WithError(0.9296953, 0.1234, digits));

    [Fact]
    public void A_negative_error_or_a_senseless_number_of_digits_is_refused()
    {
        Assert.Throws<ArgumentOutOfRangeException>(() => NumberFormat.WithError(1, -0.1));
        Assert.Throws<ArgumentOutOfRangeException>(() => NumberFormat.WithError(1, 0.1, 0));
        Assert.Throws<ArgumentOutOfRangeException>(() => NumberFormat.WithError(1, 0.1, 5));
        Assert.Throws<ArgumentOutOfRangeException>(() => NumberFormat.Scientific(1, 0));
        Assert.Throws<ArgumentOutOfRangeException>(() => NumberFormat.Scientific(1, 18));
    }

    // The text, read back by an independent parser, is the value to half a unit of the last place and the error to 5 %.
    [Theory]
    [InlineData(20240001)]
    [InlineData(20240002)]
    public void The_text_reads_back_as_value_and_error(int seed)
    {
        var random = new Random(seed);
        for (var i = 0; i < 5000; i++)
        {
            var value = (random.NextDouble() - 0.5) * Math.Pow(10, random.Next(-30, 30));
            var error = (0.1 + 0.9 * random.NextDouble()) * Math.Abs(value) * Math.Pow(10, random.Next(-12, 6));
            var text = NumberFormat.WithError(value, error);
            var (readValue, readError, unit) = Parse(text);
            var context = $"seed {seed}, item {i}: {value:R} +- {error:R} -> {text}";
            Assert.True(Math.Abs(readValue - value) <= 0.5 * unit * (1 + 1e-9) + 1e-15 * Math.Abs(value), context);
            Assert.True(Math.Abs(readError / error - 1) <= 0.0501, context);
        }
    }

    [Theory]
    [InlineData(1.4e-8, "1.4e-08")]
    [InlineData(-1.4e-8, "-1.4e-08")]
    [InlineData(9.96e-8, "1.0e-07")]
    [InlineData(1, "1.0e00")]
    [InlineData(1.1e12, "1.1e12")]
    [InlineData(2.5e-300, "2.5e-300")]
    [InlineData(0, "0")]
    [InlineData(-0.0, "0")]
    [InlineData(double.NaN, "NaN")]
    [InlineData(double.NegativeInfinity, "-inf")]
    public void Scientific(double value, string expected) => Assert.Equal(expected, NumberFormat.Scientific(value));

    [Theory]
    [InlineData(1, "1e-08")]
    [InlineData(4, "1.407e-08")]
    public void Scientific_with_other_digits(int digits, string expected) =>
        Assert.Equal(expected, NumberFormat.Scientific(1.40696e-8, digits));

    [Theory]
    [InlineData(0, "0.00 ms")]
    [InlineData(0.00035, "0.35 ms")]
    [InlineData(0.00994, "9.94 ms")]
    [InlineData(0.00996, "10 ms")]
    [InlineData(0.35, "350 ms")]
    [InlineData(0.9996, "1.0 s")]
    [InlineData(1.2, "1.2 s")]
    [InlineData(59.94, "59.9 s")]
    [InlineData(59.96, "1 min 00 s")]
    [InlineData(185, "3 min 05 s")]
    [InlineData(3599.4, "59 min 59 s")]
    [InlineData(3599.6, "1 h 00 min")]
    [InlineData(7800, "2 h 10 min")]
    [InlineData(183600, "2 d 03 h")]
    [InlineData(-1.2, "-1.2 s")]
    [InlineData(double.NaN, "NaN")]
    [InlineData(double.PositiveInfinity, "inf")]
    public void Durations(double seconds, string expected) => Assert.Equal(expected, NumberFormat.Duration(seconds));

    [Theory]
    [InlineData(0, "0")]
    [InlineData(1024, "1024")]
    [InlineData(999999, "999999")]
    [InlineData(1048576, "2^20")]
    [InlineData(1099511627776, "2^40")]
    [InlineData(1099511627777, "1.1e12")]
    [InlineData(3298534883328, "3.3e12")]
    [InlineData(1000000, "1.0e06")]
    [InlineData(2.5, "2.5")]
    [InlineData(123456.78, "123457")]
    [InlineData(0.00001, "1.0e-05")]
    [InlineData(-1048576, "-1.0e06")]
    [InlineData(double.NaN, "NaN")]
    [InlineData(double.PositiveInfinity, "inf")]
    public void Counts(double count, string expected) => Assert.Equal(expected, NumberFormat.Count(count));

    [Theory]
    [MemberData(nameof(Cultures.Names), MemberType = typeof(Cultures))]
    public void The_culture_of_the_machine_does_not_matter(string culture)
    {
        Assert.Equal("-0.92969539834(16)", Cultures.Run(culture, () => NumberFormat.WithError(-0.92969539834, 1.6e-10)));
        Assert.Equal("-1.2(1.2)e-30", Cultures.Run(culture, () => NumberFormat.WithError(-1.2e-30, 1.2e-30)));
        Assert.Equal("-1.4e-08", Cultures.Run(culture, () => NumberFormat.Scientific(-1.4e-8)));
        Assert.Equal("-1.5(?)e-30", Cultures.Run(culture, () => NumberFormat.WithError(-1.5e-30, double.NaN)));
        Assert.Equal("-1.2 s", Cultures.Run(culture, () => NumberFormat.Duration(-1.2)));
        Assert.Equal("-12345", Cultures.Run(culture, () => NumberFormat.Count(-12345)));
        Assert.Equal("-1.5", Cultures.Run(culture, () => NumberFormat.RoundTrip(-1.5)));
        Assert.Equal("Infinity", Cultures.Run(culture, () => NumberFormat.RoundTrip(double.PositiveInfinity)));
        Assert.Equal("NaN", Cultures.Run(culture, () => NumberFormat.Count(double.NaN)));
    }

    private static (double Value, double Error, double Unit) Parse(string text)
    {
        var parts = text.Split('(', ')');
        var decimals = parts[0].Contains('.', StringComparison.Ordinal) ? parts[0].Length - parts[0].IndexOf('.', StringComparison.Ordinal) - 1 : 0;
        var scale = parts[2].Length == 0 ? 0 : int.Parse(parts[2][1..], CultureInfo.InvariantCulture);
        var unit = double.Parse("1e" + (scale - decimals), CultureInfo.InvariantCulture);
        var error = double.Parse(parts[1], CultureInfo.InvariantCulture);
        var hasPoint = parts[1].Contains('.', StringComparison.Ordinal);
        var value = double.Parse(parts[0] + "e" + scale, CultureInfo.InvariantCulture);
        return (value, hasPoint ? double.Parse(parts[1] + "e" + scale, CultureInfo.InvariantCulture) : error * unit, unit);
    }
}
