using System.Collections.Immutable;

namespace TensorRG.Reports;

/// <summary>Quantities against a parameter, with error bars: sweeps over temperature, field or coupling.</summary>
public static class LinePlot
{
    /// <summary>A figure of one panel.</summary>
    /// <param name="id">Short name of the figure, unique within a page.</param>
    /// <param name="title">What the figure shows.</param>
    /// <param name="caption">Model, parameters, scheme.</param>
    /// <param name="x">Horizontal axis.</param>
    /// <param name="y">Vertical axis.</param>
    /// <param name="series">The data.</param>
    /// <param name="guides">Straight lines, such as an exact value or a critical temperature.</param>
    public static Figure Create(
        string id, string title, string caption, PlotAxis x, PlotAxis y, ImmutableArray<DataSeries> series, params ImmutableArray<Guide> guides) =>
        new(id, title, caption, [new PlotPanel(x, y, series) { Guides = guides.IsDefault ? [] : guides }]);
}
