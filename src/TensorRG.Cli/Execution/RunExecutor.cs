using System.Diagnostics;
using TensorRG.Cli.Output;
using TensorRG.CoarseGraining;
using TensorRG.Models;
using TensorRG.Physics;
using TensorRG.Runs;
using TensorRG.Tensors.Kernels;

namespace TensorRG.Cli.Execution;

/// <summary>Carries out one run, new or resumed.</summary>
internal static class RunExecutor
{
    /// <summary>Runs to the end or to a stop signal.</summary>
    /// <param name="folder">The run.</param>
    /// <param name="backend">The backend of the run's inputs.</param>
    /// <param name="threads">Threads it has.</param>
    /// <param name="display">Shows progress.</param>
    /// <param name="stop">Asks to stop.</param>
    /// <returns>The report, or null if the run was stopped; it can be resumed.</returns>
    public static RunReport? Execute(RunFolder folder, Backend backend, int threads, IStepDisplay display, CancellationToken stop)
    {
        long start = Stopwatch.GetTimestamp();
        folder.RequireNumericsVersion(FlowFactory.NumericsVersion);
        RunInputs inputs = folder.Inputs;
        ParameterSet parameters = FlowFactory.Parameters(inputs);
        SchemeDefinition scheme = FlowFactory.Scheme(inputs);
        var options = new RunOptions { Started = s => display.Start(s, inputs.Steps), StepDone = display.Show };
        RunOutcome outcome;
        using (display)
        {
            outcome = RunDriver.Run(
                folder,
                () => FlowFactory.Create(inputs, backend),
                flow => SummaryJson.Numbers(FlowSummary.Of(parameters, scheme, flow.Records)),
                options,
                stop);
        }

        if (outcome.Status == RunStatus.Stopped)
            return null;
        IReadOnlyList<StepRecord> records = folder.ReadFlow();
        FlowSummary summary = FlowSummary.Of(parameters, scheme, records);
        double seconds = Stopwatch.GetElapsedTime(start).TotalSeconds;
        return new RunReport(folder, parameters, scheme, records, summary, backend, threads, seconds, outcome.StepsDone);
    }
}
