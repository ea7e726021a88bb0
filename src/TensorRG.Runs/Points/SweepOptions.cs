using System.Collections.Immutable;

namespace TensorRG.Runs.Points;

/// <summary>How to carry out a sweep: nothing here changes a number. Callbacks never overlap.</summary>
public sealed record SweepOptions
{
    /// <summary>Points worked on at the same time, each with a measurer of its own; at least 1.</summary>
    public int Concurrency { get; init; } = 1;

    /// <summary>Called once before the first point.</summary>
    public Action<SweepStart>? Started { get; init; }

    /// <summary>Called after each point once it is stored, in the order of completion.</summary>
    public Action<int, PointResult>? PointDone { get; init; }

    /// <summary>Called with all points in order when all are there, while the folder is still locked: the place to write tables and figures.</summary>
    public Action<ImmutableArray<PointResult>>? Completed { get; init; }
}
