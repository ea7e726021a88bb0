namespace TensorRG.Reports;

/// <summary>How a series is drawn.</summary>
public enum SeriesStyle
{
    /// <summary>Markers joined by a line, which breaks where a point had to be left out.</summary>
    PointsAndLine,

    /// <summary>Markers only.</summary>
    Points,

    /// <summary>A line only.</summary>
    Line,

    /// <summary>A thin dashed grey line: a slope or a theory curve beside the data.</summary>
    Guide,
}
