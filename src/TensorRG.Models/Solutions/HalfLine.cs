using TensorRG.Tensors;

namespace TensorRG.Models.Solutions;

/// <summary>
/// int_0^inf f(y) dy of a smooth f that decays like exp(-y), by the double-exponential rule y = exp(t - exp(-t))
/// (H. Takahasi, M. Mori, Publ. RIMS 9, 721, 1974). The step resolves structure on scales down to about 1e-8.
/// </summary>
internal static class HalfLine
{
    private const double Step = 1.0 / 128;
    private const int FirstNode = -4 * 128;
    private const int LastNode = 540;

    /// <summary>The integral.</summary>
    public static double Integral(Func<double, double> integrand)
    {
        CompensatedSum sum = default;
        for (int n = FirstNode; n <= LastNode; n++)
        {
            double t = n * Step;
            double y = Math.Exp(t - Math.Exp(-t));
            sum.Add(Step * y * (1 + Math.Exp(-t)) * integrand(y));
        }
        return sum.Value;
    }
}
