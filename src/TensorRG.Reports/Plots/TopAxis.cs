using System.Collections.Immutable;

namespace TensorRG.Reports;

/// <summary>A second scale along the top of a panel that reads the x axis in another quantity.</summary>
/// <param name="Label">Quantity and unit.</param>
/// <param name="Ticks">Ticks at positions of the x axis.</param>
public sealed record TopAxis(string Label, ImmutableArray<AxisTick> Ticks);
