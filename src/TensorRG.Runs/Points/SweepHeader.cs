using System.Collections.Immutable;
using System.Text.Json.Nodes;
using TensorRG.Models;

namespace TensorRG.Runs.Points;

/// <summary>The content of inputs.json: schema, identity, inputs and labels.</summary>
internal sealed record SweepHeader(SweepInputs Inputs, ImmutableSortedDictionary<string, string> Labels)
{
    public byte[] Write() => SealedJson.Write(new JsonObject
    {
        ["schema"] = RunSchema.Current,
        ["identity"] = Inputs.Identity,
        ["inputs"] = SweepInputsJson.Write(Inputs),
        ["labels"] = new JsonObject(Labels.Select(static l => KeyValuePair.Create(l.Key, (JsonNode?)l.Value))),
    });

    /// <summary>Reads and verifies.</summary>
    /// <exception cref="RunStoreException">The file was changed, damaged, or written by a newer version.</exception>
    /// <exception cref="ModelException">The model is not known to this program.</exception>
    public static SweepHeader Read(string file, byte[] bytes, Func<string, string?, Model> resolve) => Guard(file, () =>
    {
        (JsonObject inputs, ImmutableSortedDictionary<string, string> labels) = Verify(file, bytes);
        return new SweepHeader(SweepInputsJson.Read(inputs, resolve), labels);
    });

    /// <summary>Reads and verifies without making sense of the inputs, which may be those of a model that is not at hand.</summary>
    /// <exception cref="RunStoreException">The file was changed, damaged, or written by a newer version.</exception>
    public static (JsonObject Inputs, ImmutableSortedDictionary<string, string> Labels) ReadRaw(string file, byte[] bytes)
        => Guard(file, () => Verify(file, bytes));

    private static (JsonObject Inputs, ImmutableSortedDictionary<string, string> Labels) Verify(string file, byte[] bytes)
    {
        (JsonObject json, bool good) = SealedJson.Read(bytes);
        RunHeader.CheckSchema(file, json["schema"]!.GetValue<int>());
        JsonObject inputs = json["inputs"]!.AsObject();
        return good && CanonicalJson.Hash(inputs) == json["identity"]!.GetValue<string>()
            ? (inputs, RunHeader.ReadLabels(json["labels"]!.AsObject()))
            : throw RunHeader.Changed(file, "its content does not match its checksum");
    }

    private static T Guard<T>(string file, Func<T> read)
    {
        try
        {
            return read();
        }
        catch (Exception cause) when (cause is not ModelException && RunHeader.IsNotWhatWasWritten(cause))
        {
            throw RunHeader.Changed(file, $"it cannot be read ({cause.Message.TrimEnd('.')})");
        }
    }
}
