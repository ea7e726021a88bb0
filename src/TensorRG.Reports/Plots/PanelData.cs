using System.Collections.Immutable;

namespace TensorRG.Reports;

/// <summary>A panel worked out in axis coordinates: what is shown, over which range, with which ticks, and what had to be left out.</summary>
internal sealed class PanelData
{
    // A bar that reaches far below its point on a logarithmic axis must not squeeze the data: it is cut one decade down.
    private const double LongestBarInDecades = 1;

    private const double FarInPanels = 50;

    public PanelData(PlotPanel panel, bool superscripts)
    {
        Panel = panel;
        Series = Resolve(panel);
        XRange = Range(panel.X, panel.Series.SelectMany(s => s.Points).Select(p => PlotScale.Position(p.X, panel.X.Scale)), Crossings(panel, vertical: true));
        YRange = Range(panel.Y, Series.SelectMany(s => s.Points).SelectMany(BarEnds), Crossings(panel, vertical: false));
        if (panel.Map is { } map)
        {
            (XRange, YRange) = (Extent(map.X), Extent(map.Y));
            ColorRange = ColorsOf(map);
            (ColorTicks, ColorLabel) = TicksOf(new PlotAxis(map.Label), ColorRange, superscripts, intervals: 6);
        }
        (XTicks, XLabel) = TicksOf(panel.X, XRange, superscripts, intervals: 8);
        (YTicks, YLabel) = TicksOf(panel.Y, YRange, superscripts, intervals: 6);
        Notices = [.. panel.Series.Select(LeftOut).Append(Beyond()).Append(Empty(panel.Map)).Concat(panel.Guides.Select(LeftOut)).OfType<string>()];
    }

    public PlotPanel Panel { get; }

    public ImmutableArray<PlottedSeries> Series { get; }

    public AxisRange XRange { get; }

    public AxisRange YRange { get; }

    public ImmutableArray<AxisTick> XTicks { get; }

    public ImmutableArray<AxisTick> YTicks { get; }

    public string XLabel { get; }

    public string YLabel { get; }

    /// <summary>The values of a map from the first colour to the last.</summary>
    public AxisRange ColorRange { get; }

    public ImmutableArray<AxisTick> ColorTicks { get; } = [];

    public string ColorLabel { get; } = "";

    public ImmutableArray<string> Notices { get; }

    public IEnumerable<Guide> VisibleGuides => Panel.Guides.Where(g => double.IsFinite(Position(g)));

    public double Position(Guide guide) => PlotScale.Position(guide.Value, (guide.IsVertical ? Panel.X : Panel.Y).Scale);

    private static ImmutableArray<PlottedSeries> Resolve(PlotPanel panel)
    {
        var result = ImmutableArray.CreateBuilder<PlottedSeries>();
        var index = 0;
        foreach (var series in panel.Series)
        {
            var runs = Runs(series, panel);
            var place = series.Style == SeriesStyle.Guide ? -1 : index++;
            result.Add(new PlottedSeries(series, place < 0 ? Palette.Guide : Palette.ColorOf(place), Palette.MarkerOf(Math.Max(place, 0)), runs));
        }
        return result.DrainToImmutable();
    }

    private static ImmutableArray<ImmutableArray<PlottedPoint>> Runs(DataSeries series, PlotPanel panel)
    {
        var runs = new List<ImmutableArray<PlottedPoint>>();
        var run = new List<PlottedPoint>();
        foreach (var point in series.Points)
        {
            var plotted = Plot(point, panel);
            if (plotted is { } visible) run.Add(visible);
            if (plotted is not null || run.Count == 0) continue;
            runs.Add([.. run]);
            run.Clear();
        }
        if (run.Count > 0) runs.Add([.. run]);
        return [.. runs];
    }

    private static PlottedPoint? Plot(DataPoint point, PlotPanel panel)
    {
        if (!CanBeShown(point, panel)) return null;
        var x = PlotScale.Position(point.X, panel.X.Scale);
        var y = PlotScale.Position(point.Y, panel.Y.Scale);
        if (!(point.Bar > 0 && double.IsFinite(point.Bar))) return new PlottedPoint(x, y, double.NaN, double.NaN);
        var low = PlotScale.Position(point.Y - point.Bar, panel.Y.Scale);
        return new PlottedPoint(x, y, double.IsNaN(low) ? double.NegativeInfinity : low, PlotScale.Position(point.Y + point.Bar, panel.Y.Scale));
    }

