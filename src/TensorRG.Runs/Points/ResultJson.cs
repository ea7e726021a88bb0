using System.Globalization;
using System.Text.Json;
using System.Text.Json.Nodes;
using TensorRG.Models;
using TensorRG.Physics;
using TensorRG.Physics.Measurements;

namespace TensorRG.Runs.Points;

/// <summary>A measurement as JSON, and back to the same bits; numbers that are not finite are texts.</summary>
internal static class ResultJson
{
    public static JsonArray Write(Measurement measurement) => [.. measurement.Values.Select(Write)];

    public static Measurement Read(JsonArray values, JsonArray remarks)
        => new([.. values.Select(static v => ReadValue(v!.AsObject()))], [.. remarks.Select(static r => r!.GetValue<string>())]);

    private static JsonObject Write(Measured value) => new()
    {
        ["name"] = value.Name,
        ["meaning"] = value.Meaning,
        ["unit"] = value.Unit,
        ["value"] = Number(value.Value.Value),
        ["parts"] = new JsonArray([.. value.Value.Parts.Select(static p => new JsonObject { ["name"] = p.Name, ["value"] = Number(p.Value), ["basis"] = p.Basis })]),
        ["imaginaryPart"] = Number(value.ImaginaryPart),
        ["isConverged"] = value.IsConverged,
        ["remark"] = value.Remark,
        ["exact"] = value.Exact is { } exact
            ? new JsonObject { ["value"] = Number(exact.Value), ["uncertainty"] = Number(exact.Uncertainty), ["source"] = exact.Source, ["note"] = exact.Note }
            : null,
    };

    private static Measured ReadValue(JsonObject json) => new(
        Text(json, "name"),
        Text(json, "meaning"),
        Text(json, "unit"),
        new Estimate(Number(json, "value"), [.. json["parts"]!.AsArray().Select(static p => new ErrorPart(Text(p!, "name"), Number(p!, "value"), Text(p!, "basis")))]),
        Number(json, "imaginaryPart"),
        json["isConverged"]!.GetValue<bool>(),
        Text(json, "remark"),
        json["exact"] is { } exact ? new ExactValue(Number(exact, "value"), Number(exact, "uncertainty"), Text(exact, "source"), Text(exact, "note")) : null);

    private static JsonNode Number(double value) => double.IsFinite(value) ? value : NumberText.Of(value);

    private static double Number(JsonNode json, string name) => json[name]!.GetValueKind() == JsonValueKind.String
        ? double.Parse(Text(json, name), CultureInfo.InvariantCulture)
        : json[name]!.GetValue<double>();

    private static string Text(JsonNode json, string name) => json[name]!.GetValue<string>();
}
