namespace TensorRG.CoarseGraining;

/// <summary>
/// A coarse-graining computation that advances step by step and can be saved and restored between steps. The same
/// inputs give the same bits, whether or not it was saved and restored on the way.
/// </summary>
public interface IFlow
{
    /// <summary>Completed steps.</summary>
    int Step { get; }

    /// <summary>One record for each state from the initial network (step 0) to the present one.</summary>
    IReadOnlyList<StepRecord> Records { get; }

    /// <summary>Does one step and returns its record.</summary>
    /// <exception cref="ArithmeticException">The step failed: a decomposition did not converge, or Z vanished or overflowed.</exception>
    StepRecord Advance();

    /// <summary>
    /// The complete state between steps, records included but without their times: it depends on the inputs alone. Restored
    /// records carry NaN as time.
    /// </summary>
    Snapshot Save();

    /// <summary>Replaces the state by a saved one.</summary>
    /// <param name="snapshot">A snapshot of the same computation.</param>
    /// <exception cref="SnapshotException">The snapshot does not fit.</exception>
    void Restore(Snapshot snapshot);
}
