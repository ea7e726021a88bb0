using System.Collections.Immutable;
using TensorRG.Cli.Execution;
using TensorRG.CoarseGraining;
using TensorRG.Reports;

namespace TensorRG.Cli.Output;

/// <summary>The flow of a run as a figure: degeneracy ratio and leading transfer-matrix levels against the step.</summary>
internal static class FlowFigure
{
    /// <summary>Draws flow.svg and flow.png into the run's folder.</summary>
    /// <returns>The two files, as shown to the user.</returns>
    public static IReadOnlyList<string> Write(RunReport report)
    {
        ImmutableArray<FlowPoint> points = [.. report.Records.Select(Point)];
        string caption = FormattableString.Invariant(
            $"{ModelLine.Of(report.Parameters)}; {report.Scheme.Name}, bond dimension {report.Folder.Inputs.BondDimension}");
        RenderedFigure figure = FigureRenderer.Render(FlowPlot.Create(points, caption));
        return [.. figure.Write(Path.Combine(report.Folder.Path, "flow")).Select(ShownPath.Of)];
    }

    private static FlowPoint Point(StepRecord record)
        => new(record.Step, record.LengthScale, record.DegeneracyRatio, [.. record.Spectrum.Skip(1).Select(static line => -Math.Log(line.Magnitude))]);
}
