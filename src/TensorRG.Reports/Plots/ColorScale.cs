using ScottPlot;
using ScottPlot.Colormaps;

namespace TensorRG.Reports;

/// <summary>
/// Colours of values: viridis, whose steps look equally large everywhere, in grey too, and which readers with any common colour blindness can
/// follow. A cell without a value is light grey, which the scale does not contain.
/// </summary>
internal sealed class ColorScale
{
    /// <summary>Number of different colours; more cannot be told apart, and fewer make smaller files.</summary>
    public const int Steps = 256;

    private static readonly Viridis s_map = new();
    private readonly AxisRange _range;

    public ColorScale(AxisRange range) => _range = range;

    public static Color NoValue { get; } = Color.FromHex("#D0D0D0");

    public static Color Step(int step) => s_map.GetColor(step / (Steps - 1.0));

    public Color Of(double value) => double.IsFinite(value) ? Step(IndexOf(value)) : NoValue;

    /// <summary>Black or white, whichever stands out from the colour of a value.</summary>
    public Color Contrast(double value) => double.IsFinite(value) && IndexOf(value) < Steps * 0.6 ? Colors.White : Colors.Black;

    private int IndexOf(double value) => Math.Clamp((int)((value - _range.Low) / _range.Length * Steps), 0, Steps - 1);
}
