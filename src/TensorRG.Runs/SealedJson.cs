using System.Text;
using System.Text.Json;
using System.Text.Json.Nodes;

namespace TensorRG.Runs;

/// <summary>
/// A JSON file that detects any change to itself: its last member, <c>sha256</c>, is the SHA-256 of the canonical
/// compact JSON of the others, and the bytes must be exactly those that are written for the content.
/// </summary>
internal static class SealedJson
{
    private const string Seal = "sha256";

    /// <summary>The bytes of a file with this content.</summary>
    public static byte[] Write(JsonObject content)
    {
        JsonObject copy = content.DeepClone().AsObject();
        copy[Seal] = CanonicalJson.Hash(content);
        return CanonicalJson.Indented(copy);
    }

    /// <summary>The content of a file, its seal removed but not yet verified, and whether the seal is good.</summary>
    /// <exception cref="JsonException">The file is no JSON object.</exception>
    public static (JsonObject Content, bool Good) Read(byte[] bytes)
    {
        JsonObject content = Parse(bytes);
        content.Remove(Seal);
        return (content, IsWhatWouldBeWritten(content, bytes));
    }

    private static bool IsWhatWouldBeWritten(JsonObject content, byte[] bytes)
    {
        try
        {
            return Write(content).AsSpan().SequenceEqual(bytes);
        }
        catch (ArgumentException)
        {
            // A number beyond the range of a double.
            return false;
        }
    }

    private static JsonObject Parse(byte[] bytes)
    {
        // Invalid UTF-8 inside a text would only be found when the text is used.
        try
        {
            _ = new UTF8Encoding(false, throwOnInvalidBytes: true).GetCharCount(bytes);
        }
        catch (ArgumentException cause)
        {
            throw new JsonException("The file is not UTF-8.", cause);
        }

        JsonDocumentOptions options = new() { AllowDuplicateProperties = false };
        return JsonNode.Parse(bytes, null, options) as JsonObject ?? throw new JsonException("The file is no JSON object.");
    }
}
