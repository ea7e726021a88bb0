namespace TensorRG.Reports;

/// <summary>A straight dotted line across the whole panel, such as an exact value or a critical temperature.</summary>
/// <param name="Name">Text of the legend; empty for no entry.</param>
/// <param name="Value">Where it crosses the axis.</param>
/// <param name="IsVertical">True for a line at constant x, false for one at constant y.</param>
public sealed record Guide(string Name, double Value, bool IsVertical = false);
