using TensorRG.Models.Solutions;

namespace TensorRG.Models;

/// <summary>Square-lattice q-state clock model, s = 0..q-1: E = -J sum cos(2 pi (s - s') / q) over nearest neighbours.</summary>
public sealed class ClockModel : Model
{
    /// <inheritdoc/>
    public override string Name => "clock";

    /// <inheritdoc/>
    public override string Title => "q-state clock model on the square lattice";

    /// <inheritdoc/>
    public override string Description =>
        "Spins that point in one of q directions in a plane, on the square lattice with E = -J sum cos(2 pi (s - s')/q) over nearest neighbours. "
        + "q = 2 is the Ising model, q = 3 the 3-state Potts model, q = 4 two independent Ising models; for q >= 5 a critical phase "
        + "lies between two Kosterlitz-Thouless transitions.";

    /// <inheritdoc/>
    public override string Lattice => "square";

    /// <inheritdoc/>
    public override int SitesPerVertex => 1;

    /// <inheritdoc/>
    public override string Symmetry => "Z_q (rotation by one step)";

    /// <inheritdoc/>
    public override IReadOnlyList<ParameterDefinition> Parameters { get; } =
    [
        ParameterDefinition.Temperature(1),
        ParameterDefinition.States(6),
        ParameterDefinition.Energy("J", 1, "Coupling of nearest neighbours; positive favours parallel spins"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<ExactReference> ExactReferences { get; } =
    [
        new(Quantity.LogZPerSite, "q = 2 and 4 at any T and J; q = 3 at the transition, J > 0", ClockSolution.Source),
        new(Quantity.EnergyPerSite, "q = 2 and 4 at any T and J; q = 3 at the transition, J > 0", ClockSolution.Source),
        new(Quantity.LatentHeat, "q = 3, J > 0, whatever the temperature given: 0", PottsSolution.Source),
        new(Quantity.SpecificHeatPerSite, "q = 2 and 4 at any T and J", IsingSolution.OnsagerSource),
        new(Quantity.SpontaneousMagnetisation, "q = 2 and 4 at any T and J: length of the mean spin", IsingSolution.MagnetisationSource),
    ];

    /// <inheritdoc/>
    protected override CriticalPoint FindCriticalTemperature(ParameterSet parameters)
    {
        int q = parameters.WholeNumber("q");
        double j = parameters["J"];
        return (q, j) switch
        {
            (_, 0) => CriticalPoint.None("with J = 0 the spins are independent"),
            ( >= 5, _) => CriticalPoint.None("for q >= 5 the two Kosterlitz-Thouless transitions are not known exactly"),
            (3, < 0) => CriticalPoint.None("the antiferromagnetic 3-state model (J < 0) does not order above zero temperature"),
            _ => CriticalPoint.At(ClockSolution.CriticalTemperature(q, j)),
        };
    }

    /// <inheritdoc/>
    protected override VertexNetwork BuildNetwork(ParameterSet parameters)
    {
        int q = parameters.WholeNumber("q");
        ClockWeights weights = ClockWeights.At(q, parameters["J"] / parameters.Temperature);
        return CyclicNetwork.Graded(weights.Ratios, weights.Ratios, (2 * weights.LogLargest) - Math.Log(q));
    }

    /// <inheritdoc/>
    protected override ExactValue? FindExact(Quantity quantity, ParameterSet parameters)
        => ClockSolution.Exact(quantity, parameters.WholeNumber("q"), parameters.Temperature, parameters["J"]);
}
