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

    private const float BarWidth = 1.5f;

    // Half widths of caps as fractions of the axis: at most this, and this over the number of points.
    private const double WidestCap = 0.006;
    private const double NarrowestGap = 0.3;

    public static void Paint(SKCanvas canvas, PanelData data, PanelArea area, Figure figure, PlotFont font)
    {
        var plot = new Plot();
        plot.Axes.Remove(Edge.Right);
        plot.FigureBackground.Color = Colors.White; // a transparent one turns black in the SVG
        plot.DataBackground.Color = Colors.White;
        StyleAxes(plot, data, font);
        if (data.Panel.Map is { } map) plot.Add.Plottable(new CellPainter(map, new ColorScale(data.ColorRange)));
        foreach (var guide in data.VisibleGuides) AddGuide(plot, data, guide);
        var hidden = HiddenBar(data, area);
        foreach (var series in data.Series.Where(s => s.IsGuide)) AddSeries(plot, data, series, hidden);
        foreach (var series in data.Series.Where(s => !s.IsGuide)) AddSeries(plot, data, series, hidden);
        plot.Axes.SetLimits(data.XRange.Low, data.XRange.High, data.YRange.Low, data.YRange.High);
        if (data.Panel.Top is not null) plot.Axes.SetLimitsX(data.XRange.Low, data.XRange.High, plot.Axes.Top);
        var rectangle = area.Data;
        plot.Layout.Fixed(new PixelPadding(rectangle.Left, figure.Width - rectangle.Right, figure.Height - rectangle.Bottom, rectangle.Top));
        Render(canvas, plot, area, figure);
    }

    // Rendering clears the canvas first; the clip keeps that from wiping out the other panels.
    private static void Render(SKCanvas canvas, Plot plot, PanelArea area, Figure figure)
    {
        var frame = new PixelRect(0, figure.Width, figure.Height, 0);
        // A plot's first rendering draws everything twice, which would double the elements of an SVG: let it draw nowhere.
        using (var nowhere = new SKNoDrawCanvas(figure.Width, figure.Height))
            plot.Render(nowhere, frame);
        canvas.Save();
        canvas.ClipRect(new SKRect(0, area.Top, figure.Width, area.Bottom));
        plot.Render(canvas, frame);
        canvas.Restore();
    }

    private static void StyleAxes(Plot plot, PanelData data, PlotFont font)
    {
        StyleAxis(plot.Axes.Bottom, data.XTicks, font);
        StyleAxis(plot.Axes.Left, data.YTicks, font);
        plot.Axes.Left.TickLabelStyle.OffsetY = 3; // ScottPlot centres the line, not the digits
        if (data.Panel.Top is { } top) StyleAxis(plot.Axes.Top, top.Ticks, font);
        else plot.Axes.Remove(Edge.Top);
        plot.Grid.MajorLineColor = Palette.MajorGrid;
        plot.Grid.MajorLineWidth = 1;
        plot.Grid.MinorLineColor = Palette.MinorGrid;
        plot.Grid.MinorLineWidth = 1;
    }

    private static void StyleAxis(IAxis axis, ImmutableArray<AxisTick> ticks, PlotFont font)
    {
        axis.TickGenerator = new NumericManual([.. ticks.Select(t => t.IsMajor ? Tick.Major(t.Position, t.Label) : Tick.Minor(t.Position))]);
        axis.Label.IsVisible = false; // FigureRenderer draws labels where the layout has measured room for them
        axis.TickLabelStyle.FontName = font.Family;
        axis.TickLabelStyle.FontSize = FigureLayout.TickSize;
        axis.TickLabelStyle.ForeColor = Palette.Text;
        axis.TickLabelStyle.Bold = false;
        axis.MajorTickStyle.Length = FigureLayout.TickLength;
        axis.MajorTickStyle.Width = 1.25f;
        axis.MinorTickStyle.Length = FigureLayout.TickLength / 2;
        axis.MinorTickStyle.Width = 1;
        axis.FrameLineStyle.Width = 1.25f;
    }

    private static void AddGuide(Plot plot, PanelData data, Guide guide)
    {
        var position = data.Position(guide);
        ImmutableArray<Coordinates> ends = guide.IsVertical
            ? [new(position, data.YRange.Low), new(position, data.YRange.High)]
            : [new(data.XRange.Low, position), new(data.XRange.High, position)];
        plot.Add.Plottable(new DashedLine(ends, isDotted: true, GuideWidth, Palette.Guide));
    }

    /// <summary>Length in axis coordinates up to which a bar lies behind its marker: its caps would only spoil the marker's shape.</summary>
    private static double HiddenBar(PanelData data, PanelArea area) => MarkerSize * data.YRange.Length / area.Data.Height;

    private static void AddSeries(Plot plot, PanelData data, PlottedSeries series, double hidden)
    {
        var least = series.HasMarkers ? hidden : hidden * LineWidth / MarkerSize;
        foreach (var point in series.Points.Where(p => p.HasBar && p.BarHigh - p.BarLow > least)) AddBar(plot, data, series, point);
        if (series.HasLine)
        {
            foreach (var run in series.Runs) AddLine(plot, data, series, run);
        }
        if (!series.HasMarkers || series.Runs.IsEmpty) return;
        plot.Add.Markers(series.Points.Where(p => data.YRange.Contains(p.Y)).Select(p => new Coordinates(p.X, p.Y)).ToArray(), series.Marker, MarkerSize, series.Color);
    }

    private static void AddLine(Plot plot, PanelData data, PlottedSeries series, ImmutableArray<PlottedPoint> run)
    {
        Coordinates[] points = [.. run.Select(p => new Coordinates(p.X, data.NearFrame(p.Y)))];
        if (series.IsGuide) plot.Add.Plottable(new DashedLine([.. points], isDotted: false, GuideWidth, series.Color));
        else plot.Add.ScatterLine(points, series.Color).LineWidth = LineWidth;
    }

    /// <summary>A bar with caps; an end that leaves the panel has none, which shows that it goes on.</summary>
    private static void AddBar(Plot plot, PanelData data, PlottedSeries series, PlottedPoint point)
    {
        var half = Math.Min(WidestCap, NarrowestGap / series.Points.Count()) * data.XRange.Length; // caps of many points must not run together
        var low = Math.Max(point.BarLow, data.YRange.Low);
        AddStroke(plot, series, point.X, low, point.X, data.NearFrame(point.BarHigh));
        AddStroke(plot, series, point.X - half, data.NearFrame(point.BarHigh), point.X + half, data.NearFrame(point.BarHigh));
        if (point.BarLow >= data.YRange.Low) AddStroke(plot, series, point.X - half, low, point.X + half, low);
    }

    private static void AddStroke(Plot plot, PlottedSeries series, double x1, double y1, double x2, double y2)
    {
        var line = plot.Add.Line(x1, y1, x2, y2);
        line.LineColor = series.Color;
        line.LineWidth = BarWidth;
    }
}
