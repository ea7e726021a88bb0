using System.Collections.Immutable;
using System.Globalization;

namespace TensorRG.Reports;

/// <summary>How fast a number settles as the bond dimension grows: log-log, ticks at the bond dimensions computed.</summary>
public static class ConvergencePlot
{
    /// <summary>A figure of absolute deviations, or changes, against the bond dimension chi.</summary>
    /// <param name="series">One series per scheme or model: X is chi, Y the deviation, whose sign is dropped.</param>
    /// <param name="caption">Model, parameters, steps.</param>
    /// <param name="title">What the figure shows.</param>
    /// <param name="yLabel">The vertical quantity.</param>
    /// <param name="referenceSlope">Exponent p of a dashed line chi^p beside the first series; null for none.</param>
    /// <param name="extrapolationError">Error bar of the extrapolated value, on the scale of Y: a dotted line; null for none.</param>
    public static Figure Create(
        ImmutableArray<DataSeries> series,
        string caption,
        string title = "Convergence of ln Z per site with the bond dimension",
        string yLabel = "|relative deviation| of ln Z per site",
        double? referenceSlope = null,
        double? extrapolationError = null)
    {
        ImmutableArray<DataSeries> absolute = [.. series.Select(Absolute)];
        var slope = referenceSlope is { } exponent ? Slope(absolute[0], exponent) : null;
        var x = new PlotAxis("bond dimension χ", AxisScale.Logarithmic) { TickValues = [.. absolute.SelectMany(s => s.Points).Select(p => p.X)] };
        var panel = new PlotPanel(x, new PlotAxis(yLabel, AxisScale.Logarithmic), slope is null ? absolute : absolute.Add(slope))
        {
            Guides = extrapolationError is { } error ? [new Guide("error bar of the extrapolation", error)] : [],
        };
        return new Figure("convergence", title, caption, [panel]);
    }

    private static DataSeries Absolute(DataSeries series) =>
        series with { Points = [.. series.Points.Select(p => p with { Y = Math.Abs(p.Y) })] };

    /// <summary>The line c * chi^p over the range of the series, with c so that it passes a factor of two above its highest point.</summary>
    private static DataSeries? Slope(DataSeries series, double exponent)
    {
        var points = series.Points.Where(p => p.X > 0 && p.Y > 0 && double.IsFinite(p.X) && double.IsFinite(p.Y)).ToList();
        if (points.Count == 0) return null;
        var prefactor = 2 * points.Max(p => p.Y / Math.Pow(p.X, exponent));
        DataPoint At(double chi) => new(chi, prefactor * Math.Pow(chi, exponent));
        var name = string.Create(CultureInfo.InvariantCulture, $"slope χ^{exponent:0.##}");
        return new DataSeries(name, [At(points.Min(p => p.X)), At(points.Max(p => p.X))]) { Style = SeriesStyle.Guide };
    }
}
