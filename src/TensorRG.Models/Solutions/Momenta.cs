using TensorRG.Tensors;

namespace TensorRG.Models.Solutions;

/// <summary>
/// Mean over a momentum w in (0, pi) by the double-exponential rule w = pi / (1 + exp(-pi sinh t)) (H. Takahasi, M. Mori,
/// Publ. RIMS 9, 721, 1974). The nodes crowd at w = 0, where near criticality the integrand bends on the scale of the
/// inverse correlation length; step and range hold down to scales of 1e-17.
/// </summary>
internal static class Momenta
{
    private const double Step = 1.0 / 256;
    private const int FirstNode = -4 * 256;
    private const int LastNode = 820;

    private static readonly (double OneMinusCosine, double Weight)[] Nodes =
        [.. Enumerable.Range(FirstNode, LastNode - FirstNode + 1).Select(n => Node(n * Step))];

    /// <summary>(1/pi) int_0^pi f dw, value and derivatives.</summary>
    /// <param name="integrand">f as a function of 1 - cos w.</param>
    public static Jet Mean(Func<double, Jet> integrand)
    {
        CompensatedSum value = default, first = default, second = default;
        foreach ((double oneMinusCosine, double weight) in Nodes)
        {
            Jet f = integrand(oneMinusCosine);
            value.Add(weight * f.Value);
            first.Add(weight * f.First);
            second.Add(weight * f.Second);
        }
        return new Jet(value.Value, first.Value, second.Value);
    }

    private static (double OneMinusCosine, double Weight) Node(double t)
    {
        double e = Math.Exp(Math.PI * Math.Sinh(t));
        double w = Math.PI * e / (1 + e);
        double sine = Math.Sin(w / 2);
        return (2 * sine * sine, Step * Math.PI * Math.Cosh(t) * e / ((1 + e) * (1 + e)));
    }
}
