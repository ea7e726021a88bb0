using System.Collections.Immutable;

namespace TensorRG.Models.Lattices.Bonds;

/// <summary>The bases of the two bonds with their symmetry.</summary>
/// <param name="Vertical">Basis of u and d.</param>
/// <param name="Horizontal">Basis of l and r.</param>
/// <param name="Orders">Orders of the group's factors, 0 for U(1).</param>
/// <param name="Symmetry">The group in words.</param>
internal sealed record GradedVertex(LegBasis Vertical, LegBasis Horizontal, ImmutableArray<int> Orders, string Symmetry)
{
    /// <summary>Where the group permutes the states of a variable, its generators: element s is the state that s goes to.</summary>
    public ImmutableArray<int[]> Permutations { get; init; } = [];
}
