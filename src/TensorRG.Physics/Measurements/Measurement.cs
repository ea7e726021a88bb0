using System.Collections.Immutable;

namespace TensorRG.Physics.Measurements;

/// <summary>The numbers of one measurement, and what a reader must know about how they were made.</summary>
/// <param name="Values">In the order in which they were asked for.</param>
/// <param name="Remarks">Sentences: network form, symmetry, how order was obtained, what did not converge.</param>
public sealed record Measurement(ImmutableArray<Measured> Values, ImmutableArray<string> Remarks);
