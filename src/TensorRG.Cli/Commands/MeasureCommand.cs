using System.CommandLine;
using System.Diagnostics;
using System.Text.Json.Nodes;
using TensorRG.Cli.Execution;
using TensorRG.Cli.Input;
using TensorRG.Cli.Output;
using TensorRG.Physics.Measurements;
using TensorRG.Reports;
using TensorRG.Tensors.Kernels;

namespace TensorRG.Cli.Commands;

/// <summary><c>tensorrg measure</c>: observables of a model at one point.</summary>
internal static class MeasureCommand
{
    public static Command Create()
    {
        var command = new Command("measure", "Measure observables of a model, each with its error bar: energy, entropy, specific heat, order parameters.");
        var options = new MeasureOptions();
        (Option<bool> json, Option<bool> quiet) = OutputOptions.Create();
        quiet.Description = "Show no progress.";
        options.AddTo(command);
        command.Options.Add(json);
        command.Options.Add(quiet);
        command.SetAction(result => Measure(options.Read(result), OutputOptions.Read(result, json, quiet)));
        return command;
    }

    private static int Measure(MeasureRequest request, OutputMode mode)
    {
        long start = Stopwatch.GetTimestamp();
        Backend backend = BackendChoice.Create(request.Backend, request.Threads);
        MeasurementInputs inputs = request.Inputs(request.Model.Parameters());
        Measurement measurement;
        using (var status = new StatusLine(Consoles.Out))
            measurement = Measurers.Create(backend).Measure(inputs, mode == OutputMode.Full ? status : null, CancellationToken.None);
        double seconds = Stopwatch.GetElapsedTime(start).TotalSeconds;
        if (mode == OutputMode.Json)
            Console.Out.Write(JsonText.Write(Json(inputs, measurement, backend, request.Threads, seconds)));
        else
            MeasureText.Write(Consoles.Out, inputs, measurement, $"{NumberFormat.Duration(seconds)} ({backend.Description})");
        return ExitCode.Done;
    }

    private static JsonObject Json(MeasurementInputs inputs, Measurement measurement, Backend backend, int threads, double seconds)
    {
        JsonObject json = MeasureJson.Begin(inputs, backend.Name);
        json.Add("values", MeasureJson.Values(measurement));
        json.Add("remarks", MeasureJson.Remarks(measurement));
        json.Add("backendDescription", backend.Description);
        json.Add("threads", threads);
        json.Add("seconds", JsonText.Number(seconds));
        return json;
    }
}
