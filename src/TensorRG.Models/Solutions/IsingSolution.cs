using System.Globalization;

namespace TensorRG.Models.Solutions;

/// <summary>
/// The square Ising model without a field on the infinite lattice, couplings Jx (horizontal) and Jy (vertical) of any sign:
/// ln Z per site = ln 2 + (1/2 pi) int_0^pi ln[(A + sqrt(A^2 - B^2))/2] dw, A = cosh 2Kx cosh 2Ky - sinh 2Kx cos w,
/// B = sinh 2Ky (L. Onsager, Phys. Rev. 65, 117, 1944, after one of his two integrations). Energy and specific heat are the
/// integrals of the integrand's derivatives, not differences. Accurate to about 1e-15 relative to max(1, |value|), also next
/// to the critical temperature, where the distance from it is taken from the exact inputs in double-double arithmetic.
/// </summary>
public sealed class IsingSolution
{
    internal const string OnsagerSource = "L. Onsager, Phys. Rev. 65, 117 (1944)";
    internal const string MagnetisationSource = "C. N. Yang, Phys. Rev. 85, 808 (1952); C. H. Chang, Phys. Rev. 88, 1422 (1952) for Jx != Jy";

    private readonly double temperature;
    private readonly bool isFerromagnet;
    private readonly IsingCouplings couplings;

    private IsingSolution(double temperature, double jx, double jy)
    {
        this.temperature = temperature;
        isFerromagnet = jx > 0 && jy > 0;
        couplings = new IsingCouplings(temperature, jx, jy);
        Jet integral = Momenta.Mean(couplings.LogMode);
        LogZPerSite = couplings.Sum + (integral.Value / 2);
        EnergyPerSite = -temperature * (couplings.Sum + (integral.First / 2));
        EntropyPerSite = (integral.Value - integral.First) / 2;
        SpecificHeatPerSite = couplings.ScaledDistance == 0 ? double.PositiveInfinity : Math.Max(0, integral.Second / 2);
    }

    /// <summary>ln Z / N.</summary>
    public double LogZPerSite { get; }

    /// <summary>U / N, in the unit of the couplings.</summary>
    public double EnergyPerSite { get; }

    /// <summary>S / N = ln Z / N + U / (N T); the ground-state energy, which cancels, is left out of both.</summary>
    public double EntropyPerSite { get; }

    /// <summary>C / N; infinite at criticality, if a double can name it.</summary>
    public double SpecificHeatPerSite { get; }

    /// <summary>
    /// Order parameter per site, (1 - (sinh 2Kx sinh 2Ky)^-2)^(1/8) below the critical temperature and 0 from there on:
    /// the magnetisation, staggered along the directions whose coupling is negative.
    /// </summary>
    public double OrderParameter => Math.Pow(couplings.MagnetisationEighth, 0.125);

    /// <summary>The solution at one temperature.</summary>
    /// <param name="temperature">T > 0.</param>
    /// <param name="jx">Horizontal coupling, any sign.</param>
    /// <param name="jy">Vertical coupling, any sign.</param>
    /// <exception cref="ArgumentOutOfRangeException">T is not a positive number, or a coupling is not a number or above 1e300 T.</exception>
    public static IsingSolution At(double temperature, double jx, double jy)
    {
        Check(temperature, jx, jy);
        return new IsingSolution(temperature, jx, jy);
    }

    /// <summary>
    /// The temperature where sinh(2|Jx|/T) sinh(2|Jy|/T) = 1, to the last digit or the one before: 2|J| / ln(1 + sqrt 2)
    /// for equal couplings, else by bisection and one step of Newton's method.
    /// </summary>
    /// <param name="jx">Horizontal coupling, not zero.</param>
    /// <param name="jy">Vertical coupling, not zero.</param>
    /// <exception cref="ArgumentOutOfRangeException">A coupling is zero or not finite.</exception>
    public static ExactValue CriticalTemperature(double jx, double jy)
    {
        (jx, jy) = (Math.Abs(jx), Math.Abs(jy));
        if (!(jx > 0 && jy > 0 && double.IsFinite(jx) && double.IsFinite(jy)))
            throw new ArgumentOutOfRangeException(nameof(jx), "A critical temperature needs two finite couplings that are not zero.");
        double value = jx == jy ? 2 * jx / Constants.LogSilver : SolveCritical(jx, jy);
        string note = jx == jy ? "2|J| / ln(1 + sqrt 2)" : "root of sinh(2|Jx|/T) sinh(2|Jy|/T) = 1";
        return new ExactValue(value, 2 * Constants.Epsilon * value, OnsagerSource, note);
    }

