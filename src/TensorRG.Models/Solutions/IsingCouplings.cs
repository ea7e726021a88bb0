namespace TensorRG.Models.Solutions;

/// <summary>
/// The square Ising model at couplings |Kx|, |Ky| (signs do not matter on the infinite lattice), in quantities that neither
/// overflow at low temperature nor cancel near criticality. All are jets in the inverse temperature relative to the given
/// one, so a first derivative is beta d/dbeta.
/// With x = 2|Kx|, y = 2|Ky| the eigenvalue of momentum w is built on A = cosh x cosh y - sinh x cos w and B = sinh y,
/// both scaled by exp(-x-y) here: A - B = D + P (1 - cos w), D = g^2 / (cosh x cosh y + sinh x + sinh y) scaled,
/// g = sinh x sinh y - 1, which vanishes at criticality.
/// </summary>
internal sealed class IsingCouplings
{
    /// <summary>Couplings Jx/T and Jy/T.</summary>
    public IsingCouplings(double temperature, double jx, double jy)
    {
        double kx = Math.Abs(jx) / temperature, ky = Math.Abs(jy) / temperature;
        Sum = kx + ky;
        Jet x = new(2 * kx, 2 * kx, 0), y = new(2 * ky, 2 * ky, 0);
        Jet ex = Jet.ExpMinus(x), ey = Jet.ExpMinus(y);
        Jet sx = Jet.OneMinusExpMinus(2 * x) * 0.5, sy = Jet.OneMinusExpMinus(2 * y) * 0.5;
        Jet cx = 1 - sx, cy = 1 - sy;
        Jet distance = (sx * sy) - (ex * ey);
        distance = distance with { Value = Distance(temperature, jx, jy, sx.Value * sy.Value, ex.Value * ey.Value) };
        Gap = distance * distance / ((cx * cy) + (sx * ey) + (sy * ex));
        Hopping = sx * ey;
        B = sy * ex;
        MagnetisationEighth = distance.Value > 0
            ? distance.Value * (1 + (ex.Value * ey.Value / (sx.Value * sy.Value))) / (sx.Value * sy.Value)
            : 0;
        ScaledDistance = distance.Value;
    }

    /// <summary>|Kx| + |Ky|.</summary>
    public double Sum { get; }

    /// <summary>g exp(-x-y): positive in the ordered phase.</summary>
    public double ScaledDistance { get; }

    /// <summary>1 - (sinh x sinh y)^-2 in the ordered phase, else 0.</summary>
    public double MagnetisationEighth { get; }

    private Jet Gap { get; }

    private Jet Hopping { get; }

    private Jet B { get; }

    /// <summary>
    /// The logarithm of 2 (A + sqrt(A^2 - B^2)) scaled, whose half, with |Kx| + |Ky| added, is the contribution of one
    /// momentum to ln Z per site.
    /// </summary>
    /// <param name="oneMinusCosine">1 - cos w.</param>
    public Jet LogMode(double oneMinusCosine)
    {
        Jet difference = Gap + (Hopping * oneMinusCosine);
        Jet root = Jet.Sqrt(difference * (difference + (2 * B)));
        return Jet.Log(2 * (B + difference + root));
    }

    /// <summary>gamma of one momentum: cosh gamma = A/B, gamma >= 0; infinite for B = 0.</summary>
    /// <param name="oneMinusCosine">1 - cos w.</param>
    public double Gamma(double oneMinusCosine)
    {
        double difference = Gap.Value + (Hopping.Value * oneMinusCosine);
        double root = Math.Sqrt(difference * (difference + (2 * B.Value)));
        return Elementary.Log1P((difference + root) / B.Value);
    }

    // Near criticality the difference of the two products is lost in rounding: take it in double-double from the exact inputs.
    private static double Distance(double temperature, double jx, double jy, double sinhProduct, double one)
    {
        double plain = sinhProduct - one;
        if (!(Math.Abs(plain) < 0.25 * one))
            return plain;
        DoubleDouble x = (DoubleDouble)(2 * Math.Abs(jx)) / temperature, y = (DoubleDouble)(2 * Math.Abs(jy)) / temperature;
        return ((DoubleDouble.Sinh(x) * DoubleDouble.Sinh(y)) - 1.0).High * one;
    }
}
