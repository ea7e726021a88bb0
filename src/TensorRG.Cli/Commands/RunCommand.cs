using System.CommandLine;
using Spectre.Console;
using TensorRG.Cli.Execution;
using TensorRG.Cli.Input;
using TensorRG.Cli.Output;
using TensorRG.Reports;
using TensorRG.Runs;

namespace TensorRG.Cli.Commands;

/// <summary><c>tensorrg run</c>: coarse-grains a model.</summary>
internal static class RunCommand
{
    private const int DefaultBondDimension = 32;

    public static Command Create()
    {
        var command = new Command("run", "Coarse-grain a model: ln Z and f per site with error bar, degeneracy ratio, spectrum at every step.");
        var flow = new FlowOptions();
        Option<int> bondDimension = NumberOption.Whole("--bond-dimension", "Most states kept on a bond (chi).", DefaultBondDimension, 1, FlowOptions.LargestBondDimension);
        bondDimension.Aliases.Add("-c");
        Option<string> run = new("--run") { Description = "Folder of the run. Default: results/runs/ and a name made of the inputs.", HelpName = "DIR" };
        (Option<bool> json, Option<bool> quiet) = OutputOptions.Create();
        flow.AddTo(command);
        foreach (Option option in (Option[])[bondDimension, run, json, quiet])
            command.Options.Add(option);
        command.SetAction(result =>
        {
            FlowRequest request = flow.Read(result);
            RunInputs inputs = request.Inputs(result.GetRequiredValue(bondDimension));
            string path = result.GetValue(run) ?? RunLocation.For(inputs);
            RunFolder folder = RunFolder.OpenOrCreate(path, inputs, RunLabels.Now());
            return Finish(folder, request.Threads, OutputOptions.Read(result, json, quiet));
        });
        return command;
    }

    /// <summary>Runs a folder to its end and prints the result.</summary>
    public static int Finish(RunFolder folder, int threads, OutputMode mode)
    {
        using var signal = new StopSignal();
        RunReport? report = RunExecutor.Execute(folder, threads, OutputOptions.Display(mode), signal.Token);
        if (report is null)
        {
            Consoles.Error.WriteLine($"Stopped. Go on with: tensorrg resume {folder.Path}");
            return ExitCode.Stopped;
        }

        if (mode == OutputMode.Json)
        {
            Console.Out.Write(JsonText.Write(SummaryJson.Of(report)));
            return ExitCode.Done;
        }

        if (mode == OutputMode.Full)
            Consoles.Out.WriteLine();
        SummaryText.Write(Consoles.Out, report);
        return ExitCode.Done;
    }
}
