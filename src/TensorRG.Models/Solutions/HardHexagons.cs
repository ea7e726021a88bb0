namespace TensorRG.Models.Solutions;

/// <summary>
/// Hard hexagons (R. J. Baxter, J. Phys. A 13, L61, 1980): activity, ln kappa and density as products in x. With
/// G(x) = prod 1/((1 - x^(5n-4)) (1 - x^(5n-1))), H(x) = prod 1/((1 - x^(5n-3)) (1 - x^(5n-2))), Q(x) = prod (1 - x^n):
/// below z_c, -1 &lt; x &lt; 0, z = -x (H/G)^5; above, 0 &lt; x &lt; 1, z = (G/H)^5 / x.
/// </summary>
internal static class HardHexagons
{
    public const string Source = "R. J. Baxter, J. Phys. A 13, L61 (1980)";

    /// <summary>ln z_c, z_c = ((1 + sqrt 5)/2)^5.</summary>
    public static readonly double LogCritical = 5 * Math.Log((1 + Math.Sqrt(5)) / 2);

    // Within this distance of ln z_c nothing changes in double precision but the density, by 1e-10.
    private const double Touching = 4e-15;
    // ln z differs from ln z_c by about exp(-2/e), e = -ln|x|: less than a double tells.
    private const double Smallest = 0.04;

    /// <summary>ln kappa and the mean density at an activity z &gt; 0.</summary>
    public static (double LogKappa, double Density) At(double z)
    {
        double logZ = Math.Log(z);
        if (Math.Abs(logZ - LogCritical) < Touching)
            return (0.5 * Math.Log(27 * (25 + (11 * Math.Sqrt(5))) / 250), (5 - Math.Sqrt(5)) / 10);
        bool dense = logZ > LogCritical;
        double x = dense ? Math.Exp(-Solve(logZ, 1)) : -Math.Exp(-Solve(logZ, -1));
        return dense ? Dense(x) : Dilute(x);
    }

    private static (double LogKappa, double Density) Dilute(double x)
    {
        double logKappa = (3 * LogH(x)) + (2 * LogQ(Pow(x, 5))) - (2 * LogG(x))
            + Sum(x, 6, [2, 3, 3, 4], [1, 5, 6, 6]);
        double odd = LogQ(Pow(x, 3)) - LogQ(Pow(x, 6)) - LogQ(x) + LogQ(x * x);
        return (logKappa, -x * Math.Exp(LogG(x) + LogH(Pow(x, 6)) + odd));
    }

    private static (double LogKappa, double Density) Dense(double x)
    {
        double logKappa = (-Math.Log(x) / 3) + (3 * LogG(x)) + (2 * LogQ(Pow(x, 5))) - (2 * LogH(x))
            + Sum(x, 3, [1, 2], [3, 3]);
        double norm = LogH(x) + LogQ(x) - (2 * LogQ(Pow(x, 3)));
        double far = x * x * Math.Exp(norm + LogH(Pow(x, 9)) + LogQ(Pow(x, 9)));
        double difference = Math.Exp(norm + LogG(x) + LogQ(x));
        return (logKappa, far + (difference / 3));
    }

    // ln z falls with e = -ln|x| below z_c and rises above.
    private static double Solve(double logZ, int sign)
    {
        double low = Smallest, high = 800;
        for (int i = 0; i < 80; i++)
        {
            double middle = low + ((high - low) / 2), x = sign * Math.Exp(-middle);
            double value = sign * (middle + (5 * (LogG(x) - LogH(x))));
            if (sign * (value - logZ) < 0)
                low = middle;
            else
                high = middle;
        }
        return low + ((high - low) / 2);
    }

    private static double LogG(double x) => -Sum(x, 5, [1, 4], []);

    private static double LogH(double x) => -Sum(x, 5, [2, 3], []);

    private static double LogQ(double x) => Sum(x, 1, [1], []);

    // Sum of ln(1 - x^k) over k = period n + residue, n >= 0: residues above less residues below.
    private static double Sum(double x, int period, ReadOnlySpan<int> above, ReadOnlySpan<int> below)
    {
        double sum = 0;
        for (int k = 0; k == 0 || Math.Abs(Pow(x, k)) > 1e-18; k += period)
        {
            foreach (int residue in above)
                sum += Elementary.Log1P(-Pow(x, k + residue));
            foreach (int residue in below)
                sum -= Elementary.Log1P(-Pow(x, k + residue));
        }
        return sum;
    }

    private static double Pow(double x, int n) => (x < 0 && n % 2 == 1 ? -1 : 1) * Math.Pow(Math.Abs(x), n);
}
