using System.Globalization;
using System.Numerics;

namespace TensorRG.Reports;

/// <summary>
/// Exact decimal rounding of positive doubles: numbers as integer multiples of a power of ten, taken from the
/// correctly rounded digits that .NET prints, so that no scaling by a power of ten adds an error of its own.
/// </summary>
internal static class Decimals
{
    /// <summary>Rounds to <paramref name="digits"/> significant digits: value = Units * 10^(Exponent - digits + 1).</summary>
    public static (BigInteger Units, int Exponent) Round(double value, int digits)
    {
        var text = value.ToString("E" + (digits - 1).ToString(CultureInfo.InvariantCulture), CultureInfo.InvariantCulture);
        var parts = text.Split('E');
        var units = BigInteger.Parse(parts[0].Replace(".", "", StringComparison.Ordinal), CultureInfo.InvariantCulture);
        return (units, int.Parse(parts[1], CultureInfo.InvariantCulture));
    }

    /// <summary>Decimal exponent of the leading digit.</summary>
    public static int ExponentOf(double value) => Round(value, 17).Exponent;

    /// <summary>The value in units of 10^place, rounded to the nearest integer.</summary>
    public static BigInteger UnitsAt(double value, int place)
    {
        if (value == 0) return BigInteger.Zero;
        var digits = ExponentOf(value) - place + 1;
        if (digits < 0) return BigInteger.Zero;
        if (digits == 0) return value.ToString("E16", CultureInfo.InvariantCulture)[0] >= '5' ? BigInteger.One : BigInteger.Zero;
        var (units, exponent) = Round(value, digits);
        return units * BigInteger.Pow(10, exponent - digits + 1 - place);
    }

    /// <summary>Number of decimal digits; 1 for zero.</summary>
    public static int Length(BigInteger units) => units.ToString(CultureInfo.InvariantCulture).Length;

    /// <summary>Writes units * 10^-decimals with a decimal point.</summary>
    public static string WithPoint(BigInteger units, int decimals)
    {
        var digits = units.ToString(CultureInfo.InvariantCulture).PadLeft(decimals + 1, '0');
        return decimals == 0 ? digits : digits[..^decimals] + "." + digits[^decimals..];
    }
}
