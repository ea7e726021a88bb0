using System.Text.Json.Nodes;
using TensorRG.CoarseGraining;

namespace TensorRG.Runs;

/// <summary>
/// Carries a run to its last step: begins or resumes from the newest good checkpoint, stores checkpoints on the way,
/// and writes the result. Killing the process at any instant and calling again gives the same result.json, final
/// checkpoint and flow.csv (times apart), bit by bit.
/// </summary>
public static class RunDriver
{
    /// <summary>Runs until the end or until stopped. A finished run gives its stored result at once, without a flow.</summary>
    /// <param name="run">The folder.</param>
    /// <param name="createFlow">Makes the computation at step 0 from the inputs of the run.</param>
    /// <param name="summarize">
    /// Makes the result from the flow after the last step. It must depend on the flow alone: no time, no thread count,
    /// no random number; numbers must be finite.
    /// </param>
    /// <param name="options">Checkpoint policy and callbacks; null for the defaults.</param>
    /// <param name="stop">
    /// Asks to stop: looked at between steps; the state is stored before <see cref="RunStatus.Stopped"/> is returned.
    /// </param>
    /// <exception cref="RunStoreException">The folder is in use, cannot be written, or no checkpoint is good. What was
    /// stored before stays usable.</exception>
    /// <exception cref="ArithmeticException">A step failed. flow.csv holds the records up to it.</exception>
    /// <exception cref="SnapshotException">A verified checkpoint does not fit the flow that was made.</exception>
    public static RunOutcome Run(
        RunFolder run,
        Func<IFlow> createFlow,
        Func<IFlow, JsonObject> summarize,
        RunOptions? options = null,
        CancellationToken stop = default)
    {
        ArgumentNullException.ThrowIfNull(run);
        ArgumentNullException.ThrowIfNull(createFlow);
        ArgumentNullException.ThrowIfNull(summarize);
        if (Finished(run) is { } earlier)
            return earlier;
        using IDisposable held = run.Files.Lock(run.Path);

        // Another process may have finished the run before the lock was taken.
        return Finished(run) ?? new RunSession(run, createFlow(), options ?? new()).Run(summarize, stop);
    }

    private static RunOutcome? Finished(RunFolder run)
    {
        try
        {
            return run.ReadResult() is { } result
                ? new RunOutcome { Status = RunStatus.Completed, Step = run.Inputs.Steps, StepsDone = 0, Result = result }
                : null;
        }
        catch (RunStoreException damaged) when (damaged.Problem == RunStoreProblem.Damaged)
        {
            // The last checkpoint gives the same result again.
            return null;
        }
    }
}
