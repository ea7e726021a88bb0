using System.Collections.Immutable;

namespace TensorRG.Models.Lattices;

/// <summary>
/// A quantity that is a sum of local terms, O = sum over clusters of o(variables). Its value is &lt;O&gt; / N, N the number
/// of sites (of vertices where the variables sit on edges).
/// </summary>
/// <param name="Name">Name on the command line: lower case, no spaces.</param>
/// <param name="Meaning">What it is, in one line.</param>
/// <param name="Unit">Unit in words; "none" for a pure number.</param>
/// <param name="Terms">The terms, at least one.</param>
public sealed record LocalObservable(string Name, string Meaning, string Unit, ImmutableArray<ClusterTable> Terms)
{
    /// <summary>
    /// Terms carry the sign (-1)^(x + y) of the cell they are counted in; on the honeycomb lattice instead + on a and - on b, for terms on single sites.
    /// </summary>
    public bool IsStaggered { get; init; }

    /// <summary>The quantity that tells the ordered phases apart: a small field on it breaks the symmetry.</summary>
    public bool IsOrderParameter { get; init; }
}
