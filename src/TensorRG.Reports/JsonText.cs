using System.Buffers;
using System.Text;
using System.Text.Encodings.Web;
using System.Text.Json;
using System.Text.Json.Nodes;

namespace TensorRG.Reports;

/// <summary>
/// JSON for scripts: camelCase keys in the order given, doubles with their shortest round-trip digits, NaN and
/// infinities as null (JSON has no others), two-space indentation, "\n" line ends on every platform, UTF-8 text unescaped
/// where JSON allows.
/// </summary>
public static class JsonText
{
    private static readonly JsonSerializerOptions s_options = CreateOptions();

    private static readonly JsonWriterOptions s_writer = new()
    {
        Indented = true,
        NewLine = "\n",
        Encoder = JavaScriptEncoder.UnsafeRelaxedJsonEscaping,
    };

    /// <summary>A number node, or null (JSON null) where the value is NaN or infinite.</summary>
    /// <param name="value">Any double.</param>
    public static JsonNode? Number(double value) => double.IsFinite(value) ? JsonValue.Create(value) : null;

    /// <summary>An object node with its members in the order given; a null node becomes JSON null.</summary>
    /// <param name="members">Names and values; a name starts with a lower-case letter and occurs once.</param>
    /// <exception cref="ArgumentException">A name is empty, does not start with a lower-case letter, or occurs twice.</exception>
    public static JsonObject Ordered(params ReadOnlySpan<(string Name, JsonNode? Value)> members)
    {
        var result = new JsonObject();
        foreach (var (name, value) in members)
        {
            if (name.Length == 0 || !char.IsAsciiLetterLower(name[0]))
                throw new ArgumentException($"'{name}' is not a camelCase member name.", nameof(members));
            if (!result.TryAdd(name, value))
                throw new ArgumentException($"The member '{name}' occurs twice.", nameof(members));
        }
        return result;
    }

    /// <summary>
    /// The node of a record or other plain object: its public properties in the order of declaration, names in camelCase.
    /// Keys of dictionaries (a user's parameter names) stay as they are; enum values are camelCase text.
    /// </summary>
    /// <typeparam name="T">Type whose properties are written.</typeparam>
    /// <param name="value">The object; null gives null.</param>
    public static JsonNode? From<T>(T value) => JsonSerializer.SerializeToNode(value, s_options);

    /// <summary>The text of a node, ending with a line end. The same node gives the same text on every machine.</summary>
    /// <param name="node">The node; null is the text "null".</param>
    public static string Write(JsonNode? node)
    {
        var buffer = new ArrayBufferWriter<byte>();
        using (var writer = new Utf8JsonWriter(buffer, s_writer))
            Write(writer, node);
        return Encoding.UTF8.GetString(buffer.WrittenSpan) + "\n";
    }

    // The walk is written out because the library's own throws on a NaN inside a node instead of writing null.
    private static void Write(Utf8JsonWriter writer, JsonNode? node)
    {
        switch (node)
        {
            case JsonObject members: WriteObject(writer, members); break;
            case JsonArray items: WriteArray(writer, items); break;
            case JsonValue value when value.TryGetValue(out double number) && !double.IsFinite(number): writer.WriteNullValue(); break;
            case null: writer.WriteNullValue(); break;
            default: node.WriteTo(writer); break;
        }
    }

    private static void WriteObject(Utf8JsonWriter writer, JsonObject members)
    {
        writer.WriteStartObject();
        foreach (var (name, value) in members)
        {
            writer.WritePropertyName(name);
            Write(writer, value);
        }
        writer.WriteEndObject();
    }

    private static void WriteArray(Utf8JsonWriter writer, JsonArray items)
    {
        writer.WriteStartArray();
        foreach (var item in items) Write(writer, item);
        writer.WriteEndArray();
    }

    private static JsonSerializerOptions CreateOptions()
    {
        var options = new JsonSerializerOptions { PropertyNamingPolicy = JsonNamingPolicy.CamelCase };
        options.Converters.Add(new FiniteDoubleConverter());
        options.Converters.Add(new System.Text.Json.Serialization.JsonStringEnumConverter(JsonNamingPolicy.CamelCase));
        return options;
    }
}
