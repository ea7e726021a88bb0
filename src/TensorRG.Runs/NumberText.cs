using System.Globalization;

namespace TensorRG.Runs;

/// <summary>
/// The one spelling of a real number in the files of a run: the shortest decimal that reads back to the same bits,
/// laid out as Python's <c>repr</c> lays out a float (<c>2.0</c>, <c>1e-08</c>, <c>1e+16</c>, <c>-0.0</c>), so that an
/// identity can be recomputed from Python with its standard library alone. The point is always there, so a real
/// number never reads back as an integer.
/// </summary>
internal static class NumberText
{
    private const int FirstExponentWritten = 16;
    private const int LastSmallExponentUnwritten = -4;

    /// <summary>The text of a number; <c>NaN</c>, <c>Infinity</c> and <c>-Infinity</c> as both .NET and Python read them.</summary>
    public static string Of(double value)
    {
        string shortest = value.ToString("R", CultureInfo.InvariantCulture);
        if (!double.IsFinite(value))
            return shortest;
        (string sign, string digits, int exponent) = Split(shortest);
        return sign + Layout(digits, exponent);
    }

    /// <summary>Reads a text that <see cref="Of"/> wrote; any other spelling of the same number is refused.</summary>
    public static bool TryRead(string text, out double value) =>
        double.TryParse(text, NumberStyles.Float, CultureInfo.InvariantCulture, out value)
        && Of(value) == text;

    /// <summary>Significant digits without leading or trailing zeros, and the decimal exponent of the first one.</summary>
    private static (string Sign, string Digits, int Exponent) Split(string shortest)
    {
        string sign = shortest.StartsWith('-') ? "-" : "";
        string[] parts = shortest[sign.Length..].Split('E');
        int written = parts.Length == 2 ? int.Parse(parts[1], CultureInfo.InvariantCulture) : 0;
        int point = parts[0].IndexOf('.', StringComparison.Ordinal);
        int wholeDigits = point < 0 ? parts[0].Length : point;
        string all = parts[0].Replace(".", "", StringComparison.Ordinal);
        string significant = all.TrimStart('0');
        if (significant.Length == 0)
            return (sign, "0", 0);
        int exponent = written + wholeDigits - 1 - (all.Length - significant.Length);
        return (sign, significant.TrimEnd('0'), exponent);
    }

    private static string Layout(string digits, int exponent)
    {
        if (exponent is >= FirstExponentWritten or < LastSmallExponentUnwritten)
            return Scientific(digits, exponent);
        if (exponent < 0)
            return "0." + new string('0', -exponent - 1) + digits;
        string padded = digits.PadRight(exponent + 1, '0');
        string fraction = padded[(exponent + 1)..];
        return padded[..(exponent + 1)] + "." + (fraction.Length == 0 ? "0" : fraction);
    }

    private static string Scientific(string digits, int exponent)
    {
        string mantissa = digits.Length == 1 ? digits : digits[..1] + "." + digits[1..];
        string size = Math.Abs(exponent).ToString("00", CultureInfo.InvariantCulture);
        return mantissa + (exponent < 0 ? "e-" : "e+") + size;
    }
}
