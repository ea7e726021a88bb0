using System.Collections.Concurrent;
using System.Collections.Immutable;

namespace TensorRG.Reports.Tests;

/// <summary>Figures that between them use every feature and every awkward input. The numbers are those of typical runs; nothing here is a claim about physics.</summary>
public static class Gallery
{
    private const string Caption = "square Ising, J = 1, h = 0, T = 2.269185314213022 (critical); bond-weighted TRG, k = -1/2, 50 steps; relative deviation from the exact ln Z per site (Onsager 1944)";

    private static readonly ConcurrentDictionary<string, RenderedFigure> s_rendered = new();

    public static TheoryData<string> Names => [.. All.Keys.Order(StringComparer.Ordinal)];

    public static IReadOnlyDictionary<string, Figure> All { get; } = new Dictionary<string, Figure>
    {
        ["convergence"] = Convergence(),
        ["convergence one series"] = ConvergencePlot.Create([Series("one", (8, 1.06e-5), (16, -3.3e-7), (24, 5.6e-8), (25, 5e-8), (32, 0))], "short"),
        ["convergence equal"] = ConvergencePlot.Create([Series("equal", (8, 1e-5), (16, 1e-5)), Series("none", (8, 0), (16, double.NaN))], "", referenceSlope: -4),
        ["convergence nothing"] = ConvergencePlot.Create([Series("none", (8, 0))], Caption, referenceSlope: -4, extrapolationError: double.NaN),
        ["flow"] = FlowPlot.Create(Flow(51), Caption),
        ["flow one step"] = FlowPlot.Create(Flow(1), Caption, levelNames: ["n = 1 (odd)"]),
        ["flow no levels"] = FlowPlot.Create([.. Flow(8).Select(p => p with { Levels = [] })], Caption),
        ["sweep"] = Sweep(),
        ["small numbers"] = Line("small", new PlotAxis("field h (units of J)"), new PlotAxis("magnetisation per site"), Series("m", (1e-7, 2e-8), (3e-7, 5e-8))),
        ["narrow range"] = Line("narrow", new PlotAxis("temperature T (units of J)"), new PlotAxis("ln Z per site"), Series("z", (1, 0.929695398), (2, 0.929695399))),
        ["indistinguishable"] = Line("indistinguishable", new PlotAxis("x"), new PlotAxis("y"), Series("z", (1, 0.1), (1, BitwiseNext(0.1)))),
        ["bars on a logarithmic axis"] = LogarithmicBars(),
        ["empty"] = LinePlot.Create("empty", "Nothing", "", new PlotAxis("x"), new PlotAxis("y", AxisScale.Logarithmic), []),
        ["extreme"] = Line("extreme", new PlotAxis("x"), new PlotAxis("y"), Series("e", (-1e300, 1e-300), (1e300, 1e308))),
        ["long words"] = Line("long", new PlotAxis(new string('x', 300)), new PlotAxis(new string('y', 200)), [.. Enumerable.Range(1, 9).Select(i => Series($"a rather long series name, number {i}", (i, i), (i + 1, 2 * i)))]),
        ["sweep lines"] = SweepPlot.Lines(new PlotAxis("temperature T [energy / k_B]"), Temperatures(24), [Energy(24), SpecificHeat(24)], "Sweep of two quantities", Caption, new Guide("exact critical temperature", 2.269185, IsVertical: true)),
        ["sweep of many points"] = SweepPlot.Lines(new PlotAxis("temperature T [energy / k_B]"), Temperatures(300), [Energy(300), SpecificHeat(300), Energy(300), SpecificHeat(300), Energy(300)], "Sweep of five quantities", Caption),
        ["sweep of one point"] = SweepPlot.Lines(new PlotAxis("q") { IsWhole = true }, [3], [new SweepQuantity("ln-z", [1], [0], [true], [double.NaN])], "One point", Caption),
        ["map"] = SweepPlot.Maps(new PlotAxis("temperature T [energy / k_B]"), [2, 1, 1.5, 2.5], new PlotAxis("h [energy]"), [0, -0.5, 0.5], [Plane("magnetisation", 4, 3, i => i - 5), Plane("ln-z", 4, 3, i => 1e-7 * i * i)], "Map of two quantities", Caption),
        ["map awkward"] = SweepPlot.Maps(new PlotAxis("q") { IsWhole = true }, [2, 3, 4, 9], new PlotAxis("J [energy]"), [-1], [Plane("constant", 4, 1, i => i == 2 ? double.NaN : 0.1)], "Constant values with a hole", Caption),
        ["map empty"] = SweepPlot.Maps(new PlotAxis("x"), [1, 2], new PlotAxis("y"), [1, 2], [Plane("nothing", 2, 2, _ => double.NaN)], "No value at all", Caption),
        ["map fine"] = SweepPlot.Maps(new PlotAxis("temperature T [energy / k_B]"), Temperatures(120), new PlotAxis("h [energy]"), [.. Enumerable.Range(0, 80).Select(i => i / 80.0)], [Plane("energy [energy]", 120, 80, i => -Math.Cos(i / 80 / 40.0) * Math.Exp(-(i % 80) / 50.0))], "A fine map", Caption),
    };

