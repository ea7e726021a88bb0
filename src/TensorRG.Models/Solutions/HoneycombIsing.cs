namespace TensorRG.Models.Solutions;

/// <summary>
/// The honeycomb Ising model without a field, by the star-triangle transformation (R. M. F. Houtappel, Physica 16, 425, 1950):
/// summing over one sublattice, 2 cosh(L1 s1 + L2 s2 + L3 s3) = R exp(K1 s2 s3 + K2 s1 s3 + K3 s1 s2), leaves the triangular model with
/// e_12 = cosh(L1 + L2 - L3) / cosh(L1 + L2 + L3) and so on, and R exp(K1 + K2 + K3) = 2 cosh(L1 + L2 + L3). The signs of the couplings do not matter.
/// The magnetisation is that of the triangular model, as both sublattices are alike.
/// </summary>
internal sealed class HoneycombIsing
{
    private readonly Jet logStar;

    /// <summary>From x_i = exp(-2 |L_i|), as jets.</summary>
    /// <param name="x1">Direction 1.</param>
    /// <param name="x2">Direction 2.</param>
    /// <param name="x3">Direction 3.</param>
    /// <param name="numerator">
    /// 1 + x1 x2 x3 - x1 - x2 - x3 - x1 x2 - x1 x3 - x2 x3, which vanishes at criticality, to full relative precision; NaN where plain arithmetic will do.
    /// </param>
    public HoneycombIsing(Jet x1, Jet x2, Jet x3, double numerator)
    {
        Jet all = 1 + (x1 * x2 * x3);
        Jet p = (x3 + (x1 * x2)) / all, q = (x2 + (x1 * x3)) / all, r = (x1 + (x2 * x3)) / all;
        Jet oneMinusR = (1 - x1) * (1 - (x2 * x3)) / all;
        Kernel = new TriangularKernel(p, q, r, oneMinusR, numerator / all.Value);
        logStar = Jet.Log(all);
    }

    /// <summary>The integral.</summary>
    public TriangularKernel Kernel { get; }

    /// <summary>ln Z per site, less (L1 + L2 + L3) / 2.</summary>
    public Jet LogZRest() => 0.5 * (logStar + Kernel.HalfMean());

    /// <summary>The model of three couplings at a temperature.</summary>
    public static HoneycombIsing At(double temperature, double j1, double j2, double j3)
    {
        (j1, j2, j3) = (Math.Abs(j1), Math.Abs(j2), Math.Abs(j3));
        HoneycombIsing plain = new(Decay(j1), Decay(j2), Decay(j3), double.NaN);
        return Math.Abs(plain.Kernel.Distance.Value) < 0.25
            ? new HoneycombIsing(Decay(j1), Decay(j2), Decay(j3), Numerator(temperature, j1, j2, j3))
            : plain;

        Jet Decay(double j) => Jet.ExpMinus(new Jet(2 * j / temperature, 2 * j / temperature, 0));
    }

    private static double Numerator(double temperature, double j1, double j2, double j3)
    {
        DoubleDouble x = Decay(j1), y = Decay(j2), z = Decay(j3);
        return (1.0 + (x * y * z) - x - y - z - (x * y) - (x * z) - (y * z)).High;

        DoubleDouble Decay(double j) => DoubleDouble.Exp((DoubleDouble)(-2 * j) / temperature);
    }
}
