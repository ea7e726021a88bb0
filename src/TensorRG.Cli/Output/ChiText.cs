using Spectre.Console;
using TensorRG.Physics;
using TensorRG.Reports;

namespace TensorRG.Cli.Output;

/// <summary>A bond-dimension scan as people read it.</summary>
internal static class ChiText
{
    public static void Write(IAnsiConsole console, ChiReport report, IReadOnlyList<string> files, IEnumerable<string> notices)
    {
        console.WriteLine();
        console.WriteLine(ModelLine.Of(report.Parameters));
        TableView.Write(console, report.Table);
        Estimate value = report.Extrapolation.Value;
        var grid = new Grid().AddColumn(new GridColumn().NoWrap().PadLeft(2).PadRight(3)).AddColumn();
        Row(grid, report.Extrapolation.IsExtrapolated ? "extrapolated" : "best value", NumberFormat.WithError(value.Value, value.Error));
        Row(grid, "", report.Extrapolation.Verdict);
        foreach (ErrorPart part in value.Parts)
            Row(grid, part == value.Parts[0] ? "error" : "", $"{NumberFormat.Scientific(part.Value),-8} {part.Name}: {part.Basis}");
        if (report.Exact is { } exact)
        {
            bool inside = Math.Abs(value.Value - exact.Value) <= value.Error + exact.Uncertainty;
            Row(grid, "exact value", NumberFormat.RoundTrip(exact.Value) + "   " + exact.Source);
            Row(grid, "relative deviation", $"{NumberFormat.Scientific(Math.Abs(report.RelativeDeviation))}   {(inside ? "inside the error bar" : "OUTSIDE the error bar")}");
        }

        Row(grid, "files", string.Join('\n', files));
        console.Write(grid);
        foreach (string notice in notices)
            console.WriteLine(notice);
    }

    private static void Row(Grid grid, string label, string text) => grid.AddRow(new Text(label), new Text(text));
}
