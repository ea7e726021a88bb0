using System.Collections.Immutable;

namespace TensorRG.Reports;

/// <summary>A named set of points in one colour.</summary>
/// <param name="Name">Text of the legend; empty for no entry.</param>
/// <param name="Points">Points in drawing order.</param>
public sealed record DataSeries(string Name, ImmutableArray<DataPoint> Points)
{
    /// <summary>Markers, line or both.</summary>
    public SeriesStyle Style { get; init; } = SeriesStyle.PointsAndLine;
}
