using System.Collections.Immutable;

namespace TensorRG.Reports;

/// <summary>One coordinate system with its data.</summary>
/// <param name="X">Horizontal axis.</param>
/// <param name="Y">Vertical axis.</param>
/// <param name="Series">What is drawn, first at the back.</param>
public sealed record PlotPanel(PlotAxis X, PlotAxis Y, ImmutableArray<DataSeries> Series)
{
    /// <summary>Straight lines across the panel.</summary>
    public ImmutableArray<Guide> Guides { get; init; } = [];

    /// <summary>A second scale along the top; null for none.</summary>
    public TopAxis? Top { get; init; }

    /// <summary>A map behind the series, with a colour bar; its cells fill the panel. Null for none.</summary>
    public CellMap? Map { get; init; }
}
