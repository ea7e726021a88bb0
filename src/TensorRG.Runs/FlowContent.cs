using TensorRG.CoarseGraining;

namespace TensorRG.Runs;

/// <summary>What could be read of a flow.csv.</summary>
/// <param name="Records">The rows from the top down to the first defect.</param>
/// <param name="Defect">What is wrong behind them; null if the file is good.</param>
internal sealed record FlowContent(IReadOnlyList<StepRecord> Records, string? Defect);
