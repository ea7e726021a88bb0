using System.Globalization;

namespace TensorRG.Runs.Tests;

public class NumberTextTests
{
    // The spelling is that of Python's repr of a float; PythonTests compares with Python itself.
    [Theory]
    [InlineData(0.0, "0.0")]
    [InlineData(-0.0, "-0.0")]
    [InlineData(2.0, "2.0")]
    [InlineData(-1234.5, "-1234.5")]
    [InlineData(0.0001, "0.0001")]
    [InlineData(0.00001, "1e-05")]
    [InlineData(1e-8, "1e-08")]
    [InlineData(1e15, "1000000000000000.0")]
    [InlineData(1e16, "1e+16")]
    [InlineData(123456789012345680.0, "1.2345678901234568e+17")]
    [InlineData(0.1, "0.1")]
    [InlineData(2.269185314213022, "2.269185314213022")]
    [InlineData(double.Epsilon, "5e-324")]
    [InlineData(double.MaxValue, "1.7976931348623157e+308")]
    [InlineData(double.NaN, "NaN")]
    [InlineData(double.NegativeInfinity, "-Infinity")]
    public void Spelling_is_unique(double value, string text)
    {
        Assert.Equal(text, NumberText.Of(value));
        Assert.True(NumberText.TryRead(text, out double back));
        Assert.Equal(BitConverter.DoubleToInt64Bits(value), BitConverter.DoubleToInt64Bits(back));
    }

    [Theory]
    [InlineData("2")]
    [InlineData("2,0")]
    [InlineData("2.00")]
    [InlineData(" 2.0")]
    [InlineData("+2.0")]
    [InlineData("2.0e0")]
    [InlineData("nan")]
    [InlineData("")]
    [InlineData("0.1000000000000000055")]
    public void Any_other_spelling_is_refused(string text) => Assert.False(NumberText.TryRead(text, out _));

    [Fact]
    public void Random_bit_patterns_come_back()
    {
        Random random = new(1);
        for (int i = 0; i < 20000; i++)
        {
            double value = BitConverter.Int64BitsToDouble(random.NextInt64(long.MinValue, long.MaxValue));
            if (double.IsNaN(value))
                continue;
            string text = NumberText.Of(value);
            Assert.True(NumberText.TryRead(text, out double back) && back.Equals(value), text);
        }
    }

    [Fact]
    public void Culture_does_not_matter()
    {
        CultureInfo before = CultureInfo.CurrentCulture;
        CultureInfo comma = (CultureInfo)CultureInfo.InvariantCulture.Clone();
        comma.NumberFormat.NumberDecimalSeparator = ",";
        comma.NumberFormat.NegativeSign = "~";
        try
        {
            CultureInfo.CurrentCulture = comma;
            Assert.Equal("-2.5", NumberText.Of(-2.5));
            Assert.Equal("1e-08", NumberText.Of(1e-8));
            Assert.True(NumberText.TryRead("-2.5", out double back) && back == -2.5);
            Assert.Equal("-3", InputValue.FromInt64(-3).ToString());
        }
        finally
        {
            CultureInfo.CurrentCulture = before;
        }
    }
}
