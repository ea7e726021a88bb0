using TensorRG.Models.Solutions;

namespace TensorRG.Models;

/// <summary>Square-lattice q-state Potts model, s = 0..q-1: E = -J sum delta(s, s') over nearest neighbours.</summary>
public sealed class PottsModel : Model
{
    /// <inheritdoc/>
    public override string Name => "potts";

    /// <inheritdoc/>
    public override string Title => "q-state Potts model on the square lattice";

    /// <inheritdoc/>
    public override string Description =>
        "Spins with q states on the square lattice with E = -J sum delta(s,s') over nearest neighbours. For J > 0 it orders at "
        + "T = J / ln(1 + sqrt q): continuously for q <= 4, with a latent heat for q > 4. For q = 2 it is the Ising model with coupling J/2.";

    /// <inheritdoc/>
    public override string Lattice => "square";

    /// <inheritdoc/>
    public override int SitesPerVertex => 1;

    /// <inheritdoc/>
    public override string Symmetry => "Z_q, the cyclic part of the permutations S_q";

    /// <inheritdoc/>
    public override IReadOnlyList<ParameterDefinition> Parameters { get; } =
    [
        ParameterDefinition.Temperature(1),
        ParameterDefinition.States(3),
        ParameterDefinition.Energy("J", 1, "Coupling of nearest neighbours; positive favours equal states"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<ExactReference> ExactReferences { get; } =
    [
        new(Quantity.LogZPerSite, "at the transition, J > 0; for q = 2 at any T and J", PottsSolution.Source),
        new(Quantity.EnergyPerSite, "at the transition, J > 0 (mean of the two phases for q > 4); for q = 2 at any T and J", PottsSolution.Source),
        new(Quantity.LatentHeat, "J > 0, whatever the temperature given", PottsSolution.Source),
        new(Quantity.SpecificHeatPerSite, "q = 2, any T and J", IsingSolution.OnsagerSource),
        new(Quantity.SpontaneousMagnetisation, "q = 2, any T and J: (q rho - 1)/(q - 1), rho the share of the favoured state", IsingSolution.MagnetisationSource),
    ];

    /// <inheritdoc/>
    protected override CriticalPoint FindCriticalTemperature(ParameterSet parameters)
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
    protected override VertexNetwork BuildNetwork(ParameterSet parameters)
    {
        int q = parameters.WholeNumber("q");
        double k = parameters["J"] / parameters.Temperature;
        double[] ratios = [1, .. Enumerable.Repeat(Ratio(q, k), q - 1)];
        return CyclicNetwork.Graded(ratios, ratios, (2 * LogLargest(q, k)) - Math.Log(q));
    }

    /// <inheritdoc/>
    protected override ExactValue? FindExact(Quantity quantity, ParameterSet parameters)
    {
        int q = parameters.WholeNumber("q");
        double j = parameters["J"], t = parameters.Temperature;
        if (q == 2 && quantity != Quantity.LatentHeat)
            return PottsSolution.TwoStates(quantity, t, j);
        return j > 0 ? PottsSolution.AtTransition(quantity, q, t, j) : null;
    }

    // lambda_k / lambda_0 = (e^K - 1) / (e^K + q - 1) for k > 0, in the form that does not overflow.
    private static double Ratio(int q, double k) => k > 0
        ? -Elementary.ExpM1(-k) / (1 + ((q - 1) * Math.Exp(-k)))
        : Elementary.ExpM1(k) / (Math.Exp(k) + q - 1);

    private static double LogLargest(int q, double k) => k > 0
        ? k + Elementary.Log1P((q - 1) * Math.Exp(-k))
        : Math.Log(Math.Exp(k) + q - 1);
}
