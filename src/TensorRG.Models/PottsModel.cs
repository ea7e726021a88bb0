using TensorRG.Models.Solutions;

namespace TensorRG.Models;

/// <summary>Square-lattice q-state Potts model, s = 0..q-1: E = -J sum delta(s, s') over nearest neighbours.</summary>
public sealed class PottsModel : Model
{
    private readonly KnownPottsSquare solution = new();

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
    public override IReadOnlyList<ExactReference> ExactReferences => solution.References;

    /// <inheritdoc/>
    protected override CriticalPoint FindCriticalTemperature(ParameterSet parameters) => solution.CriticalTemperature(parameters);

    /// <inheritdoc/>
    protected override VertexNetwork BuildNetwork(ParameterSet parameters) => solution.Network(parameters)!;

    /// <inheritdoc/>
    protected override ExactValue? FindExact(Quantity quantity, ParameterSet parameters)
        => solution.Exact(QuantityNames.Name(quantity), parameters);
}
