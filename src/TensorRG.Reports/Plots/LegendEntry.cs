namespace TensorRG.Reports;

/// <summary>A placed legend entry; a null series is a straight guide line.</summary>
internal sealed record LegendEntry(string Name, PlottedSeries? Series, float Left, int Row);
