namespace TensorRG.Models.Solutions;

/// <summary>Square Potts model, parameters temperature, q and J: see <see cref="PottsSolution"/>.</summary>
internal sealed class KnownPottsSquare : KnownSolution
{
    /// <inheritdoc/>
    public override string Name => "potts-square";

    /// <inheritdoc/>
    public override IReadOnlyList<ExactReference> References { get; } =
    [
        new(Quantity.LogZPerSite, "at the transition, J > 0; for q = 2 at any T and J", PottsSolution.Source),
        new(Quantity.EnergyPerSite, "at the transition, J > 0 (mean of the two phases for q > 4); for q = 2 at any T and J", PottsSolution.Source),
        new(Quantity.EntropyPerSite, "at the transition, J > 0 (mean of the two phases for q > 4); for q = 2 at any T and J", PottsSolution.Source),
        new(Quantity.LatentHeat, "J > 0, whatever the temperature given", PottsSolution.Source),
        new(Quantity.SpecificHeatPerSite, "q = 2, any T and J", IsingSolution.OnsagerSource),
        new(Quantity.SpontaneousMagnetisation, "q = 2, any T and J: (q rho - 1)/(q - 1), rho the share of the favoured state", IsingSolution.MagnetisationSource),
    ];

    /// <inheritdoc/>
    public override CriticalPoint CriticalTemperature(ParameterSet parameters)
    {
        int q = parameters.WholeNumber("q");
        double j = parameters["J"];
        if (q == 2 && j != 0)
            return CriticalPoint.At(IsingSolution.CriticalTemperature(j / 2, j / 2));
        if (j == 0)
            return CriticalPoint.None("with J = 0 the spins are independent");
        return j > 0
            ? CriticalPoint.At(PottsSolution.CriticalTemperature(q, j))
            : CriticalPoint.None("the antiferromagnetic Potts model (J < 0) with q > 2 has no ordering transition above zero temperature that is known exactly");
    }

    /// <inheritdoc/>
    public override VertexNetwork? Network(ParameterSet parameters)
    {
        int q = parameters.WholeNumber("q");
        double k = parameters["J"] / parameters.Temperature;
        double[] ratios = [1, .. Enumerable.Repeat(Ratio(q, k), q - 1)];
        return CyclicNetwork.Graded(ratios, ratios, (2 * LogLargest(q, k)) - Math.Log(q));
    }

    /// <inheritdoc/>
    protected override ExactValue? Find(string quantity, ParameterSet parameters)
    {
        if (QuantityNames.Find(quantity) is not { } known)
            return null;
        int q = parameters.WholeNumber("q");
        double j = parameters["J"], t = parameters.Temperature;
        if (q == 2 && known != Quantity.LatentHeat)
            return PottsSolution.TwoStates(known, t, j);
        return j > 0 ? PottsSolution.AtTransition(known, q, t, j) : null;
    }

    // lambda_k / lambda_0 = (e^K - 1) / (e^K + q - 1) for k > 0, in the form that does not overflow.
    private static double Ratio(int q, double k) => k > 0
        ? -Elementary.ExpM1(-k) / (1 + ((q - 1) * Math.Exp(-k)))
        : Elementary.ExpM1(k) / (Math.Exp(k) + q - 1);

    private static double LogLargest(int q, double k) => k > 0
        ? k + Elementary.Log1P((q - 1) * Math.Exp(-k))
        : Math.Log(Math.Exp(k) + q - 1);
}
