using System.Collections.Immutable;
using System.Globalization;

namespace TensorRG.Reports;

/// <summary>A flow at a glance: the degeneracy ratio above, the leading transfer-matrix levels below, both against the step, with the length scale along the top.</summary>
public static class FlowPlot
{
    /// <summary>Levels beyond this say only that they are far up; at criticality it is a scaling dimension of 2.4.</summary>
    public const double DefaultHighestLevel = 15;

    /// <summary>A figure of two panels.</summary>
    /// <param name="points">The steps in order; at least one.</param>
    /// <param name="caption">Model, parameters, scheme.</param>
    /// <param name="title">What the figure shows.</param>
    /// <param name="levels">Number of levels drawn, at most those given.</param>
    /// <param name="highestLevel">Upper end of the level axis; levels above are left out with a notice.</param>
    /// <param name="levelNames">Legend texts of the levels, such as their charges; numbers where none are given.</param>
    /// <exception cref="ArgumentException">No points.</exception>
    public static Figure Create(
        ImmutableArray<FlowPoint> points,
        string caption,
        string title = "Flow of the coarse-grained tensor",
        int levels = 7,
        double highestLevel = DefaultHighestLevel,
        ImmutableArray<string> levelNames = default)
    {
        if (points.IsDefaultOrEmpty) throw new ArgumentException("A flow needs at least one step.", nameof(points));
        var count = Math.Min(levels, points.Max(p => p.Levels.Length));
        var ratio = new DataSeries("", [.. points.Select(p => new DataPoint(p.Step, p.DegeneracyRatio))]);
        var upper = new PlotPanel(Steps(""), new PlotAxis("degeneracy ratio X"), [ratio]) { Top = LengthAxis(points) };
        var gaps = new PlotAxis("−ln |λₙ/λ₀|") { Include = 0, Maximum = highestLevel };
        var lower = new PlotPanel(Steps("step"), gaps, [.. Enumerable.Range(0, count).Select(n => Level(points, n, levelNames))]);
        return new Figure("flow", title, caption, [upper, lower]) { Height = 1000 };
    }

    private static PlotAxis Steps(string label) => new(label) { IsWhole = true };

    private static DataSeries Level(ImmutableArray<FlowPoint> points, int index, ImmutableArray<string> names)
    {
        var name = !names.IsDefault && index < names.Length ? names[index] : string.Create(CultureInfo.InvariantCulture, $"n = {index + 1}");
        return new DataSeries(name, [.. points.Select(p => new DataPoint(p.Step, index < p.Levels.Length ? p.Levels[index] : double.NaN))]);
    }

    /// <summary>Decades of the length scale at the (fractional) steps where they are reached, linear in ln L between steps.</summary>
    private static TopAxis LengthAxis(ImmutableArray<FlowPoint> points)
    {
        var last = Math.Log10(points.Max(p => p.LengthScale));
        var every = Math.Max(1, (int)Math.Ceiling(last / 10));
        var ticks = ImmutableArray.CreateBuilder<AxisTick>();
        for (var decade = 0; decade <= last; decade += every)
        {
            if (StepAt(points, decade) is { } step) ticks.Add(new AxisTick(step, TickLabel.Decade(decade, PlotFont.Default.HasSpecialCharacters), true));
        }
        return new TopAxis("length scale L in lattice constants", ticks.DrainToImmutable());
    }

    private static double? StepAt(ImmutableArray<FlowPoint> points, double decade)
    {
        for (var i = 0; i < points.Length; i++)
        {
            var here = Math.Log10(points[i].LengthScale);
            if (Math.Abs(here - decade) < 1e-9) return points[i].Step;
            if (i == 0 || !(here > decade)) continue;
            var before = Math.Log10(points[i - 1].LengthScale);
            if (before < decade) return points[i - 1].Step + (decade - before) / (here - before) * (points[i].Step - points[i - 1].Step);
        }
        return null;
    }
}
