using System.Collections.Immutable;

namespace TensorRG.Runs.Points;

/// <summary>One axis of a grid.</summary>
/// <param name="Name">Name of the parameter, or of a shorthand that sets several.</param>
/// <param name="Parameters">Full names of the parameters that it sets.</param>
/// <param name="Values">The values in the order in which the grid takes them; at least one, all different.</param>
public sealed record SweepAxis(string Name, ImmutableArray<string> Parameters, ImmutableArray<double> Values);
