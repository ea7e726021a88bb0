using System.Globalization;
using System.Numerics;

namespace TensorRG.Reports;

/// <summary>
/// Numbers as a physicist writes them. Every method is culture-invariant and total: NaN and infinities give
/// "NaN", "inf" and "-inf". Exponents have at least two digits and no plus sign: e-08, e12.
/// </summary>
public static class NumberFormat
{
    private const double LargestPlainCount = 1e6;

    /// <summary>The shortest text that reads back as the same double; "NaN", "Infinity" and "-Infinity" otherwise, which CSV readers know.</summary>
    /// <param name="value">Any double.</param>
    public static string RoundTrip(double value) => value.ToString("R", CultureInfo.InvariantCulture);

    /// <summary>
    /// Value with its uncertainty on the last digits in parentheses: 0.92969539834(16) is 0.92969539834 +- 0.00000000016.
    /// An uncertainty that reaches above the decimal point carries it: 12.3(1.2). The text turns scientific, 1.235(12)e04,
    /// where the last known digit lies above the units, or the number below 1e-4 or from 1e7 on.
    /// </summary>
    /// <remarks>
    /// Error 0 gives the shortest round-trip digits and (0); an unknown error (NaN) gives (?), an infinite one (inf).
    /// No more than the 17 digits a double can hold are printed; an error below the last of them is rounded up.
    /// Exact ties round to the even digit, as .NET does.
    /// </remarks>
    /// <param name="value">The value, any double.</param>
    /// <param name="error">Half length of the error bar, in the same unit; not negative.</param>
    /// <param name="errorDigits">Significant digits of the error, 1 to 4.</param>
    /// <exception cref="ArgumentOutOfRangeException">The error is negative, or <paramref name="errorDigits"/> out of range.</exception>
    public static string WithError(double value, double error, int errorDigits = 2)
    {
        if (error < 0) throw new ArgumentOutOfRangeException(nameof(error), error, "An error bar is not negative.");
        ArgumentOutOfRangeException.ThrowIfLessThan(errorDigits, 1);
        ArgumentOutOfRangeException.ThrowIfGreaterThan(errorDigits, 4);
        if (!double.IsFinite(value)) return NonFinite(value);
        if (error == 0) return WithMark(value, "(0)");
        if (double.IsNaN(error)) return WithMark(value, "(?)");
        if (double.IsInfinity(error)) return WithMark(value, "(inf)");
        return Parenthesised(value, error, errorDigits);
    }

