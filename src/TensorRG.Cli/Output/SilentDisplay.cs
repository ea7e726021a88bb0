using Spectre.Console;
using TensorRG.CoarseGraining;
using TensorRG.Runs;

namespace TensorRG.Cli.Output;

/// <summary>Shows nothing but notices about damage, which go to standard error.</summary>
/// <param name="errors">Console of standard error.</param>
internal sealed class SilentDisplay(IAnsiConsole errors) : IStepDisplay
{
    public void Start(RunStart start, int steps)
    {
        foreach (string notice in start.Notices)
            errors.WriteLine(notice);
    }

    public void Show(StepRecord record)
    {
    }

    public void Dispose()
    {
    }
}
