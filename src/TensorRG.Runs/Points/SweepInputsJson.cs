using System.Text.Json.Nodes;
using TensorRG.Models;

namespace TensorRG.Runs.Points;

/// <summary>Inputs of a sweep to JSON and back.</summary>
internal static class SweepInputsJson
{
    public static JsonObject Write(SweepInputs inputs) => new()
    {
        ["measurement"] = MeasurementJson.Write(inputs.Measurement, inputs.Definition, inputs.Backend, inputs.NumericsVersion, inputs.IsFixed),
        ["temperature"] = inputs.Temperature.ToString(),
        ["axes"] = new JsonArray([.. inputs.Axes.Select(Write)]),
    };

    /// <summary>Reads what <see cref="Write(SweepInputs)"/> wrote.</summary>
    /// <exception cref="ModelException">There is no such model or parameter in this program.</exception>
    /// <exception cref="Exception">A member is missing or of another type; any other exception means "not inputs".</exception>
    public static SweepInputs Read(JsonObject json, Func<string, string?, Model> resolve)
    {
        JsonObject measurement = json["measurement"]!.AsObject();
        return new SweepInputs
        {
            Measurement = MeasurementJson.Read(measurement, resolve),
            Definition = measurement["definition"]?.GetValue<string>(),
            Backend = measurement["backend"]!.GetValue<string>(),
            NumericsVersion = measurement["numericsVersion"]!.GetValue<int>(),
            Temperature = Enum.Parse<TemperatureRule>(json["temperature"]!.GetValue<string>()),
            Axes = [.. json["axes"]!.AsArray().Select(static a => ReadAxis(a!.AsObject()))],
        };
    }

    private static JsonNode Write(SweepAxis axis) => new JsonObject
    {
        ["name"] = axis.Name,
        ["parameters"] = new JsonArray([.. axis.Parameters.Select(static p => (JsonNode)p)]),
        ["values"] = new JsonArray([.. axis.Values.Select(static v => (JsonNode)v)]),
    };

    private static SweepAxis ReadAxis(JsonObject json) => new(
        json["name"]!.GetValue<string>(),
        [.. json["parameters"]!.AsArray().Select(static p => p!.GetValue<string>())],
        [.. json["values"]!.AsArray().Select(static v => v!.GetValue<double>())]);
}
