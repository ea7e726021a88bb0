using TensorRG.CoarseGraining;

namespace TensorRG.Runs;

/// <summary>What a run begins from.</summary>
/// <param name="Step">Completed steps: 0, or those of the checkpoint it resumes from.</param>
/// <param name="Records">The records so far, step 0 to <paramref name="Step"/>, times included (NaN where unknown).</param>
/// <param name="Notices">What a user should know, such as a damaged checkpoint that was passed over.</param>
public sealed record RunStart(int Step, IReadOnlyList<StepRecord> Records, IReadOnlyList<string> Notices);
