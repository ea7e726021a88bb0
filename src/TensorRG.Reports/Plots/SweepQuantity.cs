using System.Collections.Immutable;

namespace TensorRG.Reports;

/// <summary>One quantity over the points of a sweep, in the order of the points.</summary>
/// <param name="Label">Name and unit: the text of its axis.</param>
/// <param name="Values">Values; NaN where there is none.</param>
/// <param name="Bars">Half lengths of the error bars, in the unit of the values.</param>
/// <param name="Converged">Whether the bar can be relied on.</param>
/// <param name="Exact">Exact values; NaN where none is known.</param>
public sealed record SweepQuantity(
    string Label, ImmutableArray<double> Values, ImmutableArray<double> Bars, ImmutableArray<bool> Converged, ImmutableArray<double> Exact);
