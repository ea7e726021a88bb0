using System.Collections.Immutable;

namespace TensorRG.Reports;

/// <summary>One axis of a panel.</summary>
/// <param name="Label">Quantity and unit; empty for an axis labelled by the panel below.</param>
/// <param name="Scale">Linear or logarithmic.</param>
public sealed record PlotAxis(string Label, AxisScale Scale = AxisScale.Linear)
{
    /// <summary>Values that carry the ticks, for instance the bond dimensions of a scan; empty for round numbers.</summary>
    public ImmutableArray<double> TickValues { get; init; } = [];

    /// <summary>Whether automatic ticks stand at whole numbers only, as for steps; linear axes only.</summary>
    public bool IsWhole { get; init; }

    /// <summary>Largest value shown; null for as far as the data go. Points beyond are left out with a notice.</summary>
    public double? Maximum { get; init; }

    /// <summary>A value the axis shows in any case, such as 0 on an axis of gaps; null for none.</summary>
    public double? Include { get; init; }
}