    /// <summary>Scientific notation with a fixed number of significant digits, 1.4e-08, as relative deviations are given; zero is "0".</summary>
    /// <param name="value">Any double.</param>
    /// <param name="digits">Significant digits, 1 to 17.</param>
    /// <exception cref="ArgumentOutOfRangeException"><paramref name="digits"/> is out of range.</exception>
    public static string Scientific(double value, int digits = 2)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(digits, 1);
        ArgumentOutOfRangeException.ThrowIfGreaterThan(digits, 17);
        if (!double.IsFinite(value)) return NonFinite(value);
        if (value == 0) return "0";
        var (units, exponent) = Decimals.Round(Math.Abs(value), digits);
        return Sign(value) + Decimals.WithPoint(units, digits - 1) + Exponent(exponent);
    }

    /// <summary>A wall-clock time in the largest fitting units: 0.35 ms, 350 ms, 1.2 s, 3 min 05 s, 2 h 10 min, 2 d 03 h.</summary>
    /// <param name="seconds">Duration in seconds; a negative one keeps its sign.</param>
    public static string Duration(double seconds)
    {
        if (!double.IsFinite(seconds)) return NonFinite(seconds);
        if (seconds < 0) return "-" + Duration(-seconds);
        if (seconds < 0.00995) return Fixed(seconds * 1e3, 2) + " ms";
        if (seconds < 0.9995) return Fixed(seconds * 1e3, 0) + " ms";
        if (seconds < 59.95) return Fixed(seconds, 1) + " s";
        if (seconds < 3599.5) return Pair(seconds, 1, 60, "min", "s");
        if (seconds < 47.5 * 3600) return Pair(seconds, 60, 60, "h", "min");
        return Pair(seconds, 3600, 24, "d", "h");
    }

    /// <summary>
    /// A count that may be huge: plain below 1e6 (1024), a power of two as such above (2^40), otherwise two significant
    /// digits (1.1e12). Averages of counts, which need not be integers, keep up to six digits below 1e6 (2.5).
    /// </summary>
    /// <param name="count">Any double.</param>
    public static string Count(double count)
    {
        if (!double.IsFinite(count)) return NonFinite(count);
        var isInteger = Math.Abs(count % 1) == 0;
        if (isInteger && Math.Abs(count) < LargestPlainCount) return Fixed(count, 0);
        if (count > 1 && BitConverter.DoubleToInt64Bits(count) << 12 == 0) return "2^" + Math.ILogB(count).ToString(CultureInfo.InvariantCulture);
        if (Math.Abs(count) is >= 1e-4 and < LargestPlainCount) return count.ToString("G6", CultureInfo.InvariantCulture);
        return Scientific(count);
    }

    internal static string NonFinite(double value) => double.IsNaN(value) ? "NaN" : value > 0 ? "inf" : "-inf";

    internal static string Fixed(double value, int decimals)
    {
        var text = value.ToString("F" + decimals.ToString(CultureInfo.InvariantCulture), CultureInfo.InvariantCulture);
        return text.StartsWith('-') && text.All(c => c is '-' or '0' or '.') ? text[1..] : text;
    }

    private static string Parenthesised(double value, double error, int errorDigits)
    {
        var (errorUnits, errorExponent) = Decimals.Round(error, errorDigits);
        var place = errorExponent - errorDigits + 1;
        var lastHeldPlace = value == 0 ? int.MinValue : Decimals.ExponentOf(Math.Abs(value)) - 16;
        if (place < lastHeldPlace)
        {
            place = lastHeldPlace;
            errorUnits = Decimals.UnitsAt(error, place) + 1;
        }
        return Compose(value < 0, Decimals.UnitsAt(Math.Abs(value), place), errorUnits, place);
    }

    private static string Compose(bool negative, BigInteger units, BigInteger errorUnits, int place)
    {
        var leading = place - 1 + Math.Max(Decimals.Length(units), Decimals.Length(errorUnits));
        var isFixed = place <= 0 && leading is >= -4 and < 7;
        var decimals = isFixed ? -place : leading - place;
        var errorText = Decimals.Length(errorUnits) > decimals ? Decimals.WithPoint(errorUnits, decimals) : errorUnits.ToString(CultureInfo.InvariantCulture);
        var sign = negative && !units.IsZero ? "-" : "";
        return sign + Decimals.WithPoint(units, decimals) + "(" + errorText + ")" + (isFixed ? "" : Exponent(leading));
    }

    /// <summary>Puts a mark behind the mantissa of the round-trip digits.</summary>
    private static string WithMark(double value, string mark)
    {
        var parts = RoundTrip(value == 0 ? 0 : value).Split('E');
        return parts[0] + mark + (parts.Length > 1 ? Exponent(int.Parse(parts[1], CultureInfo.InvariantCulture)) : "");
    }

    private static string Pair(double seconds, double secondsPerMinor, long minorPerMajor, string major, string minor)
    {
        var total = Math.Round(seconds / secondsPerMinor, MidpointRounding.AwayFromZero);
        var whole = Math.Floor(total / minorPerMajor);
        return $"{Count(whole)} {major} {Fixed(total - whole * minorPerMajor, 0).PadLeft(2, '0')} {minor}";
    }

    private static string Sign(double value) => value < 0 ? "-" : "";

    private static string Exponent(int exponent) =>
        (exponent < 0 ? "e-" : "e") + Math.Abs(exponent).ToString("00", CultureInfo.InvariantCulture);
}
