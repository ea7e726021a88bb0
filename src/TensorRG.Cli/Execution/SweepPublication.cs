using System.Collections.Immutable;
using TensorRG.Cli.Output;
using TensorRG.Reports;
using TensorRG.Runs.Points;

namespace TensorRG.Cli.Execution;

/// <summary>The files of a finished sweep: table, JSON, figure.</summary>
/// <param name="Report">The sweep as data.</param>
/// <param name="Json">The content of sweep.json.</param>
/// <param name="Files">The files, as shown to the user.</param>
/// <param name="Notices">What the figure could not show.</param>
internal sealed record SweepPublication(SweepReport Report, string Json, ImmutableArray<string> Files, ImmutableArray<string> Notices)
{
    private const string Name = "sweep";

    /// <summary>Writes all files into the folder. The same points give the same table and JSON.</summary>
    public static SweepPublication Write(SweepFolder folder, ImmutableArray<PointResult> points)
    {
        var report = new SweepReport(folder.Inputs, points);
        string stem = Path.Combine(folder.Path, Name);
        ImmutableArray<string> files = [stem + ".csv", stem + ".json"];
        ImmutableArray<string> notices = ["More than two axes have several values: no figure was drawn."];
        if (SweepFigure.Of(report) is { } figure)
        {
            RenderedFigure rendered = FigureRenderer.Render(figure);
            files = [.. files, .. rendered.Write(stem)];
            notices = rendered.Notices;
        }

        string json = JsonText.Write(SweepJson.Of(report, files.Select(static f => Path.GetFileName(f))));
        ReportFile.WriteText(stem + ".csv", report.Table().ToCsv());
        ReportFile.WriteText(stem + ".json", json);
        return new SweepPublication(report, json, [.. files.Select(ShownPath.Of)], notices);
    }

    /// <summary>Prints the sweep.</summary>
    public void Show(OutputMode mode, string origin)
    {
        if (mode == OutputMode.Json)
            Console.Out.Write(Json);
        else
            SweepText.Write(Consoles.Out, Report, Files, Notices, origin);
    }
}