    /// <summary>A figure drawn under the culture of the test run, once for all tests.</summary>
    public static RenderedFigure Rendered(string name) => s_rendered.GetOrAdd(name, n => FigureRenderer.Render(All[n]));

    public static DataSeries Series(string name, params (double X, double Y)[] points) => new(name, [.. points.Select(p => new DataPoint(p.X, p.Y))]);

    private static Figure Convergence() => ConvergencePlot.Create(
        [
            Series("TRG", (8, 6.91e-5), (16, 4.63e-6), (24, 1.11e-6), (32, 5.27e-7)),
            Series("HOTRG", (8, 1.36e-5), (16, 5.62e-7), (24, 1.04e-7)),
            Series("bond-weighted TRG", (8, 1.06e-5), (16, 3.3e-7), (24, 5.6e-8), (32, 1.407e-8), (48, 2.5e-9), (64, 7.1e-10)),
        ],
        Caption, referenceSlope: -3.8, extrapolationError: 2.4e-10);

    private static ImmutableArray<FlowPoint> Flow(int steps) =>
        [.. Enumerable.Range(0, steps).Select(n => new FlowPoint(n, Math.Pow(2, n / 2.0), 1.7636 + 0.4 * Math.Exp(-n / 2.0), [.. Levels(n)]))];

    private static IEnumerable<double> Levels(int step) =>
        new[] { 0.125, 1, 1.125, 1.125, 2, 2, double.PositiveInfinity }.Select(x => 2 * Math.PI * x * (1 + 0.0002 * Math.Pow(2, step / 2.2)));

    private static Figure Sweep()
    {
        var data = new DataSeries("bond-weighted TRG, χ = 32", [.. Enumerable.Range(0, 21).Select(i => new DataPoint(1.5 + i * 0.075, Curve(1.5 + i * 0.075), 0.02 + 0.002 * i))]) { Style = SeriesStyle.Points };
        var exact = new DataSeries("exact", [.. Enumerable.Range(0, 200).Select(i => new DataPoint(1.5 + i * 0.0075, Curve(1.5 + i * 0.0075)))]) { Style = SeriesStyle.Guide };
        return LinePlot.Create("sweep", "Energy per site of the square Ising model", Caption, new PlotAxis("temperature T (units of J)"), new PlotAxis("energy per site u (units of J)"), [data, exact], new Guide("critical temperature", 2.269185, IsVertical: true));
    }

    private static ImmutableArray<double> Temperatures(int count) => [.. Enumerable.Range(0, count).Select(i => 1.5 + 1.5 * i / count)];

    private static SweepQuantity Energy(int count) => new(
        "energy [energy]",
        [.. Temperatures(count).Select((t, i) => i == 5 ? double.NaN : Curve(t) + 0.02 * Math.Sin(40 * t))],
        [.. Temperatures(count).Select((t, i) => i % 3 == 0 ? 1e-9 : 0.04)],
        [.. Temperatures(count).Select(t => Math.Abs(t - 2.27) > 0.1)],
        [.. Temperatures(count).Select(Curve)]);

    private static SweepQuantity SpecificHeat(int count) => new(
        "specific-heat",
        [.. Temperatures(count).Select(t => -0.5 * Math.Log(Math.Abs(t - 2.269) + 1e-3))],
        [.. Temperatures(count).Select(t => 0.03 / (1 + 100 * Math.Abs(t - 2.269)))],
        [.. Temperatures(count).Select(t => true)],
        [.. Temperatures(count).Select(t => double.NaN)]);

    private static SweepQuantity Plane(string label, int columns, int rows, Func<int, double> value) => new(
        label,
        [.. Enumerable.Range(0, columns * rows).Select(value)],
        [.. Enumerable.Range(0, columns * rows).Select(_ => 0.0)],
        [.. Enumerable.Range(0, columns * rows).Select(i => i % 7 != 3)],
        [.. Enumerable.Range(0, columns * rows).Select(_ => double.NaN)]);

    private static double Curve(double t) => -1.45 + 0.55 * Math.Tanh(2 * (t - 2.27));

    private static Figure LogarithmicBars() => Line("bars", new PlotAxis("L (lattice constants)", AxisScale.Logarithmic), new PlotAxis("deviation", AxisScale.Logarithmic),
        new DataSeries("one", [new(1, 1e-3, 2e-3), new(10, 1e-4, 5e-5), new(1000, 0, 1e-6), new(1e4, 1e-7, double.NaN), new(1e5, 1e-8, double.PositiveInfinity)]));

    private static Figure Line(string id, PlotAxis x, PlotAxis y, params ImmutableArray<DataSeries> series) => LinePlot.Create(id, "A figure of " + id, Caption, x, y, series);

    private static double BitwiseNext(double value) => Math.BitIncrement(value);
}
