namespace TensorRG.Models.Solutions;

/// <summary>
/// Square Ashkin-Teller model, E = -J sum (s s' + t t') - K sum s s' t t', parameters temperature, J, K. Solved for K = 0 (two Ising models), for J = 0
/// (one Ising model in the product s t), and on the self-dual line sinh(2J/T) = exp(-2K/T), J > 0, where ln Z per site = ln 2 - 2K/T + 2 ln w of the six-vertex model with
/// a = b = 1, c^2 = 1 + exp(4K/T) (F. Y. Wegner, J. Phys. C 5, L131, 1972; R. J. Baxter, "Exactly Solved Models in Statistical Mechanics" (1982), section 12.9).
/// The self-dual line is critical for K &lt;= J; K = J is the 4-state Potts model.
/// </summary>
internal sealed class KnownAshkinTeller : KnownSolution
{
    private const string Source = "F. Y. Wegner, J. Phys. C 5, L131 (1972); R. J. Baxter, Exactly Solved Models in Statistical Mechanics (1982), sec. 12.9";

    // A temperature this close is on the self-dual line: its decimal form may have lost a last digit.
    private const double Tolerance = 16 * Constants.Epsilon;

    /// <inheritdoc/>
    public override string Name => "ashkin-teller";

    /// <inheritdoc/>
    public override IReadOnlyList<ExactReference> References { get; } =
    [
        new(Quantity.LogZPerSite, "K = 0 or J = 0 at any T; sinh(2J/T) = exp(-2K/T), J > 0", Source),
        new(Quantity.EnergyPerSite, "K = 0 or J = 0 at any T", IsingSolution.OnsagerSource),
        new(Quantity.EntropyPerSite, "K = 0 or J = 0 at any T", IsingSolution.OnsagerSource),
        new(Quantity.SpecificHeatPerSite, "K = 0 or J = 0 at any T", IsingSolution.OnsagerSource),
        new(Quantity.SpontaneousMagnetisation, "K = 0 at any T: mean of s", IsingSolution.MagnetisationSource),
    ];

    /// <inheritdoc/>
    public override CriticalPoint CriticalTemperature(ParameterSet parameters)
    {
        double j = parameters["J"], k = parameters["K"];
        if (j == 0 && k == 0)
            return CriticalPoint.None("without couplings the spins are independent");
        if (j == 0 || k == 0)
            return CriticalPoint.At(IsingSolution.CriticalTemperature(j + k, j + k));
        if (!(j > 0) || k > j || k <= -j)
            return CriticalPoint.None("the transitions are known exactly for J > 0 and -J < K <= J alone, where they lie on the self-dual line");
        double value = k == j ? 4 * j / Math.Log(3) : SelfDual(j, k);
        return CriticalPoint.At(new ExactValue(value, 8 * Constants.Epsilon * value, Source, "root of sinh(2J/T) = exp(-2K/T)"));
    }

    /// <inheritdoc/>
    protected override ExactValue? Find(string quantity, ParameterSet parameters)
    {
        double j = parameters["J"], k = parameters["K"], t = parameters.Temperature;
        if (QuantityNames.Find(quantity) is not { } known)
            return null;
        if (k == 0 || j == 0)
            return Ising(known, j, k, t);
        bool dual = j > 0 && known == Quantity.LogZPerSite && k > -j && Math.Abs(t - SelfDual(j, k)) <= Tolerance * t;
        return dual ? OnSelfDualLine(k / t) : null;
    }

    private static ExactValue? Ising(Quantity quantity, double j, double k, double t)
    {
        ExactValue? ising = IsingSolution.At(t, j + k, j + k).Exact(quantity);
        if (ising is null || (k != 0 && quantity == Quantity.SpontaneousMagnetisation))
            return null;
        if (k == 0)
            return MappedValue.Shift(ising, quantity, 2, 0, t, "two independent Ising models");
        double free = quantity is Quantity.LogZPerSite or Quantity.EntropyPerSite ? Constants.Ln2 : 0;
        return ising with { Value = ising.Value + free, Note = $"one Ising model in s t, and a free spin; {ising.Note}" };
    }

    private static ExactValue OnSelfDualLine(double k)
    {
        ExactValue vertex = SixVertexSolution.LogZPerVertex(1, 1, Math.Sqrt(1 + Math.Exp(4 * k)));
        double value = Constants.Ln2 - (2 * k) + (2 * vertex.Value);
        return new ExactValue(value, 32 * Constants.Epsilon * Math.Max(1, Math.Abs(value) + Math.Abs(4 * k)), Source, $"ln 2 - 2K/T + 2 ln w of the six-vertex model; {vertex.Note}");
    }

    // g = 1 - exp(-2K) / sinh(2J) over all temperatures, as ln sinh(2J) + 2K, which rises with 1/T for K > -J.
    private static double SelfDual(double j, double k) => CriticalRoot.Solve(t => Distance(j / t, k / t), j);

    private static Jet Distance(double j, double k)
    {
        Jet twice = new(2 * j, 2 * j, 0);
        return Jet.Log(0.5 * Jet.OneMinusExpMinus(2 * twice)) + twice + new Jet(2 * k, 2 * k, 0);
    }
}
