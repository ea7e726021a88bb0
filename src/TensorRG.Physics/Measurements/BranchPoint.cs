using System.Numerics;

namespace TensorRG.Physics.Measurements;

/// <summary>What one boundary state says.</summary>
/// <param name="BondDimension">States kept: chi, or fewer where more have no weight or would cut a multiplet.</param>
/// <param name="SmallestWeight">Square of the smallest Schmidt value over the sum of all squares: the size of what was dropped.</param>
/// <param name="LogZ">ln Z per site; imaginary part: its phase.</param>
/// <param name="Means">&lt;O&gt; / N for each observable of the branch.</param>
/// <param name="Variances">(&lt;O^2&gt; - &lt;O&gt;^2) / N with the error of the derivative, NaN where not asked for.</param>
/// <param name="Residual">Residual of the fixed point.</param>
/// <param name="IsConverged">Whether the state is converged.</param>
internal sealed record BranchPoint(
    int BondDimension, double SmallestWeight, Complex LogZ, Complex[] Means, (double Value, double Error)[] Variances, double Residual, bool IsConverged);
