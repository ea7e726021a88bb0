namespace TensorRG.Models.Solutions;

/// <summary>Eight-vertex model, parameters a, b, c, d (weights that are not negative): see <see cref="EightVertexSolution"/>.</summary>
internal sealed class KnownEightVertex : KnownSolution
{
    /// <inheritdoc/>
    public override string Name => "eight-vertex";

    /// <inheritdoc/>
    public override IReadOnlyList<ExactReference> References { get; } =
        [new(Quantity.LogZPerSite, "a, b, c, d >= 0, not all zero (per vertex)", EightVertexSolution.Source)];

    /// <inheritdoc/>
    protected override ExactValue? Find(string quantity, ParameterSet parameters)
    {
        double[] w = [parameters["a"], parameters["b"], parameters["c"], parameters["d"]];
        return quantity == "ln-z" && w.All(v => v >= 0) && w.Any(v => v > 0) ? EightVertexSolution.LogZPerVertex(w[0], w[1], w[2], w[3]) : null;
    }
}
