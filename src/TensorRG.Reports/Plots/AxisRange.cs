namespace TensorRG.Reports;

/// <summary>The stretch of an axis that a panel shows, in axis coordinates (values, or decimal logarithms).</summary>
/// <param name="Low">Left or lower end.</param>
/// <param name="High">Right or upper end; always larger.</param>
public readonly record struct AxisRange(double Low, double High)
{
    private const double Padding = 0.05;

    // Values closer than this, relative to their size, cannot be told apart by tick labels.
    private const double Indistinguishable = 1e-13;

    /// <summary>Length in axis coordinates.</summary>
    public double Length => High - Low;

    /// <summary>Whether a position lies inside, the ends included with a hair of rounding.</summary>
    /// <param name="position">Axis coordinate.</param>
    public bool Contains(double position) => position >= Low - 1e-9 * Length && position <= High + 1e-9 * Length;

    /// <summary>
    /// The range round a set of positions with a margin of 5 % on each side. Equal positions get half a decade
    /// (logarithmic) or 5 % of their size (linear, 1 at zero) on either side; no position at all gives 0 to 1.
    /// </summary>
    /// <param name="positions">Axis coordinates; those that are not finite are ignored.</param>
    /// <param name="scale">Scale of the axis.</param>
    public static AxisRange Around(IEnumerable<double> positions, AxisScale scale)
    {
        var finite = positions.Where(double.IsFinite).ToList();
        if (finite.Count == 0) return new AxisRange(0, 1);
        var (low, high) = (finite.Min(), finite.Max());
        var margin = Margin(low, high, scale);
        return new AxisRange(low - margin, high + margin);
    }

    private static double Margin(double low, double high, AxisScale scale)
    {
        var size = Math.Max(Math.Abs(low), Math.Abs(high));
        if (high - low > Indistinguishable * size) return Padding * (high - low);
        if (scale == AxisScale.Logarithmic) return 0.5;
        return size > 0 ? Padding * size : 1;
    }
}
