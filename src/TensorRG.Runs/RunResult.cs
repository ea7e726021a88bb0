using System.Text.Json.Nodes;

namespace TensorRG.Runs;

/// <summary>The content of result.json: schema, identity, steps and the result that the caller computed.</summary>
internal static class RunResult
{
    public static byte[] Write(RunFolder run, JsonObject result) => SealedJson.Write(new JsonObject
    {
        ["schema"] = RunSchema.Current,
        ["identity"] = run.Identity,
        ["result"] = result.DeepClone(),
    });

    /// <summary>Reads and verifies.</summary>
    /// <exception cref="RunStoreException">The file was changed, damaged, or belongs to another run.</exception>
    public static JsonObject Read(RunFolder run, byte[] bytes)
    {
        try
        {
            (JsonObject json, bool good) = SealedJson.Read(bytes);
            if (!good)
                throw Changed(run, "its content does not match its checksum");
            if (json["identity"]!.GetValue<string>() != run.Identity || json["schema"]!.GetValue<int>() != RunSchema.Current)
                throw Changed(run, "it belongs to another run");
            JsonObject result = json["result"]!.AsObject();
            json.Remove("result");
            return result;
        }
        catch (Exception cause) when (RunHeader.IsNotWhatWasWritten(cause))
        {
            throw Changed(run, $"it cannot be read ({cause.Message.TrimEnd('.')})");
        }
    }

    private static RunStoreException Changed(RunFolder run, string why) => new(
        RunStoreProblem.Damaged,
        $"'{run.FilePath(RunFiles.Result)}' was changed by hand or damaged: {why}. Resume the run to write it again.");
}
