namespace TensorRG.Reports;

/// <summary>Scale of an axis.</summary>
public enum AxisScale
{
    /// <summary>Equal steps.</summary>
    Linear,

    /// <summary>Equal ratios, base ten. Only positive values can be shown.</summary>
    Logarithmic,
}
