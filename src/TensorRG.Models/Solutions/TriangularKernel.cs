namespace TensorRG.Models.Solutions;

/// <summary>
/// The integral of the triangular Ising model (R. M. F. Houtappel, Physica 16, 425, 1950): with e_jk = exp(-2(Kj + Kk)),
/// ln Z per site = K1 + K2 + K3 + (1/2) mean over both momenta of
/// ln[D + s1 (1 - cos w1) + s2 (1 - cos w2) + s3 (1 - cos(w1 + w2))], D = g^2, g = 1 - e12 - e13 - e23, s1 = 2(e23 - e12 e13) and so on.
/// One mean is done: ln[(a + sqrt Q)/2], a = D + s2 + s3 + s1 u, Q = a^2 - b^2 = D (D + 2 s2 + 2 s3) + 2 m u + s1^2 u^2, u = 1 - cos w1,
/// m = s1 s2 + s1 s3 + s2 s3 + s1 D. Signs of couplings are gauged so that K1 &gt;= K2 &gt;= |K3|; then g = 0 is the only criticality.
/// All are jets in the inverse temperature.
/// </summary>
internal sealed class TriangularKernel
{
    private readonly Jet d;
    private readonly Jet s1;
    private readonly Jet s2;
    private readonly Jet s3;
    private readonly Jet s23;
    private readonly Jet m;
    private readonly Frustration? frustration;

    /// <summary>From the pair exponentials.</summary>
    /// <param name="p">e12.</param>
    /// <param name="q">e13.</param>
    /// <param name="r">e23, the largest.</param>
    /// <param name="oneMinusR">1 - e23.</param>
    /// <param name="distance">g to full relative precision; NaN where that of 1 - e23 - e12 - e13 will do.</param>
    /// <param name="frustration">Given for K3 &lt; 0.</param>
    public TriangularKernel(Jet p, Jet q, Jet r, Jet oneMinusR, double distance, Frustration? frustration = null)
    {
        Jet g = oneMinusR - p - q;
        if (!double.IsNaN(distance))
            g = g with { Value = distance };
        this.frustration = frustration;
        Distance = g;
        d = g * g;
        s1 = 2 * (r - (p * q));
        s2 = 2 * (q - (p * r));
        s3 = 2 * (p - (q * r));
        s23 = 2 * (p + q) * oneMinusR;
        Jet pairs = (p * q) + (q * r) + (r * p), all = p * q * r;
        m = (frustration is null ? (s1 * s2) + (s1 * s3) + (s2 * s3) : 4 * ((pairs * g) + (all * (4 - g)))) + (s1 * d);
        MagnetisationEighth = g.Value > 0 ? Eighth(p.Value, q.Value, r.Value, g.Value) : 0;
    }

    /// <summary>g: positive in the ordered phase.</summary>
    public Jet Distance { get; }

    /// <summary>
    /// The eighth power of the order parameter (J. Stephenson, J. Math. Phys. 5, 1009, 1964), 0 in the disordered phase.
    /// </summary>
    public double MagnetisationEighth { get; }

    /// <summary>Half the mean of the logarithm.</summary>
    public Jet HalfMean()
    {
        if (frustration is not { } bend || m.Value >= 0)
            return 0.5 * Momenta.Mean(Smooth);
        Jet at = -1 * m / (bend.Slope * bend.Slope);
        return at.Value < 2
            ? 0.5 * SplitMomenta.Mean(2 * Math.Asin(Math.Sqrt(at.Value / 2)), (u, step) => Bent(u, step, at, bend))
            : 0.5 * Momenta.Mean(Smooth);
    }

    private static double Eighth(double p, double q, double r, double g)
    {
        double above = g * (1 + p + q - r) * (1 + p - q + r) * (1 - p + q + r);
        return above / ((1 + p + q + r) * (1 + p - q - r) * (1 - p + q - r) * (1 - p - q + r));
    }

    private Jet Smooth(double u)
    {
        Jet low = d + (s1 * u);
        Jet square = frustration is null
            ? (low * (low + (2 * s23))) + (2 * u * s2 * s3)
            : (d * (d + (2 * s23))) + (2 * u * m) + (s1 * s1 * (u * u));
        return Logarithm(low + s23, square);
    }

    private Jet Bent(double u, double step, Jet at, Frustration bend)
    {
        Jet away = bend.Slope * new Jet(step, -at.First, -at.Second);
        return Logarithm(d + (s1 * u) + s23, (away * away) + bend.Rest);
    }

    private static Jet Logarithm(Jet a, Jet square) => Jet.Log(0.5 * (a + Jet.Sqrt(square)));
}
