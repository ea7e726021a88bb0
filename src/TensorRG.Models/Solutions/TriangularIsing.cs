namespace TensorRG.Models.Solutions;

/// <summary>
/// The triangular Ising model without a field, couplings J1, J2, J3 of any sign along the three directions. Flipping the sign
/// of two couplings changes nothing on the infinite lattice, so only the sign of the product matters: it goes to the weakest.
/// </summary>
internal sealed class TriangularIsing
{
    private readonly double temperature;
    private readonly double strong;
    private readonly double middle;
    private readonly double weak;

    /// <summary>Couplings in any order.</summary>
    public TriangularIsing(double temperature, double j1, double j2, double j3)
    {
        this.temperature = temperature;
        double[] sizes = [Math.Abs(j1), Math.Abs(j2), Math.Abs(j3)];
        Array.Sort(sizes);
        int sign = Math.Sign(j1) * Math.Sign(j2) * Math.Sign(j3);
        (strong, middle, weak) = (sizes[2], sizes[1], sign < 0 ? -sizes[0] : sizes[0]);
        IsFerromagnet = j1 + j2 > 0 && j1 + j3 > 0 && j2 + j3 > 0;
        Kernel = Build();
    }

    /// <summary>The integral.</summary>
    public TriangularKernel Kernel { get; }

    /// <summary>All spins parallel is the only ground state, but for a reversal.</summary>
    public bool IsFerromagnet { get; }

    /// <summary>True if it orders at some temperature above zero.</summary>
    public bool Orders => middle + weak > 0;

    /// <summary>ln Z and what follows from it.</summary>
    public Thermal Values()
    {
        double order = IsFerromagnet ? Math.Pow(Kernel.MagnetisationEighth, 0.125) : 0;
        return new Thermal(temperature, (strong + middle + weak) / temperature, Kernel.HalfMean(), Kernel.Distance.Value == 0, order);
    }

    private TriangularKernel Build()
    {
        double a = strong / temperature, b = middle / temperature, c = weak / temperature;
        Jet p = Pair(a + b), q = Pair(a + c), r = Pair(b + c);
        Jet oneMinusR = Jet.OneMinusExpMinus(Exponent(2 * (b + c)));
        return new TriangularKernel(p, q, r, oneMinusR, Distance(oneMinusR.Value - p.Value - q.Value), weak < 0 ? Bend(a, b, -c, q, r) : null);
    }

    // Near criticality the difference is lost in rounding: take it in double-double from the exact inputs.
    private double Distance(double plain)
    {
        if (!(Math.Abs(plain) < 0.25))
            return double.NaN;
        DoubleDouble sum = Decay(strong, middle) + Decay(strong, weak) + Decay(middle, weak);
        return ((DoubleDouble)1.0 - sum).High;

        DoubleDouble Decay(double x, double y) => DoubleDouble.Exp((((DoubleDouble)x) + y) * -2.0 / temperature);
    }

    // With w = exp(-4|K|), E = 1 - w: Rest = -(discriminant of Q) / s1^2, the leading terms of which cancel by hand.
    private static Frustration Bend(double a, double b, double c, Jet q, Jet r)
    {
        Jet w1 = Pair(2 * a), w2 = Pair(2 * b), w3 = Pair(2 * c);
        Jet e1 = Rest(a), e2 = Rest(b), e3 = Rest(c);
        Jet sum = (q * q * e2 * e3 * (w1 - w2 - w3 + (w2 * w3)))
            + (e1 * e2 * (w3 - w1 - w2 + (w1 * w2)))
            + (r * r * e1 * e3 * (w2 - w1 - w3 + (w1 * w3)))
            - (w1 * w2 * e1 * e2 * e3);
        return new Frustration(2 * e1 * r, -4 * q * q * sum / (e1 * e1));

        static Jet Rest(double k) => Jet.OneMinusExpMinus(Exponent(4 * k));
    }

    private static Jet Pair(double sum) => Jet.ExpMinus(Exponent(2 * sum));

    private static Jet Exponent(double x) => new(x, x, 0);
}
