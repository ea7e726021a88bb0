using System.Globalization;
using TensorRG.CoarseGraining;
using TensorRG.Reports;

namespace TensorRG.Cli.Output;

/// <summary>One line of the table of steps, in fixed columns that fit 100 characters.</summary>
internal static class StepLine
{
    public static string Header { get; } =
        "step      length   states   discarded      ln Z per site        change       X     time\n"
        + "----  ----------  -------  ----------  -------------------  ----------  ------  -------";

    public static string Of(StepRecord record, StepRecord? previous)
    {
        double change = previous is null ? double.NaN : record.LogZPerSite - previous.LogZPerSite;
        string states = FormattableString.Invariant($"{record.VerticalDimension}x{record.HorizontalDimension}");
        string notice = record.Notices.IsEmpty ? "" : "  " + string.Join("; ", record.Notices);
        return string.Create(
            CultureInfo.InvariantCulture,
            $"{record.Step,4}  {Length(record),10}  {states,7}  {Small(record.DiscardedWeight),10}  {LogZ(record),19}  {Small(change),10}  {record.DegeneracyRatio,6:0.0000}  {Time(record.Seconds),7}{notice}");
    }

    private static string Length(StepRecord record)
        => record.LengthScale < 1e5 ? record.LengthScale.ToString("0.0", CultureInfo.InvariantCulture) : FormattableString.Invariant($"2^{Math.Log2(record.LengthScale):0.0}");

    private static string LogZ(StepRecord record)
        => double.IsFinite(record.LogZPerSite) ? record.LogZPerSite.ToString("F16", CultureInfo.InvariantCulture) : "-";

    private static string Small(double value)
    {
        if (!double.IsFinite(value))
            return "-";
        return value == 0 ? "0" : NumberFormat.Scientific(value);
    }

    private static string Time(double seconds) => double.IsFinite(seconds) ? NumberFormat.Duration(seconds) : "-";
}
