namespace TensorRG.Models.Solutions;

/// <summary>
/// The ferromagnetic square Potts model at its transition, exp(J/T) = 1 + sqrt q, where N sites are equivalent to a
/// six-vertex model of 2N vertices with a = b = 1 and c^2 = 2 + sqrt q: ln Z per site = ln(q)/2 + 2 ln w
/// (R. J. Baxter, J. Phys. C 6, L445, 1973); and the two-state model, which is the Ising model with coupling J/2, at any
/// temperature.
/// </summary>
internal static class PottsSolution
{
    public const string Source = "R. J. Baxter, J. Phys. C 6, L445 (1973); R. B. Potts, Proc. Camb. Phil. Soc. 48, 106 (1952)";

    // A temperature within this relative distance is the critical one: its decimal form may have lost a last digit.
    private const double Tolerance = 4 * Constants.Epsilon;

    /// <summary>J / ln(1 + sqrt q).</summary>
    public static ExactValue CriticalTemperature(int q, double j)
    {
        double value = j / Elementary.Log1P(Math.Sqrt(q));
        return new ExactValue(value, 3 * Constants.Epsilon * value, Source, "J / ln(1 + sqrt q)");
    }

    /// <summary>A quantity at the transition for J &gt; 0, or null where it is unknown or T is another temperature.</summary>
    public static ExactValue? AtTransition(Quantity quantity, int q, double t, double j)
    {
        if (quantity == Quantity.LatentHeat)
            return Value(LatentHeat(q, j), "2J (1 + q^-1/2) tanh(theta/2) prod tanh^2(n theta), 2 cosh theta = sqrt q; 0 for q <= 4");
        double critical = CriticalTemperature(q, j).Value;
        if (!(Math.Abs(t - critical) <= Tolerance * critical))
            return null;
        return quantity switch
        {
            Quantity.LogZPerSite => Value(LogZ(q), "ln(q)/2 + 2 ln w of the equivalent six-vertex model"),
            Quantity.EnergyPerSite => Value(-j * (1 + (1 / Math.Sqrt(q))), q > 4 ? "-J (1 + q^-1/2), the mean of the two phases" : "-J (1 + q^-1/2)"),
            _ => null,
        };
    }

    /// <summary>q = 2 at any temperature: E is that of the Ising model with coupling J/2, less J per site.</summary>
    public static ExactValue? TwoStates(Quantity quantity, double t, double j)
    {
        ExactValue? ising = IsingSolution.At(t, j / 2, j / 2).Exact(quantity);
        return ising is null ? null : MappedValue.Shift(ising, quantity, 1, j, t, "the Ising model with coupling J/2");
    }

    private static double LogZ(int q)
        => (Math.Log(q) / 2) + (2 * SixVertexSolution.LogZPerVertex(1, 1, Math.Sqrt(2 + Math.Sqrt(q))).Value);

    private static double LatentHeat(int q, double j)
    {
        if (q <= 4)
            return 0;
        double root = Math.Sqrt(q), theta = Math.Log((root + Math.Sqrt(q - 4.0)) / 2);
        double product = Math.Tanh(theta / 2);
        for (int n = 1; n * theta < 20; n++)
            product *= Math.Tanh(n * theta) * Math.Tanh(n * theta);
        return 2 * j * (1 + (1 / root)) * product;
    }

    private static ExactValue Value(double value, string note)
        => new(value, 16 * Constants.Epsilon * Math.Max(1, Math.Abs(value)), Source, note);
}
