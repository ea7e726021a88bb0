using System.Collections.Immutable;

namespace TensorRG.Reports;

/// <summary>Where the cells of a map begin and end along one axis.</summary>
internal static class CellEdges
{
    /// <summary>One edge more than values: half way between neighbours, and as far beyond the ends. A single value gets the range of <see cref="AxisRange.Around"/>.</summary>
    public static ImmutableArray<double> Of(ImmutableArray<double> values)
    {
        if (values.Length == 1)
        {
            var around = AxisRange.Around(values, AxisScale.Linear);
            return [around.Low, around.High];
        }
        var edges = new double[values.Length + 1];
        for (var i = 1; i < values.Length; i++) edges[i] = values[i - 1] / 2 + values[i] / 2;
        edges[0] = values[0] - (edges[1] - values[0]);
        edges[^1] = values[^1] + (values[^1] - edges[^2]);
        return [.. edges];
    }
}
