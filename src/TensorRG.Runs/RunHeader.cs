using System.Collections.Immutable;
using System.Text.Json;
using System.Text.Json.Nodes;

namespace TensorRG.Runs;

/// <summary>The content of run.json: schema, identity, inputs and labels.</summary>
internal sealed record RunHeader(RunInputs Inputs, ImmutableSortedDictionary<string, string> Labels)
{
    public static ImmutableSortedDictionary<string, string> Sort(IReadOnlyDictionary<string, string>? labels) =>
        (labels ?? ImmutableSortedDictionary<string, string>.Empty)
            .ToImmutableSortedDictionary(l => l.Key, l => l.Value, StringComparer.Ordinal);

    public byte[] Write() => SealedJson.Write(new JsonObject
    {
        ["schema"] = RunSchema.Current,
        ["identity"] = Inputs.Identity,
        ["inputs"] = RunInputsJson.Write(Inputs),
        ["labels"] = new JsonObject(Labels.Select(l => KeyValuePair.Create(l.Key, (JsonNode?)l.Value))),
    });

    /// <summary>Reads and verifies.</summary>
    /// <exception cref="RunStoreException">The file was changed, damaged, or written by a newer version.</exception>
    public static RunHeader Read(string file, byte[] bytes)
    {
        try
        {
            (JsonObject json, bool good) = SealedJson.Read(bytes);
            CheckSchema(file, json["schema"]!.GetValue<int>());
            JsonObject inputs = json["inputs"]!.AsObject();
            if (CanonicalJson.Hash(inputs) != json["identity"]!.GetValue<string>())
                throw Changed(file, "its inputs do not match its identity");
            RunHeader header = new(RunInputsJson.Read(inputs), ReadLabels(json["labels"]!.AsObject()));
            return good && header.Write().AsSpan().SequenceEqual(bytes)
                ? header
                : throw Changed(file, "its content does not match its checksum");
        }
        catch (Exception cause) when (IsNotWhatWasWritten(cause))
        {
            throw Changed(file, $"it cannot be read ({cause.Message.TrimEnd('.')})");
        }
    }

    /// <summary>The exceptions that navigating a damaged JSON tree gives.</summary>
    public static bool IsNotWhatWasWritten(Exception cause) => cause is JsonException or FormatException
        or InvalidOperationException or ArgumentException or NullReferenceException or OverflowException;

    /// <summary>Refuses a file of a newer schema.</summary>
    public static void CheckSchema(string file, int schema)
    {
        if (schema > RunSchema.Current)
        {
            throw new RunStoreException(
                RunStoreProblem.OtherVersion,
                $"'{file}' has schema {schema}; this program knows schemas up to {RunSchema.Current}. Use the newer version that wrote it.");
        }
    }

    /// <summary>Labels from JSON.</summary>
    public static ImmutableSortedDictionary<string, string> ReadLabels(JsonObject json) =>
        json.ToImmutableSortedDictionary(l => l.Key, l => l.Value!.GetValue<string>(), StringComparer.Ordinal);

    /// <summary>The refusal of a changed header.</summary>
    public static RunStoreException Changed(string file, string why) => new(
        RunStoreProblem.Damaged,
        $"'{file}' was changed by hand or damaged: {why}. Restore the file, or start a new run with the inputs you want.");
}
