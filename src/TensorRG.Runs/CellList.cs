using System.Collections.Immutable;
using System.Globalization;
using System.Text;
using TensorRG.CoarseGraining;

namespace TensorRG.Runs;

/// <summary>
/// Lists inside one cell of flow.csv: items joined by ';' and their parts by ':' — a bond as <c>charge:dimension</c>, a
/// spectrum as <c>charge:magnitude:phase</c>. Inside texts '%', ';', ':' and control characters are written as in a
/// URL (<c>%3A</c>), so a row is always one line.
/// </summary>
internal static class CellList
{
    public static string Write(ImmutableArray<SectorSize> bond) =>
        Join(bond, s => $"{Escape(s.Charge)}:{s.Dimension.ToString(CultureInfo.InvariantCulture)}");

    public static string Write(ImmutableArray<SpectrumLine> spectrum) =>
        Join(spectrum, l => $"{Escape(l.Charge)}:{NumberText.Of(l.Magnitude)}:{NumberText.Of(l.Phase)}");

    /// <summary>Notices joined by ';'; empty ones are left out.</summary>
    public static string Write(ImmutableArray<string> notices) =>
        notices.IsDefault ? "" : Join([.. notices.Where(n => n.Length > 0)], Escape);

    public static ImmutableArray<SectorSize> ReadBond(string cell) =>
        Split(cell, 2, p => new SectorSize(p[0], int.Parse(p[1], NumberStyles.None, CultureInfo.InvariantCulture)));

    public static ImmutableArray<SpectrumLine> ReadSpectrum(string cell) =>
        Split(cell, 3, p => new SpectrumLine(p[0], Real(p[1]), Real(p[2])));

    public static ImmutableArray<string> ReadNotices(string cell) => Split(cell, 1, p => p[0]);

    public static double Real(string text) => NumberText.TryRead(text, out double value)
        ? value
        : throw new FormatException($"'{text}' is no number.");

    private static string Join<T>(ImmutableArray<T> items, Func<T, string> write) =>
        items.IsDefaultOrEmpty ? "" : string.Join(';', items.Select(write));

    private static ImmutableArray<T> Split<T>(string cell, int parts, Func<string[], T> read)
    {
        if (cell.Length == 0)
            return [];
        return [.. cell.Split(';').Select(item => item.Split(':') is { } p && p.Length == parts
            ? read([.. p.Select(Uri.UnescapeDataString)])
            : throw new FormatException($"'{item}' does not have {parts} parts."))];
    }

    private static string Escape(string text)
    {
        StringBuilder escaped = new();
        foreach (char c in text)
        {
            if (c is '%' or ';' or ':' || c < ' ')
                escaped.Append('%').Append(((int)c).ToString("X2", CultureInfo.InvariantCulture));
            else
                escaped.Append(c);
        }

        return escaped.ToString();
    }
}
