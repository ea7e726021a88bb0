using TensorRG.CoarseGraining;

namespace TensorRG.Runs;

/// <summary>How to drive a run: nothing here changes a number.</summary>
public sealed record RunOptions
{
    /// <summary>When to store checkpoints; null for the default policy.</summary>
    public CheckpointPolicy? Checkpoints { get; init; }

    /// <summary>Called once before the first step with what the run begins from. Not called for a finished run.</summary>
    public Action<RunStart>? Started { get; init; }

    /// <summary>Called after each step with its record.</summary>
    public Action<StepRecord>? StepDone { get; init; }
}
