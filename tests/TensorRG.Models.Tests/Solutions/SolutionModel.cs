namespace TensorRG.Models.Tests.Solutions;

/// <summary>A model with nothing but parameters, to ask an exact solution with.</summary>
internal sealed class SolutionModel(params string[] names) : Model
{
    public override string Name => "solution";

    public override string Title => "solution";

    public override string Description => "solution";

    public override string Lattice => "square";

    public override int SitesPerVertex => 1;

    public override string Symmetry => "none";

    public override IReadOnlyList<ParameterDefinition> Parameters { get; } =
        [.. names.Select(n => n == "T" ? ParameterDefinition.Temperature(1) with { DefaultsToCritical = false } : ParameterDefinition.Energy(n, 0, "a number"))];

    public override IReadOnlyList<ExactReference> ExactReferences => [];

    protected override CriticalPoint FindCriticalTemperature(ParameterSet parameters) => CriticalPoint.None("this is no model");

    protected override VertexNetwork BuildNetwork(ParameterSet parameters) => throw new NotSupportedException();

    protected override ExactValue? FindExact(Quantity quantity, ParameterSet parameters) => null;
}
