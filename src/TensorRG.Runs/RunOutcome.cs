using System.Text.Json.Nodes;

namespace TensorRG.Runs;

/// <summary>What a call of <see cref="RunDriver.Run"/> came to.</summary>
public sealed record RunOutcome
{
    /// <summary>Completed, or stopped and resumable.</summary>
    public required RunStatus Status { get; init; }

    /// <summary>Completed steps.</summary>
    public required int Step { get; init; }

    /// <summary>Steps done by this call; 0 where the stored result was given at once.</summary>
    public required int StepsDone { get; init; }

    /// <summary>The result; null if stopped.</summary>
    public JsonObject? Result { get; init; }

    /// <summary>Time this call spent on storing checkpoints and flow.csv, in seconds.</summary>
    public double CheckpointSeconds { get; init; }
}
