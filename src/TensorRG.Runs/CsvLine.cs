using System.Text;

namespace TensorRG.Runs;

/// <summary>One line of comma-separated values by RFC 4180: a cell with a comma or a quote stands in quotes.</summary>
internal static class CsvLine
{
    public static string Join(IEnumerable<string> cells) => string.Join(',', cells.Select(Quote));

    /// <exception cref="FormatException">A quote is not closed or stands where none may.</exception>
    public static IReadOnlyList<string> Split(string line)
    {
        List<string> cells = [];
        int at = 0;
        do
            cells.Add(at < line.Length && line[at] == '"' ? Quoted(line, ref at) : Plain(line, ref at));
        while (at++ < line.Length);
        return cells;
    }

    private static string Quote(string cell) => cell.AsSpan().IndexOfAny(',', '"') < 0
        ? cell
        : $"\"{cell.Replace("\"", "\"\"", StringComparison.Ordinal)}\"";

    private static string Plain(string line, ref int at)
    {
        int end = line.IndexOf(',', at);
        string cell = line[at..(end < 0 ? line.Length : end)];
        at += cell.Length;
        return cell;
    }

    private static string Quoted(string line, ref int at)
    {
        StringBuilder cell = new();
        while (++at < line.Length)
        {
            bool quote = line[at] == '"';
            bool doubled = quote && at + 1 < line.Length && line[at + 1] == '"';
            if (quote && !doubled)
                break;
            if (doubled)
                at++;
            cell.Append(line[at]);
        }

        at++;
        return at > line.Length || (at < line.Length && line[at] != ',')
            ? throw new FormatException("A quoted cell does not end where it should.")
            : cell.ToString();
    }
}
