using System.Collections.Immutable;

namespace TensorRG.Models.Lattices;

/// <summary>
/// A model with all numbers filled in, as tables: Z = sum over configurations of prod over sites exp(LogMeasure) times
/// prod over clusters exp(LogWeights). Every site (or edge) has the same q states.
/// </summary>
public sealed record LatticeSystem
{
    /// <summary>The lattice.</summary>
    public required LatticeKind Lattice { get; init; }

    /// <summary>The q states of one variable, for people.</summary>
    public required ImmutableArray<string> StateLabels { get; init; }

    /// <summary>True if the variables sit on the edges, with <see cref="Cluster.Vertex"/> terms alone.</summary>
    public bool OnEdges { get; init; }

    /// <summary>
    /// Logarithm of the weight that a sum over states carries by itself, one for each state: 0 for counting, the quadrature weight for a real variable.
    /// It is no part of the energy or of the weights that the entropy knows.
    /// </summary>
    public required ImmutableArray<double> LogMeasure { get; init; }

    /// <summary>Logarithms of the weights, -E/T where there is a temperature. Several tables on the same cluster add up.</summary>
    public required ImmutableArray<ClusterTable> LogWeights { get; init; }

    /// <summary>What can be measured, the energy included where there is one.</summary>
    public required ImmutableArray<LocalObservable> Observables { get; init; }

    /// <summary>Number of states of one variable.</summary>
    public int States => StateLabels.Length;

    /// <summary>Sites in a cell; vertices where the variables sit on edges.</summary>
    public int SitesPerCell => Lattice switch
    {
        LatticeKind.Honeycomb => 2,
        LatticeKind.Kagome => 3,
        _ => 1,
    };

    /// <summary>True if no logarithm has an imaginary part, so that all weights are real and not negative.</summary>
    public bool HasPositiveWeights => LogWeights.All(static t => t.Values.All(static v => v.Imaginary == 0));
}
