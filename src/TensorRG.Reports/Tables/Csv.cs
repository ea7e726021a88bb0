using System.Buffers;
using System.Globalization;

namespace TensorRG.Reports;

/// <summary>Cells after RFC 4180.</summary>
internal static class Csv
{
    private static readonly SearchValues<char> s_special = SearchValues.Create(",\"\r\n");

    public static string Cell(object? cell) => cell switch
    {
        null => "",
        double value => NumberFormat.RoundTrip(value),
        long value => value.ToString(CultureInfo.InvariantCulture),
        bool value => value ? "true" : "false",
        var text => Quote((string)text),
    };

    // An empty string is quoted to tell it from a cell that is not known.
    public static string Quote(string text) =>
        text.Length == 0 || text.AsSpan().ContainsAny(s_special)
            ? "\"" + text.Replace("\"", "\"\"", StringComparison.Ordinal) + "\""
            : text;
}
