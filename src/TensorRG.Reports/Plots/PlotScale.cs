namespace TensorRG.Reports;

/// <summary>From values to axis coordinates.</summary>
internal static class PlotScale
{
    /// <summary>The value, or its decimal logarithm; NaN where the axis cannot show it.</summary>
    public static double Position(double value, AxisScale scale) => scale switch
    {
        _ when !double.IsFinite(value) => double.NaN,
        AxisScale.Linear => value,
        _ => value > 0 ? Math.Log10(value) : double.NaN,
    };
}
