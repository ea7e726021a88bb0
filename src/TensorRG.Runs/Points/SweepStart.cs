using System.Collections.Immutable;

namespace TensorRG.Runs.Points;

/// <summary>What a call begins from.</summary>
/// <param name="Done">Points that were stored before.</param>
/// <param name="Count">Points in all.</param>
/// <param name="Notices">Point files that were damaged and are computed again, in sentences.</param>
public sealed record SweepStart(int Done, int Count, ImmutableArray<string> Notices);