    /// <summary>One quantity with its source, or null where it is not finite or does not apply.</summary>
    /// <param name="quantity">Which quantity.</param>
    public ExactValue? Exact(Quantity quantity) => quantity switch
    {
        Quantity.LogZPerSite => Value(LogZPerSite, 1, "integral over one momentum, by double-exponential quadrature"),
        Quantity.EnergyPerSite => Value(EnergyPerSite, temperature * couplings.Sum, "integral of the derivative of the integrand"),
        Quantity.EntropyPerSite => Value(EntropyPerSite, 1, "ln Z + U/T, the ground-state energy taken out of both"),
        Quantity.SpecificHeatPerSite when double.IsFinite(SpecificHeatPerSite) =>
            Value(SpecificHeatPerSite, 1, "integral of the second derivative of the integrand"),
        Quantity.SpontaneousMagnetisation => Magnetisation(),
        _ => null,
    };

    private static ExactValue Value(double value, double scale, string note)
        => new(value, 8 * Constants.Epsilon * Math.Max(scale, Math.Abs(value)), OnsagerSource, note);

    private ExactValue Magnetisation()
    {
        if (isFerromagnet)
            return new ExactValue(OrderParameter, 4 * Constants.Epsilon, MagnetisationSource, "(1 - (sinh 2Kx sinh 2Ky)^-2)^(1/8) below the critical temperature");
        string staggered = OrderParameter.ToString("R", CultureInfo.InvariantCulture);
        return new ExactValue(0, 0, MagnetisationSource, $"the uniform magnetisation vanishes unless both couplings are positive; the staggered one is {staggered}");
    }

    private static double SolveCritical(double jx, double jy)
    {
        double low = Constants.LogSilver / Math.Max(jx, jy), high = Constants.LogSilver / Math.Min(jx, jy);
        for (int i = 0; i < 200 && high - low > 2 * Constants.Epsilon * high; i++)
        {
            double middle = high > 4 * low ? Math.Sqrt(low) * Math.Sqrt(high) : low + ((high - low) / 2);
            if (LogSinh(middle * jx) + LogSinh(middle * jy) < 0)
                low = middle;
            else
                high = middle;
        }
        return Polish(4 / (low + high), jx, jy);
    }

    // Newton in the inverse temperature relative to 1/t: d(ln sinh x sinh y) = x coth x + y coth y.
    private static double Polish(double t, double jx, double jy)
    {
        double x = 2 * jx / t, y = 2 * jy / t;
        double slope = (x / Math.Tanh(x)) + (y / Math.Tanh(y));
        IsingCouplings near = new(t, jx, jy);
        double relative = near.ScaledDistance * Math.Exp(x + y) / slope;
        return Math.Abs(relative) < 1e-10 ? t + (t * relative) : t;
    }

    private static double LogSinh(double x) => x - Constants.Ln2 + Math.Log(-Elementary.ExpM1(-2 * x));

    private static void Check(double temperature, double jx, double jy)
    {
        if (!(temperature > 0 && double.IsFinite(temperature)))
            throw new ArgumentOutOfRangeException(nameof(temperature), "The temperature must be a positive number.");
        if (!(Math.Abs(jx) / temperature <= 1e300 && Math.Abs(jy) / temperature <= 1e300))
            throw new ArgumentOutOfRangeException(nameof(jx), "The couplings must be finite numbers, at most 1e300 temperatures.");
    }
}
