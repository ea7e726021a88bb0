using System.Text.Json.Nodes;
using TensorRG.Physics.Measurements;
using TensorRG.Reports;

namespace TensorRG.Cli.Output;

/// <summary>Measurements as JSON.</summary>
internal static class MeasureJson
{
    /// <summary>What was asked for, without the parameters.</summary>
    public static JsonObject Settings(MeasurementInputs inputs, string backend) => JsonText.Ordered(
        ("method", inputs.Method),
        ("bondDimension", inputs.BondDimension),
        ("torusLength", inputs.TorusLength),
        ("form", inputs.Form.ToString().ToLowerInvariant()),
        ("seed", inputs.Seed),
        ("backend", backend));

    /// <summary>Model, parameters and settings: how every object of a measurement begins.</summary>
    public static JsonObject Begin(MeasurementInputs inputs, string backend)
    {
        JsonObject json = JsonText.Ordered(("model", inputs.Parameters.Model.Name), ("parameters", SummaryJson.Parameters(inputs.Parameters)));
        foreach ((string name, JsonNode? value) in Settings(inputs, backend))
            json.Add(name, value?.DeepClone());
        return json;
    }

    public static JsonArray Values(Measurement measurement) => [.. measurement.Values.Select(Value)];

    public static JsonArray Remarks(Measurement measurement) => [.. measurement.Remarks.Select(static r => JsonValue.Create(r))];

    private static JsonObject Value(Measured measured) => JsonText.Ordered(
        ("name", measured.Name),
        ("meaning", measured.Meaning),
        ("unit", measured.Unit),
        ("value", JsonText.Number(measured.Value.Value)),
        ("error", JsonText.Number(measured.Value.Error)),
        ("errorParts", SummaryJson.Parts(measured.Value)),
        ("imaginaryPart", JsonText.Number(measured.ImaginaryPart)),
        ("converged", measured.IsConverged),
        ("remark", measured.Remark),
        ("exact", Exact(measured)));

    private static JsonObject? Exact(Measured measured) => measured.Exact is not { } exact
        ? null
        : JsonText.Ordered(
            ("value", JsonText.Number(exact.Value)),
            (exact.Value == 0 ? "deviation" : "relativeDeviation", JsonText.Number(MeasuredValue.Deviation(measured))),
            ("insideErrorBar", MeasuredValue.IsCovered(measured)),
            ("source", exact.Source));
}
