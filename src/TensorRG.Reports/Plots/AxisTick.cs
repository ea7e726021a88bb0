namespace TensorRG.Reports;

/// <summary>A tick of an axis.</summary>
/// <param name="Position">Where it stands, in axis coordinates: the value, or its decimal logarithm on a logarithmic axis.</param>
/// <param name="Label">Its text; empty for a tick without one.</param>
/// <param name="IsMajor">Whether it is long and carries a grid line.</param>
public readonly record struct AxisTick(double Position, string Label, bool IsMajor);
