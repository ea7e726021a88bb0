using System.Collections.Immutable;
using System.Numerics;

namespace TensorRG.Models.Lattices;

/// <summary>A function of the variables of one kind of cluster, as a table; it counts on every such cluster of the lattice.</summary>
/// <param name="Cluster">Where.</param>
/// <param name="Values">
/// q^n values for n variables of q states, row-major: the state of the last variable runs fastest. A logarithm of a weight
/// may have real part minus infinity: that configuration is excluded.
/// </param>
public sealed record ClusterTable(Cluster Cluster, ImmutableArray<Complex> Values);
