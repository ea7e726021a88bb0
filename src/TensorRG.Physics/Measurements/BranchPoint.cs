using System.Numerics;

namespace TensorRG.Physics.Measurements;

/// <summary>What one boundary state says.</summary>
/// <param name="BondDimension">chi.</param>
/// <param name="LogZ">ln Z per site; imaginary part: its phase.</param>
/// <param name="Means">&lt;O&gt; / N for each observable of the branch.</param>
/// <param name="Variances">(&lt;O^2&gt; - &lt;O&gt;^2) / N with the error of the derivative, NaN where not asked for.</param>
/// <param name="Residual">Residual of the fixed point.</param>
/// <param name="IsConverged">Whether the state is converged.</param>
internal sealed record BranchPoint(
    int BondDimension, Complex LogZ, Complex[] Means, (double Value, double Error)[] Variances, double Residual, bool IsConverged);
