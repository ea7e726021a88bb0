using System.Collections.Immutable;

namespace TensorRG.Reports;

/// <summary>Quantities over the grid of a sweep: a panel each, lines over one parameter or maps over two.</summary>
public static class SweepPlot
{
    /// <summary>Beyond this markers run into one another, and a line says more.</summary>
    private const int MostMarkers = 60;

    private const int MostCellTicks = 12;
    private const int LongestCellTick = 5;

    /// <summary>Lines with error bars over one parameter; exact values as a dashed line, what did not converge in another colour.</summary>
    /// <param name="x">Axis of the parameter.</param>
    /// <param name="abscissas">Its values, in any order.</param>
    /// <param name="quantities">The quantities, each with as many values; at least one.</param>
    /// <param name="title">What the figure shows.</param>
    /// <param name="caption">Model, fixed parameters, method.</param>
    /// <param name="guides">Vertical lines, such as a critical temperature.</param>
    public static Figure Lines(
        PlotAxis x, ImmutableArray<double> abscissas, ImmutableArray<SweepQuantity> quantities, string title, string caption, params ImmutableArray<Guide> guides)
    {
        ArgumentNullException.ThrowIfNull(x);
        int[] order = [.. Enumerable.Range(0, abscissas.Length).OrderBy(i => abscissas[i])];
        var panels = ImmutableArray.CreateBuilder<PlotPanel>();
        var explained = new HashSet<string>();
        foreach (var quantity in quantities)
        {
            ImmutableArray<DataSeries> series = [.. Series(quantity, abscissas, order)];
            var isLast = panels.Count == quantities.Length - 1;
            panels.Add(new PlotPanel(isLast ? x : x with { Label = "" }, new PlotAxis(quantity.Label), Explain(series, explained))
            {
                Guides = [.. guides.Select(g => g with { Name = explained.Add(g.Name) ? g.Name : "" })],
            });
        }
        return new Figure("sweep", title, caption, panels.DrainToImmutable()) { Height = quantities.Length == 1 ? 800 : 200 + 260 * quantities.Length };
    }

    /// <summary>Maps over two parameters. Cells without a value are grey, those that did not converge carry a cross.</summary>
    /// <param name="x">Axis of the parameter that runs to the right.</param>
    /// <param name="columns">Its values, in any order.</param>
    /// <param name="y">Axis of the parameter that runs upwards.</param>
    /// <param name="rows">Its values, in any order.</param>
    /// <param name="quantities">The quantities, each with a value for every pair: all of the first column, then of the next.</param>
    /// <param name="title">What the figure shows.</param>
    /// <param name="caption">Model, fixed parameters, method.</param>
    public static Figure Maps(
        PlotAxis x, ImmutableArray<double> columns, PlotAxis y, ImmutableArray<double> rows, ImmutableArray<SweepQuantity> quantities, string title, string caption)
    {
        ImmutableArray<PlotPanel> panels = [.. quantities.Select(q => new PlotPanel(WithTicks(x, columns), WithTicks(y, rows), []) { Map = Map(q, columns, rows) })];
        var signs = quantities.Any(q => q.Converged.Contains(false)) ? "; crosses: not converged" : "";
        var holes = quantities.Any(q => q.Values.Any(v => !double.IsFinite(v))) ? "; grey: no value" : "";
        return new Figure("sweep", title, caption + signs + holes, panels) { Height = quantities.Length == 1 ? 900 : 140 + 560 * quantities.Length };
    }

    /// <summary>Few cells with short values carry these as ticks: they say more than round numbers in between.</summary>
    private static PlotAxis WithTicks(PlotAxis axis, ImmutableArray<double> values)
        => values.Length <= MostCellTicks && values.All(v => NumberFormat.RoundTrip(v).Length <= LongestCellTick) ? axis with { TickValues = values } : axis;

    private static IEnumerable<DataSeries> Series(SweepQuantity quantity, ImmutableArray<double> abscissas, int[] order)
    {
        var hasExact = quantity.Exact.Any(double.IsFinite);
        var style = order.Length > MostMarkers ? SeriesStyle.Line : hasExact ? SeriesStyle.Points : SeriesStyle.PointsAndLine;
        if (hasExact)
            yield return new DataSeries("exact", [.. order.Where(i => double.IsFinite(quantity.Exact[i])).Select(i => new DataPoint(abscissas[i], quantity.Exact[i]))]) { Style = SeriesStyle.Guide };
        yield return new DataSeries("measured, with error bar", [.. order.Select(i => new DataPoint(abscissas[i], quantity.Values[i], quantity.Bars[i]))]) { Style = style };
        int[] open = [.. order.Where(i => !quantity.Converged[i] && double.IsFinite(quantity.Values[i]))];
        if (open.Length > 0)
            yield return new DataSeries("not converged", [.. open.Select(i => new DataPoint(abscissas[i], quantity.Values[i], quantity.Bars[i]))]) { Style = SeriesStyle.Points };
    }

    /// <summary>Each sign is explained once: a panel has a legend where it has something new.</summary>
    private static ImmutableArray<DataSeries> Explain(ImmutableArray<DataSeries> series, HashSet<string> explained)
    {
        var isNew = series.Any(s => !explained.Contains(s.Name));
        explained.UnionWith(series.Select(s => s.Name));
        return isNew ? series : [.. series.Select(s => s with { Name = "" })];
    }

    private static CellMap Map(SweepQuantity quantity, ImmutableArray<double> columns, ImmutableArray<double> rows)
    {
        int[] right = [.. Enumerable.Range(0, columns.Length).OrderBy(c => columns[c])];
        int[] up = [.. Enumerable.Range(0, rows.Length).OrderBy(r => rows[r])];
        int[] places = [.. up.SelectMany(r => right.Select(c => c * rows.Length + r))];
        return new CellMap(quantity.Label, [.. right.Select(c => columns[c])], [.. up.Select(r => rows[r])], [.. places.Select(p => quantity.Values[p])])
        {
            Marked = [.. Enumerable.Range(0, places.Length).Where(i => !quantity.Converged[places[i]] && double.IsFinite(quantity.Values[places[i]]))],
        };
    }
}
