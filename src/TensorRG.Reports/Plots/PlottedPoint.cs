namespace TensorRG.Reports;

/// <summary>A point in axis coordinates with the ends of its error bar; an end of NaN is no bar, minus infinity runs off the panel.</summary>
internal readonly record struct PlottedPoint(double X, double Y, double BarLow, double BarHigh)
{
    public bool HasBar => !double.IsNaN(BarHigh);
}
