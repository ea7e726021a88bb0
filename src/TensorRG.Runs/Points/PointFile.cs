using System.Text.Json.Nodes;
using TensorRG.Models;

namespace TensorRG.Runs.Points;

/// <summary>The file of one point: schema, identity of the measurement, parameters for the reader, and what came of it.</summary>
internal static class PointFile
{
    public static byte[] Write(string identity, ParameterSet parameters, PointResult result)
    {
        var json = new JsonObject
        {
            ["schema"] = RunSchema.Current,
            ["identity"] = identity,
            ["parameters"] = new JsonObject(parameters.Values.Select(static p => KeyValuePair.Create(p.Key, (JsonNode?)JsonValue.Create(p.Value)))),
            ["failure"] = result.Failure,
        };
        if (result.Measurement is { } measurement)
        {
            json["values"] = ResultJson.Write(measurement);
            json["remarks"] = new JsonArray([.. measurement.Remarks.Select(static r => (JsonNode)r)]);
        }

        return SealedJson.Write(json);
    }

    /// <summary>Reads and verifies.</summary>
    /// <returns>The result, or null and what is wrong with the file.</returns>
    public static (PointResult? Result, string Defect) Read(string identity, byte[] bytes)
    {
        try
        {
            (JsonObject json, bool good) = SealedJson.Read(bytes);
            if (!good)
                return (null, "its content does not match its checksum");
            if (json["schema"]!.GetValue<int>() != RunSchema.Current || json["identity"]!.GetValue<string>() != identity)
                return (null, "it belongs to another measurement");
            PointResult result = json["failure"] is { } failure
                ? PointResult.Failed(failure.GetValue<string>())
                : PointResult.Of(ResultJson.Read(json["values"]!.AsArray(), json["remarks"]!.AsArray()));
            return (result, "");
        }
        catch (Exception cause) when (RunHeader.IsNotWhatWasWritten(cause))
        {
            return (null, $"it cannot be read ({cause.Message.TrimEnd('.')})");
        }
    }
}
