using System.CommandLine;
using TensorRG.Cli.Input;
using TensorRG.Runs;

namespace TensorRG.Cli.Commands;

/// <summary><c>tensorrg resume</c>: goes on with a stopped or killed run.</summary>
internal static class ResumeCommand
{
    public static Command Create()
    {
        var command = new Command("resume", "Go on with a run that was stopped or killed; the result has the same bits as if it had not been.");
        var folder = new Argument<string>("dir") { Description = "Folder of the run." };
        Option<int> threads = new FlowOptions().Threads;
        (Option<bool> json, Option<bool> quiet) = OutputOptions.Create();
        command.Arguments.Add(folder);
        foreach (Option option in (Option[])[threads, json, quiet])
            command.Options.Add(option);
        command.SetAction(result => RunCommand.Finish(
            RunFolder.Open(result.GetRequiredValue(folder)), result.GetRequiredValue(threads), OutputOptions.Read(result, json, quiet)));
        return command;
    }
}
