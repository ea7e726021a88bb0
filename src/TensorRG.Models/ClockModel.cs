using TensorRG.Models.Solutions;

namespace TensorRG.Models;

/// <summary>Square-lattice q-state clock model, s = 0..q-1: E = -J sum cos(2 pi (s - s') / q) over nearest neighbours.</summary>
public sealed class ClockModel : Model
{
    private readonly KnownClockSquare solution = new();

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
    public override IReadOnlyList<ExactReference> ExactReferences => solution.References;

    /// <inheritdoc/>
    protected override CriticalPoint FindCriticalTemperature(ParameterSet parameters) => solution.CriticalTemperature(parameters);

    /// <inheritdoc/>
    protected override VertexNetwork BuildNetwork(ParameterSet parameters) => solution.Network(parameters)!;

    /// <inheritdoc/>
    protected override ExactValue? FindExact(Quantity quantity, ParameterSet parameters)
        => solution.Exact(QuantityNames.Name(quantity), parameters);
}
