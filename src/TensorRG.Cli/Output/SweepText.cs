using Spectre.Console;
using TensorRG.Runs.Points;

namespace TensorRG.Cli.Output;

/// <summary>A finished sweep as people read it.</summary>
internal static class SweepText
{
    /// <summary>Points shown at either end of a long table.</summary>
    private const int Shown = 12;

    /// <summary>Failures and remarks shown.</summary>
    private const int MostMessages = 5;

    public static void Write(IAnsiConsole console, SweepReport report, IReadOnlyList<string> files, IEnumerable<string> notices, string origin)
    {
        SweepInputs inputs = report.Inputs;
        string parameters = report.FixedParameters();
        console.WriteLine(inputs.Model.Title + (parameters.Length == 0 ? "" : ": " + parameters));
        console.WriteLine(FormattableString.Invariant($"{report.Points.Length} points; {MeasureText.Settings(inputs.Measurement)}, {origin}"));
        Table(console, report);
        var grid = new Grid().AddColumn(new GridColumn().NoWrap().PadLeft(2).PadRight(3)).AddColumn();
        if (report.NotConverged > 0)
            Rows(grid, "not converged", [FormattableString.Invariant($"{report.NotConverged} values; sweep.json says why")]);
        Rows(grid, "failed", report.Failed.Select(i => $"{Place(inputs, i)}: {report.Points[i].Failure}"));
        if (report.Points.Length == 1 || report.Remarks().Count() <= MostMessages)
            Rows(grid, "remarks", report.Remarks());
        Rows(grid, "files", files);
        console.Write(grid);
        foreach (string notice in notices)
            console.WriteLine(notice);
    }

    private static void Table(IAnsiConsole console, SweepReport report)
    {
        int count = report.Points.Length;
        if (count <= 2 * Shown)
        {
            TableView.Write(console, report.Screen(Enumerable.Range(0, count)));
            return;
        }

        TableView.Write(console, report.Screen(Enumerable.Range(0, Shown).Concat(Enumerable.Range(count - Shown, Shown))));
        console.WriteLine(FormattableString.Invariant($"  The first and the last {Shown} of {count} points; all are in sweep.csv."));
    }

    private static string Place(SweepInputs inputs, int point)
        => string.Join(", ", inputs.Axes.Zip(inputs.Coordinates(point), static (axis, value) => FormattableString.Invariant($"{axis.Name} = {value}")));

    private static void Rows(Grid grid, string label, IEnumerable<string> texts)
    {
        string[] all = [.. texts];
        for (int i = 0; i < Math.Min(all.Length, MostMessages); i++)
            grid.AddRow(new Text(i == 0 ? label : ""), new Text(all[i]));
        if (all.Length > MostMessages)
            grid.AddRow(new Text(""), new Text(FormattableString.Invariant($"and {all.Length - MostMessages} more")));
    }
}
