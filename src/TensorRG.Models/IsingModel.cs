using TensorRG.Models.Solutions;

namespace TensorRG.Models;

/// <summary>
/// Square-lattice Ising model, spins s = +1, -1:
/// E = -Jx sum s s' over horizontal bonds - Jy sum s s' over vertical bonds - h sum s.
/// </summary>
public sealed class IsingModel : Model
{
    private readonly KnownIsingSquare solution = new();

    /// <inheritdoc/>
    public override string Name => "ising";

    /// <inheritdoc/>
    public override string Title => "Ising model on the square lattice";

    /// <inheritdoc/>
    public override string Description =>
        "Spins s = +1 or -1 on the square lattice with E = -Jx sum s s' (horizontal bonds) - Jy sum s s' (vertical bonds) - h sum s. "
        + "Without a field it orders below the temperature where sinh(2|Jx|/T) sinh(2|Jy|/T) = 1; negative couplings order antiferromagnetically.";

    /// <inheritdoc/>
    public override string Lattice => "square";

    /// <inheritdoc/>
    public override int SitesPerVertex => 1;

    /// <inheritdoc/>
    public override string Symmetry => "Z2 (spin flip) for h = 0, none otherwise";

    /// <inheritdoc/>
    public override IReadOnlyList<ParameterDefinition> Parameters { get; } =
    [
        ParameterDefinition.Temperature(2.269185314213022),
        ParameterDefinition.Energy("Jx", 1, "Coupling of horizontal neighbours; positive is ferromagnetic"),
        ParameterDefinition.Energy("Jy", 1, "Coupling of vertical neighbours; positive is ferromagnetic"),
        ParameterDefinition.Energy("h", 0, "Magnetic field"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<ParameterShorthand> Shorthands { get; } =
        [new("J", ["Jx", "Jy"], "Sets Jx and Jy to the same value")];

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
