using Spectre.Console;
using TensorRG.Cli.Execution;
using TensorRG.Physics;
using TensorRG.Reports;

namespace TensorRG.Cli.Output;

/// <summary>The result of a run as people read it.</summary>
internal static class SummaryText
{
    public static void Write(IAnsiConsole console, RunReport report, IReadOnlyList<string> figures)
    {
        FlowSummary summary = report.Summary;
        console.WriteLine(ModelLine.Of(report.Parameters));
        console.WriteLine(FormattableString.Invariant(
            $"{report.Scheme.Name}, bond dimension {report.Folder.Inputs.BondDimension}, {report.Folder.Inputs.Steps} steps, {Origin(report)} ({report.Backend.Description})"));
        console.WriteLine();
        var grid = new Grid().AddColumn(new GridColumn().NoWrap().PadLeft(2).PadRight(3)).AddColumn();
        Row(grid, "ln Z per site", NumberFormat.WithError(summary.LogZPerSite.Value, summary.LogZPerSite.Error));
        if (summary.FreeEnergyPerSite is { } f)
            Row(grid, "f per site", NumberFormat.WithError(f.Value, f.Error) + "   f = -T ln Z / N");
        foreach (ErrorPart part in summary.LogZPerSite.Parts)
            Row(grid, part == summary.LogZPerSite.Parts[0] ? "error of ln Z" : "", $"{NumberFormat.Scientific(part.Value),-8} {part.Name}: {part.Basis}");
        ExactRows(grid, summary);
        Row(grid, "X", FormattableString.Invariant($"{summary.DegeneracyRatio:0.0000}"));
        Row(grid, "phase", summary.Phase.Summary);
        Row(grid, "run", ShownPath.Of(report.Folder.Path));
        if (figures.Count > 0)
            Row(grid, "figures", string.Join('\n', figures));
        console.Write(grid);
    }

    private static void ExactRows(Grid grid, FlowSummary summary)
    {
        if (summary.Exact is not { } exact)
        {
            Row(grid, "exact value", "none known here: confirm with 'tensorrg converge' and a second scheme");
            return;
        }

        Row(grid, "exact value", NumberFormat.RoundTrip(exact.Value) + "   " + exact.Source);
        string verdict = summary.IsCovered == true ? "inside the error bar" : "OUTSIDE the error bar";
        Row(grid, "relative deviation", $"{NumberFormat.Scientific(Math.Abs(summary.RelativeDeviation))}   {verdict}");
    }

    private static string Origin(RunReport report) => report.StepsDone == 0 && report.Folder.Inputs.Steps > 0
        ? "computed earlier in " + NumberFormat.Duration(report.StepSeconds)
        : NumberFormat.Duration(report.Seconds);

    private static void Row(Grid grid, string label, string text) => grid.AddRow(new Text(label), new Text(text));
}
