using System.Collections.Immutable;

namespace TensorRG.Runs.Points;

/// <summary>What a call of <see cref="SweepDriver.Run"/> came to.</summary>
/// <param name="Status">Completed, or stopped and resumable.</param>
/// <param name="Done">Points that are stored now.</param>
/// <param name="Computed">Points that this call measured.</param>
/// <param name="Points">All points in order; empty if stopped.</param>
public sealed record SweepOutcome(RunStatus Status, int Done, int Computed, ImmutableArray<PointResult> Points);
