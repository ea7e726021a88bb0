using System.Globalization;

namespace TensorRG.Reports.Tests;

/// <summary>
/// Cultures whose numbers would break a report that forgot the invariant culture. The build is globalization-invariant,
/// where new CultureInfo("de-DE") carries a decimal point after all, so the separators are set by hand.
/// </summary>
public static class Cultures
{
    public static TheoryData<string> Names => ["invariant", "comma", "exotic"];

    public static T Run<T>(string name, Func<T> action)
    {
        var before = CultureInfo.CurrentCulture;
        try
        {
            CultureInfo.CurrentCulture = Create(name);
            return action();
        }
        finally
        {
            CultureInfo.CurrentCulture = before;
        }
    }

    private static CultureInfo Create(string name)
    {
        var culture = (CultureInfo)CultureInfo.InvariantCulture.Clone();
        var format = culture.NumberFormat;
        if (name == "invariant") return culture;
        (format.NumberDecimalSeparator, format.NumberGroupSeparator) = name == "comma" ? (",", ".") : ("'", " ");
        if (name == "exotic") (format.NegativeSign, format.NaNSymbol, format.PositiveInfinitySymbol) = ("\u2212", "¤¤", "∞");
        return culture;
    }
}
