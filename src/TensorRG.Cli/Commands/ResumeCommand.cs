using System.CommandLine;
using TensorRG.Cli.Execution;
using TensorRG.Cli.Input;
using TensorRG.Cli.Output;
using TensorRG.Models;
using TensorRG.Runs;
using TensorRG.Runs.Points;

namespace TensorRG.Cli.Commands;

/// <summary><c>tensorrg resume</c>: goes on with a stopped or killed run.</summary>
internal static class ResumeCommand
{
    public static Command Create()
    {
        var command = new Command("resume", "Go on with a run or sweep that was stopped or killed; the result has the same bits as if it had not been.");
        Argument<string> folder = TextInput.Required("dir", "Folder of the run or sweep.");
        Option<int> threads = new MachineOptions().Threads;
        (Option<bool> json, Option<bool> quiet) = OutputOptions.Create();
        Option<bool> plot = OutputOptions.Plot(" A sweep draws its figure with or without.");
        command.Arguments.Add(folder);
        foreach (Option option in (Option[])[threads, plot, json, quiet])
            command.Options.Add(option);
        command.SetAction(result => Resume(
            result.GetRequiredValue(folder), result.GetRequiredValue(threads), OutputOptions.Read(result, json, quiet), result.GetValue(plot)));
        return command;
    }

    private static int Resume(string path, int threads, OutputMode mode, bool plot)
    {
        if (SweepFolder.IsSweep(path))
            return SweepExecutor.Execute(RunLocation.Reach(() => SweepFolder.Open(path, ModelCatalogue.Restore)), threads, mode);
        RunFolder folder = RunLocation.Open(path);
        return RunCommand.Finish(folder, BackendChoice.Create(folder.Inputs.Backend, threads), threads, mode, plot);
    }
}
