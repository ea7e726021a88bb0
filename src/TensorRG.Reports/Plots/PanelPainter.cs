using System.Collections.Immutable;
using ScottPlot;
using ScottPlot.TickGenerators;
using SkiaSharp;

namespace TensorRG.Reports;

/// <summary>Draws one panel through ScottPlot: grid, axes, lines, bars, markers.</summary>
internal static class PanelPainter
{
    public const float MarkerSize = 11;
    public const float LineWidth = 2;
    public const float GuideWidth = 1.5f;

    public static void Paint(SKCanvas canvas, PanelData data, PanelArea area, Figure figure, PlotFont font)
    {
        var plot = new Plot();
        plot.Axes.Remove(Edge.Right);
        plot.FigureBackground.Color = Colors.Transparent;
        plot.DataBackground.Color = Colors.Transparent;
        StyleAxes(plot, data, font);
        foreach (var guide in data.VisibleGuides) AddGuide(plot, data, guide);
        foreach (var series in data.Series.Where(s => s.IsGuide)) AddSeries(plot, data, series);
        foreach (var series in data.Series.Where(s => !s.IsGuide)) AddSeries(plot, data, series);
        plot.Axes.SetLimits(data.XRange.Low, data.XRange.High, data.YRange.Low, data.YRange.High);
        var rectangle = area.Data;
        plot.Layout.Fixed(new PixelPadding(rectangle.Left, figure.Width - rectangle.Right, figure.Height - rectangle.Bottom, rectangle.Top));
        plot.Render(canvas, new PixelRect(0, figure.Width, figure.Height, 0));
    }

    private static void StyleAxes(Plot plot, PanelData data, PlotFont font)
    {
        StyleAxis(plot.Axes.Bottom, data.XTicks, data.XLabel, font);
        StyleAxis(plot.Axes.Left, data.YTicks, data.YLabel, font);
        if (data.Panel.Top is { } top) StyleAxis(plot.Axes.Top, top.Ticks, top.Label, font);
        else plot.Axes.Remove(Edge.Top);
        plot.Grid.MajorLineColor = Palette.MajorGrid;
        plot.Grid.MajorLineWidth = 1;
        plot.Grid.MinorLineColor = Palette.MinorGrid;
        plot.Grid.MinorLineWidth = 1;
    }

    private static void StyleAxis(IAxis axis, ImmutableArray<AxisTick> ticks, string label, PlotFont font)
    {
        axis.TickGenerator = new NumericManual([.. ticks.Select(t => t.IsMajor ? Tick.Major(t.Position, t.Label) : Tick.Minor(t.Position))]);
        axis.Label.Text = label;
        axis.Label.IsVisible = label.Length > 0;
        Style(axis.Label, font, FigureLayout.LabelSize, Palette.Text);
        Style(axis.TickLabelStyle, font, FigureLayout.TickSize, Palette.Text);
        axis.MajorTickStyle.Length = FigureLayout.TickLength;
        axis.MajorTickStyle.Width = 1.25f;
        axis.MinorTickStyle.Length = FigureLayout.TickLength / 2;
        axis.MinorTickStyle.Width = 1;
        axis.FrameLineStyle.Width = 1.25f;
    }

    private static void Style(LabelStyle style, PlotFont font, float size, Color color)
    {
        style.FontName = font.Family;
        style.FontSize = size;
        style.ForeColor = color;
        style.Bold = false;
    }

    private static void AddGuide(Plot plot, PanelData data, Guide guide)
    {
        var position = data.Position(guide);
        if (guide.IsVertical) plot.Add.VerticalLine(position, GuideWidth, Palette.Guide, LinePattern.Dotted);
        else plot.Add.HorizontalLine(position, GuideWidth, Palette.Guide, LinePattern.Dotted);
    }

    private static void AddSeries(Plot plot, PanelData data, PlottedSeries series)
    {
        foreach (var point in series.Points.Where(p => p.HasBar)) AddBar(plot, data, series, point);
        if (series.HasLine)
        {
            foreach (var run in series.Runs) AddLine(plot, series, run);
        }
        if (!series.HasMarkers || series.Runs.IsEmpty) return;
        plot.Add.Markers(series.Points.Select(p => new Coordinates(p.X, p.Y)).ToArray(), series.Marker, MarkerSize, series.Color);
    }

    private static void AddLine(Plot plot, PlottedSeries series, ImmutableArray<PlottedPoint> run)
    {
        var line = plot.Add.ScatterLine(run.Select(p => new Coordinates(p.X, p.Y)).ToArray(), series.Color);
        line.LineWidth = series.IsGuide ? GuideWidth : LineWidth;
        line.LinePattern = series.IsGuide ? LinePattern.Dashed : LinePattern.Solid;
    }

    /// <summary>A bar with caps; an end that leaves the panel has none, which shows that it goes on.</summary>
    private static void AddBar(Plot plot, PanelData data, PlottedSeries series, PlottedPoint point)
    {
        var low = Math.Max(point.BarLow, data.YRange.Low);
        plot.Add.Line(point.X, low, point.X, point.BarHigh).Color = series.Color;
        var half = 0.006 * data.XRange.Length;
        if (point.BarLow >= data.YRange.Low) plot.Add.Line(point.X - half, low, point.X + half, low).Color = series.Color;
        plot.Add.Line(point.X - half, point.BarHigh, point.X + half, point.BarHigh).Color = series.Color;
    }
}
