using TensorRG.CoarseGraining;
using TensorRG.Models;
using TensorRG.Physics;
using TensorRG.Runs;
using TensorRG.Tensors.Kernels;

namespace TensorRG.Cli.Execution;

/// <summary>A completed run as the output shows it.</summary>
/// <param name="Folder">The run.</param>
/// <param name="Parameters">Model parameters.</param>
/// <param name="Scheme">Scheme.</param>
/// <param name="Records">All records.</param>
/// <param name="Summary">What they say.</param>
/// <param name="Backend">The backend that ran.</param>
/// <param name="Threads">Threads it had.</param>
/// <param name="Seconds">Wall-clock time of this call.</param>
/// <param name="StepsDone">Steps done in this call; 0 if the run had been completed before.</param>
internal sealed record RunReport(
    RunFolder Folder,
    ParameterSet Parameters,
    SchemeDefinition Scheme,
    IReadOnlyList<StepRecord> Records,
    FlowSummary Summary,
    Backend Backend,
    int Threads,
    double Seconds,
    int StepsDone)
{
    /// <summary>Time spent in steps, over all calls that worked on the run; unknown times count as nothing.</summary>
    public double StepSeconds => Records.Where(static r => double.IsFinite(r.Seconds)).Sum(static r => r.Seconds);
}
