using System.Collections.Immutable;
using ScottPlot;

namespace TensorRG.Reports;

/// <summary>A series in axis coordinates, its unshowable points removed and its line cut where they were.</summary>
/// <param name="Series">Where it comes from.</param>
/// <param name="Color">Colour of line and markers.</param>
/// <param name="Marker">Shape of the markers.</param>
/// <param name="Runs">Stretches between left-out points.</param>
internal sealed record PlottedSeries(DataSeries Series, Color Color, MarkerShape Marker, ImmutableArray<ImmutableArray<PlottedPoint>> Runs)
{
    public IEnumerable<PlottedPoint> Points => Runs.SelectMany(r => r);

    public bool HasMarkers => Series.Style is SeriesStyle.Points or SeriesStyle.PointsAndLine;

    public bool HasLine => Series.Style is not SeriesStyle.Points;

    public bool IsGuide => Series.Style == SeriesStyle.Guide;
}
