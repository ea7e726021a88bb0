using TensorRG.Models.Solutions;

namespace TensorRG.Models;

/// <summary>
/// Six-vertex model on the square lattice: an arrow on every bond, two in and two out at every vertex.
/// In the line representation a leg is occupied (1) where its arrow differs from the reference state (all arrows down and
/// right): u + l = d + r. Weights: a for no line or all four legs occupied (0000, 1111); b for one line going straight on
/// (u = d, l = r, u not l); c for one line that turns (u = r, l = d, u not l).
/// a, b and c are the weights of vertices 1-2, 3-4 and 5-6 in the numbering of R. J. Baxter, "Exactly Solved Models in
/// Statistical Mechanics" (1982), chapter 8.
/// </summary>
public sealed class SixVertexModel : Model
{
    private readonly KnownSixVertex solution = new();

    /// <inheritdoc/>
    public override string Name => "six-vertex";

    /// <inheritdoc/>
    public override string Title => "six-vertex model (square ice)";

    /// <inheritdoc/>
    public override string Description =>
        "Arrows on the bonds of the square lattice, two in and two out at every vertex (the ice rule), with weights a, b, c for the three pairs of "
        + "arrow-reversed vertices: a where the two horizontal and the two vertical arrows go straight on in the reference sense or both against it, b where "
        + "they go straight on in opposite senses, c where they turn. Z = sum of products of weights; a = b = c = 1 is square ice. "
        + "Delta = (a^2 + b^2 - c^2) / (2ab) tells the phase: critical for -1 <= Delta < 1, frozen for Delta >= 1, antiferroelectric for Delta < -1. "
        + "A site is a vertex.";

    /// <inheritdoc/>
    public override string Lattice => "square (arrows on the bonds)";

    /// <inheritdoc/>
    public override int SitesPerVertex => 1;

    /// <inheritdoc/>
    public override string Symmetry => "U(1), the number of lines through a cut";

    /// <inheritdoc/>
    public override IReadOnlyList<ParameterDefinition> Parameters { get; } =
    [
        Weight("a", "Weight of a vertex whose arrows all follow the reference sense, or all oppose it"),
        Weight("b", "Weight of a vertex whose arrows go straight on, one pair with and one against the reference sense"),
        Weight("c", "Weight of a vertex whose arrows turn"),
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

    private static ParameterDefinition Weight(string name, string meaning) => new()
    {
        Name = name,
        Symbol = name,
        Meaning = meaning,
        Unit = "none (a Boltzmann weight)",
        Default = 1,
        Minimum = 1e-6,
        Maximum = 1e6,
    };
}
