namespace TensorRG.Models.Solutions;

/// <summary>
/// The kagome Ising model without a field (K. Kano, S. Naya, Prog. Theor. Phys. 10, 158, 1953). The honeycomb model with a further spin
/// on each bond gives the kagome model when the vertex spins are summed over, and the honeycomb model with coupling M, exp(2M) = (1 + exp(4K))/2,
/// when the further spins are: 3 ln Z = (3/2) ln(2 (exp(4K) + 1)) - ln(exp(2K) (exp(4K) + 3)) + 2 ln Z', per site of either.
/// Antiferromagnetic couplings have M &lt; 0, whose sign does not matter. The magnetisation is sqrt(1 - exp(-4M)) times that of the honeycomb model.
/// </summary>
internal static class KagomeIsing
{
    /// <summary>ln Z and what follows from it.</summary>
    public static Thermal Values(double temperature, double j)
    {
        double k = j / temperature;
        HoneycombIsing honeycomb = Honeycomb(temperature, j);
        Jet small = Jet.ExpMinus(new Jet(4 * Math.Abs(k), 4 * Math.Abs(k), 0)), x = Decorated(small, k);
        // (L1 + L2 + L3)/2 of the honeycomb model is 3|M|/2, |M| = -ln(x)/2; the parts linear in K are taken out of every logarithm.
        Jet bulk = 2 * honeycomb.LogZRest();
        Jet rest = k > 0
            ? (1.5 * Jet.Log(2 * (1 + small))) - Jet.Log(1 + (3 * small)) + (1.5 * Jet.Log(0.5 * (1 + small))) + bulk
            : (1.5 * Jet.Log(2 * (1 + small))) - Jet.Log(3 + small) - (1.5 * Jet.Log(x)) + bulk;
        double linear = k > 0 ? 2 * k : -2 * k / 3;
        double order = k > 0 ? Math.Sqrt(1 - (x.Value * x.Value)) * Math.Pow(honeycomb.Kernel.MagnetisationEighth, 0.125) : 0;
        return new Thermal(temperature, linear, 1.0 / 3 * rest, honeycomb.Kernel.Distance.Value == 0, order);
    }

    /// <summary>The honeycomb model.</summary>
    public static HoneycombIsing Honeycomb(double temperature, double j)
    {
        double k = j / temperature;
        Jet x = Decorated(Jet.ExpMinus(new Jet(4 * Math.Abs(k), 4 * Math.Abs(k), 0)), k);
        HoneycombIsing plain = new(x, x, x, double.NaN);
        return k > 0 && Math.Abs(plain.Kernel.Distance.Value) < 0.25 ? new HoneycombIsing(x, x, x, Numerator(temperature, j)) : plain;
    }

    // exp(-2|M|) from exp(-4|K|).
    private static Jet Decorated(Jet small, double k) => k > 0 ? 2 * small / (1 + small) : 0.5 * (1 + small);

    private static double Numerator(double temperature, double j)
    {
        DoubleDouble small = DoubleDouble.Exp((DoubleDouble)(-4 * j) / temperature);
        DoubleDouble x = small * 2.0 / (1.0 + small);
        return ((1.0 + x) * (1.0 - (x * 4.0) + (x * x))).High;
    }
}
