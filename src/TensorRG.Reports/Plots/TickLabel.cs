using System.Globalization;

namespace TensorRG.Reports;

/// <summary>The texts of ticks.</summary>
internal static class TickLabel
{
    private const string SuperscriptDigits = "⁰¹²³⁴⁵⁶⁷⁸⁹";

    /// <summary>Characters beyond ASCII that labels may use; a font without them gets the plain spelling.</summary>
    public const string SpecialCharacters = SuperscriptDigits + "⁻×";

    public static string Decade(int power, bool superscripts) =>
        superscripts ? "10" + Superscript(power) : "1e" + Exponent(power);

    public static string Multiple(int digit, int power, bool superscripts)
    {
        if (power is >= -3 and <= 3) return NumberFormat.Fixed(digit * Math.Pow(10, power), Math.Max(0, -power));
        return Times(digit.ToString(CultureInfo.InvariantCulture), power, superscripts);
    }

    public static string Times(string mantissa, int power, bool superscripts) =>
        superscripts ? $"{mantissa}×10{Superscript(power)}" : $"{mantissa}e{Exponent(power)}";

    public static string Fixed(double value, int powerOfTen, int decimals) =>
        NumberFormat.Fixed(powerOfTen == 0 ? value : value / Math.Pow(10, powerOfTen), decimals);

    public static string Superscript(int power)
    {
        var digits = Math.Abs(power).ToString(CultureInfo.InvariantCulture);
        return (power < 0 ? "⁻" : "") + string.Concat(digits.Select(d => SuperscriptDigits[d - '0']));
    }

    public static string Exponent(int power) =>
        (power < 0 ? "-" : "") + Math.Abs(power).ToString("00", CultureInfo.InvariantCulture);
}
