using System.Globalization;
using System.Security.Cryptography;
using System.Text;
using TensorRG.CoarseGraining;

namespace TensorRG.Runs;

/// <summary>
/// flow.csv: a header and one row a step. Two things stand behind the record in each row: <c>seconds</c>, the time of
/// the step (empty where it is not known), and <c>check</c>, the first 16 hexadecimal digits of a SHA-256 chain over
/// the identity of the run, the header and all rows so far. The chain leaves the seconds out: it is the same for every
/// rerun, and a damaged time changes no number.
/// </summary>
internal static class FlowTable
{
    private const int CheckDigits = 16;
    private static readonly UTF8Encoding Strict = new(false, throwOnInvalidBytes: true);
    private static readonly string Header = CsvLine.Join(FlowRow.Columns);

    /// <summary>The whole file.</summary>
    public static byte[] Write(string identity, IEnumerable<StepRecord> records)
    {
        byte[] chain = Begin(identity);
        StringBuilder text = new(Header + "\n");
        foreach (StepRecord record in records)
        {
            string row = FlowRow.Write(record);
            chain = Continue(chain, row);
            text.Append(row).Append(',').Append(Seconds(record.Seconds)).Append(',').Append(Check(chain)).Append('\n');
        }

        return Strict.GetBytes(text.ToString());
    }

    /// <summary>Reads rows up to the first that is not as it was written.</summary>
    public static FlowContent Read(string identity, byte[] bytes)
    {
        List<StepRecord> records = [];
        try
        {
            string[] lines = Strict.GetString(bytes).Split('\n');
            if (lines[0] != Header)
                return new FlowContent(records, "the header is damaged");
            ReadRows(lines, Begin(identity), records);
            return new FlowContent(records, null);
        }
        catch (Exception cause) when (cause is FormatException or OverflowException or ArgumentException)
        {
            return new FlowContent(records, string.Create(CultureInfo.InvariantCulture, $"row {records.Count} is damaged: {cause.Message}"));
        }
    }

    private static void ReadRows(string[] lines, byte[] chain, List<StepRecord> records)
    {
        foreach (string line in lines[1..^1])
        {
            StepRecord record = ReadRow(line);
            if (record.Step != records.Count)
                throw new FormatException($"it should be step {records.Count}");
            chain = Continue(chain, FlowRow.Write(record));
            if (!line.EndsWith($",{Seconds(record.Seconds)},{Check(chain)}", StringComparison.Ordinal)
                || !line.StartsWith(FlowRow.Write(record) + ",", StringComparison.Ordinal))
                throw new FormatException("it does not match its check");
            records.Add(record);
        }

        if (lines[^1].Length > 0)
            throw new FormatException("it is truncated");
    }

    private static StepRecord ReadRow(string line)
    {
        IReadOnlyList<string> cells = CsvLine.Split(line);
        if (cells.Count != FlowRow.Columns.Count)
            throw new FormatException("it does not have all cells");
        string seconds = cells[^2];
        return FlowRow.Read(cells, seconds.Length == 0 ? double.NaN : CellList.Real(seconds));
    }

    private static string Seconds(double seconds) => double.IsFinite(seconds) ? NumberText.Of(seconds) : "";

    private static byte[] Begin(string identity) => SHA256.HashData(Strict.GetBytes($"{identity}\n{Header}\n"));

    private static byte[] Continue(byte[] chain, string row) => SHA256.HashData([.. chain, .. Strict.GetBytes(row)]);

    private static string Check(byte[] chain) => Convert.ToHexStringLower(chain)[..CheckDigits];
}