    private static bool CanBeShown(DataPoint point, PlotPanel panel) =>
        double.IsFinite(PlotScale.Position(point.X, panel.X.Scale)) && double.IsFinite(PlotScale.Position(point.Y, panel.Y.Scale));

    private static bool IsBeyond(DataPoint point, PlotPanel panel) => point.X > panel.X.Maximum || point.Y > panel.Y.Maximum;

    /// <summary>Keeps a line towards a point far beyond the frame within what pixel coordinates can hold.</summary>
    public double NearFrame(double y) => Math.Clamp(y, YRange.Low - FarInPanels * YRange.Length, YRange.High + FarInPanels * YRange.Length);

    private IEnumerable<double> BarEnds(PlottedPoint point)
    {
        yield return point.Y;
        if (!point.HasBar) yield break;
        yield return point.BarHigh;
        yield return Panel.Y.Scale == AxisScale.Linear ? point.BarLow : Math.Max(point.BarLow, point.Y - LongestBarInDecades);
    }

    private static IEnumerable<double> Crossings(PlotPanel panel, bool vertical)
    {
        var scale = (vertical ? panel.X : panel.Y).Scale;
        return panel.Guides.Where(g => g.IsVertical == vertical).Select(g => PlotScale.Position(g.Value, scale));
    }

    private static AxisRange Range(PlotAxis axis, IEnumerable<double> data, IEnumerable<double> guides)
    {
        var included = axis.Include is { } value ? PlotScale.Position(value, axis.Scale) : double.NaN;
        var end = axis.Maximum is { } maximum ? PlotScale.Position(maximum, axis.Scale) : double.PositiveInfinity;
        return AxisRange.Around(data.Concat(guides).Append(included).Where(double.IsFinite).Select(p => Math.Min(p, end)), axis.Scale);
    }

    private static AxisRange Extent(ImmutableArray<double> values)
    {
        var edges = CellEdges.Of(values);
        return new AxisRange(edges[0], edges[^1]);
    }

    /// <summary>From the smallest value to the largest, without a margin; equal values get one.</summary>
    private static AxisRange ColorsOf(CellMap map)
    {
        var finite = map.Values.Where(double.IsFinite).ToList();
        var around = AxisRange.Around(finite, AxisScale.Linear);
        if (finite.Count == 0) return around;
        var (low, high) = (finite.Min(), finite.Max());
        return high - low > 1e-12 * Math.Max(Math.Abs(low), Math.Abs(high)) ? new AxisRange(low, high) : around;
    }

    private static string? Empty(CellMap? map)
    {
        var count = map?.Values.Count(v => !double.IsFinite(v)) ?? 0;
        return count == 0 ? null : $"{count} of {map!.Values.Length} cells of '{map.Label}' have no value and are grey.";
    }

    private static (ImmutableArray<AxisTick> Ticks, string Label) TicksOf(PlotAxis axis, AxisRange range, bool superscripts, int intervals)
    {
        if (!axis.TickValues.IsDefaultOrEmpty) return (Ticks.At(axis.TickValues, axis.Scale, range), axis.Label);
        if (axis.Scale == AxisScale.Logarithmic) return (Ticks.Logarithmic(range, superscripts), axis.Label);
        if (axis.IsWhole) return (Ticks.Whole(range, intervals + 2), axis.Label);
        var power = Ticks.CommonPower(range);
        var label = power == 0 ? axis.Label : $"{axis.Label} [×{TickLabel.Decade(power, superscripts)}]";
        return (Ticks.Linear(range, intervals, power), label);
    }

    private string? LeftOut(DataSeries series)
    {
        var missing = series.Points.Count(p => !CanBeShown(p, Panel));
        if (missing == 0) return null;
        var name = series.Name.Length > 0 ? $"'{series.Name}'" : $"'{Panel.Y.Label}'";
        return $"{missing} of {series.Points.Length} points of {name} left out of the figure: not finite, or not positive on a logarithmic axis.";
    }

    private string? Beyond()
    {
        var points = Panel.Series.SelectMany(s => s.Points).Count(p => CanBeShown(p, Panel) && IsBeyond(p, Panel));
        return points == 0 ? null : $"{points} points of '{Panel.Y.Label}' lie beyond the end of the axis.";
    }

    private string? LeftOut(Guide guide) =>
        double.IsFinite(Position(guide)) ? null : $"The line '{guide.Name}' left out of the figure: its value cannot be shown on the axis.";
}
