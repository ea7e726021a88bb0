using System.Collections.Immutable;
using System.CommandLine;
using TensorRG.Cli.Execution;
using TensorRG.Cli.Input;
using TensorRG.Cli.Output;
using TensorRG.Models;
using TensorRG.Runs;
using TensorRG.Runs.Points;

namespace TensorRG.Cli.Commands;

/// <summary><c>tensorrg sweep</c>: observables over a grid of parameters.</summary>
internal static class SweepCommand
{
    public static Command Create()
    {
        var command = new Command("sweep", "Measure observables over a grid of parameters: table, JSON and plot; can be killed at any instant and resumed.");
        var options = new MeasureOptions("Points measured at the same time, each on one thread; the bits of the result do not depend on them. Default: all cores.");
        var over = new Option<string[]>("--over")
        {
            Description = "A parameter and its values, such as temperature=2:3:21 (first, last, number of values) or q=2,3,4; repeat for a grid.",
            HelpName = "NAME=FROM:TO:COUNT",
        };
        Option<string> into = TextInput.Folder("--into", "Folder of the sweep. Default: results/runs/ and a name made of the inputs.");
        (Option<bool> json, Option<bool> quiet) = OutputOptions.Create();
        quiet.Description = "Show no progress.";
        command.Options.Add(over);
        options.AddTo(command);
        foreach (Option option in (Option[])[into, json, quiet])
            command.Options.Add(option);
        command.SetAction(result => Sweep(
            options.Read(result), result.GetValue(over) ?? [], result.GetValue(into), OutputOptions.Read(result, json, quiet)));
        return command;
    }

    private static int Sweep(MeasureRequest request, string[] over, string? into, OutputMode mode)
    {
        // Everything is checked before the folder is made.
        SweepInputs inputs = Inputs(request, GridText.Read(request.Model, over));
        CheckTemperatures(inputs);
        string path = into ?? SweepExecutor.DefaultPath(inputs);
        if (!SweepFolder.IsSweep(path))
            SweepExecutor.Probe(request, inputs);
        SweepFolder folder = RunLocation.Reach(() => SweepFolder.OpenOrCreate(path, inputs, RunLabels.Now()));
        return SweepExecutor.Execute(folder, request.Threads, mode);
    }

    private static SweepInputs Inputs(MeasureRequest request, ImmutableArray<SweepAxis> axes)
    {
        ParameterRequest model = request.Model;
        ParameterSet parameters = model.Model.CreateParameters(model.Given);
        var inputs = new SweepInputs
        {
            Measurement = request.Inputs(parameters),
            Definition = ModelCatalogue.StoredText(model.Model),
            Axes = axes,
            Temperature = Temperature(model, axes),
            Backend = request.Backend,
            NumericsVersion = FlowFactory.NumericsVersion,
        };

        // What a model has may depend on its parameters, which are complete only now.
        return inputs with { Measurement = request.Inputs(parameters) with { Quantities = request.Inputs(inputs.At(0).Parameters).Quantities } };
    }

    private static TemperatureRule Temperature(ParameterRequest model, ImmutableArray<SweepAxis> axes)
    {
        if (model.AtCritical)
            return TemperatureRule.Critical;
        bool isGiven = !model.Model.HasTemperature
            || model.Given.Any(g => model.Resolve(g.Key).Contains(ParameterDefinition.TemperatureName))
            || axes.Any(static a => a.Parameters.Contains(ParameterDefinition.TemperatureName));
        return isGiven ? TemperatureRule.Given : TemperatureRule.Default;
    }

    /// <summary>Values are checked one by one before; only an exact critical temperature may be missing for some of their combinations.</summary>
    private static void CheckTemperatures(SweepInputs inputs)
    {
        for (int i = 0; inputs.Temperature == TemperatureRule.Critical && i < inputs.Count; i++)
            _ = inputs.At(i);
    }
}
