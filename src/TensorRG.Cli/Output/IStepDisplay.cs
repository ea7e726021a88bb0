using TensorRG.CoarseGraining;
using TensorRG.Runs;

namespace TensorRG.Cli.Output;

/// <summary>Shows a run while it goes on.</summary>
internal interface IStepDisplay : IDisposable
{
    /// <summary>The run begins or resumes.</summary>
    void Start(RunStart start, int steps);

    /// <summary>A step is done.</summary>
    void Show(StepRecord record);
}
