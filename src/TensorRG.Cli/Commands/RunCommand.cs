using System.CommandLine;
using Spectre.Console;
using TensorRG.Cli.Execution;
using TensorRG.Cli.Input;
using TensorRG.Cli.Output;
using TensorRG.Reports;
using TensorRG.Runs;
using TensorRG.Tensors.Kernels;

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
        Option<string> run = TextInput.Folder("--run", "Folder of the run. Default: results/runs/ and a name made of the inputs.");
        (Option<bool> json, Option<bool> quiet) = OutputOptions.Create();
        Option<bool> plot = OutputOptions.Plot();
        flow.AddTo(command);
        foreach (Option option in (Option[])[bondDimension, run, plot, json, quiet])
            command.Options.Add(option);
        command.SetAction(result =>
        {
            // Everything is checked before the folder is made.
            OutputMode mode = OutputOptions.Read(result, json, quiet);
            FlowRequest request = flow.Read(result);
            RunInputs inputs = request.Inputs(result.GetRequiredValue(bondDimension));
            Backend backend = BackendChoice.Create(request.Backend, request.Threads);
            string path = result.GetValue(run) ?? RunLocation.For(inputs);
            return Finish(RunLocation.OpenOrCreate(path, inputs), backend, request.Threads, mode, result.GetValue(plot));
        });
        return command;
    }

    /// <summary>Runs a folder to its end and prints the result.</summary>
    public static int Finish(RunFolder folder, Backend backend, int threads, OutputMode mode, bool plot)
    {
        using var signal = new StopSignal();
        RunReport? report = RunExecutor.Execute(folder, backend, threads, OutputOptions.Display(mode), signal.Token);
        if (report is null)
        {
            Consoles.Error.WriteLine($"Stopped. Go on with: tensorrg resume '{ShownPath.Of(folder.Path)}'");
            return ExitCode.Stopped;
        }

        IReadOnlyList<string> figures = plot ? FlowFigure.Write(report) : [];
        if (mode == OutputMode.Json)
        {
            Console.Out.Write(JsonText.Write(SummaryJson.Of(report)));
            return ExitCode.Done;
        }

        if (mode == OutputMode.Full)
            Consoles.Out.WriteLine();
        SummaryText.Write(Consoles.Out, report, figures);
        return ExitCode.Done;
    }
}
