namespace TensorRG.Reports;

/// <summary>One point of a plot.</summary>
/// <param name="X">Abscissa.</param>
/// <param name="Y">Ordinate.</param>
/// <param name="Bar">Half length of the vertical error bar, in units of <paramref name="Y"/>; 0 or NaN for none.</param>
public readonly record struct DataPoint(double X, double Y, double Bar = 0);
