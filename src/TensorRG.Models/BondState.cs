using System.Collections.Immutable;

namespace TensorRG.Models;

/// <summary>One basis state of a bond of the network.</summary>
/// <param name="Label">What the state is, for people.</param>
/// <param name="Charge">Its charge, one component for each factor of the group; empty for the trivial group.</param>
public sealed record BondState(string Label, ImmutableArray<int> Charge);
