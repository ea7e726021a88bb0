using System.CommandLine;
using System.Diagnostics;
using Spectre.Console;
using TensorRG.Cli.Execution;
using TensorRG.Cli.Input;
using TensorRG.Cli.Output;
using TensorRG.Reports;
using TensorRG.Runs;
using TensorRG.Tensors.Kernels;

namespace TensorRG.Cli.Commands;

/// <summary><c>tensorrg converge</c>: a scan over bond dimensions and its limit.</summary>
internal static class ConvergeCommand
{
    private static readonly int[] DefaultBondDimensions = [8, 12, 16, 24, 32];

    public static Command Create()
    {
        var command = new Command("converge", "Scan the bond dimension: how ln Z per site settles, its limit with error bar, table and plot.");
        var flow = new FlowOptions();
        Option<int[]> bondDimensions = NumberOption.Ascending("--bond-dimensions", "Ascending bond dimensions. Default: 8,12,16,24,32.", DefaultBondDimensions, 1, FlowOptions.LargestBondDimension);
        bondDimensions.HelpName = "N,N,...";
        Option<string> into = TextInput.Folder("--into", "Folder for the table and the plot; runs go below it. Default: results/runs/ and a name made of the inputs.");
        (Option<bool> json, Option<bool> quiet) = OutputOptions.Create();
        flow.AddTo(command);
        foreach (Option option in (Option[])[bondDimensions, into, json, quiet])
            command.Options.Add(option);
        command.SetAction(result => Scan(
            flow.Read(result), result.GetRequiredValue(bondDimensions), result.GetValue(into), OutputOptions.Read(result, json, quiet)));
        return command;
    }

    private static int Scan(FlowRequest request, int[] bondDimensions, string? into, OutputMode mode)
    {
        long start = Stopwatch.GetTimestamp();
        Backend backend = BackendChoice.Create(request.Backend, request.Threads);
        using var signal = new StopSignal();
        var runs = new List<RunReport>();
        foreach (int bondDimension in bondDimensions)
        {
            RunInputs inputs = request.Inputs(bondDimension);
            string path = into is null ? RunLocation.For(inputs) : Path.Combine(into, FormattableString.Invariant($"chi{bondDimension}"));
            RunReport? report = RunExecutor.Execute(
                RunLocation.OpenOrCreate(path, inputs), backend, request.Threads, OutputOptions.Display(mode, FormattableString.Invariant($"chi = {bondDimension}")), signal.Token);
            if (report is null)
            {
                Consoles.Error.WriteLine("Stopped. The same command goes on from here.");
                return ExitCode.Stopped;
            }

            runs.Add(report);
            if (mode == OutputMode.Full)
                Consoles.Out.WriteLine(FormattableString.Invariant($"chi = {bondDimension}: ln Z per site = {NumberFormat.WithError(report.Summary.LogZPerSite.Value, report.Summary.LogZPerSite.Error)} in {NumberFormat.Duration(report.StepSeconds)}"));
        }

        Publish(new ChiReport([.. runs]), Target(into, runs[^1].Folder.Inputs), mode, Stopwatch.GetElapsedTime(start).TotalSeconds);
        return ExitCode.Done;
    }

    private static string Target(string? into, RunInputs last)
        => into ?? Path.Combine(RunLocation.Root, FormattableString.Invariant($"converge-{last.Model}-{last.Scheme}-to-chi{last.BondDimension}-{last.Identity[..10]}"));

    private static void Publish(ChiReport report, string folder, OutputMode mode, double seconds)
    {
        string stem = Path.Combine(folder, "convergence");
        RenderedFigure figure = FigureRenderer.Render(report.Figure());
        string[] files = [stem + ".csv", stem + ".json", .. figure.Write(stem)];
        ReportFile.WriteText(files[0], report.Table.ToCsv());
        string json = JsonText.Write(ChiJson.Of(report, files, seconds));
        ReportFile.WriteText(files[1], json);
        if (mode == OutputMode.Json)
        {
            Console.Out.Write(json);
            return;
        }

        ChiText.Write(Consoles.Out, report, files, figure.Notices);
    }
}
