using System.Globalization;
using System.Text;
using System.Text.Json;
using System.Text.Json.Nodes;

namespace TensorRG.Runs;

/// <summary>Writes one JSON value; see <see cref="CanonicalJson"/> for the two forms.</summary>
internal sealed class CanonicalJsonWriter
{
    private static readonly UTF8Encoding Strict = new(encoderShouldEmitUTF8Identifier: false, throwOnInvalidBytes: true);
    private readonly StringBuilder _text = new();
    private readonly bool _indented;
    private int _depth;

    public CanonicalJsonWriter(bool indented)
    {
        _indented = indented;
    }

    public byte[] Utf8(JsonNode? node)
    {
        Write(node);
        if (_indented)
            _text.Append('\n');
        return Strict.GetBytes(_text.ToString());
    }

    private void Write(JsonNode? node)
    {
        switch (node)
        {
            case JsonObject members:
                WriteObject(members);
                break;
            case JsonArray items:
                WriteItems<JsonNode?>('[', ']', [.. items], Write);
                break;
            case JsonValue value:
                WriteValue(value);
                break;
            default:
                _text.Append("null");
                break;
        }
    }

    private void WriteObject(JsonObject members)
    {
        List<KeyValuePair<string, JsonNode?>> list = [.. members];
        if (!_indented)
            list.Sort((a, b) => CanonicalJson.Compare(a.Key, b.Key));
        WriteItems('{', '}', list, WriteMember);
    }

    private void WriteMember(KeyValuePair<string, JsonNode?> member)
    {
        WriteText(member.Key);
        _text.Append(_indented ? ": " : ":");
        Write(member.Value);
    }

    private void WriteItems<T>(char open, char close, List<T> items, Action<T> write)
    {
        _text.Append(open);
        _depth++;
        bool first = true;
        foreach (T item in items)
        {
            if (!first)
                _text.Append(',');
            first = false;
            NewLine();
            write(item);
        }

        _depth--;
        if (items.Count > 0)
            NewLine();
        _text.Append(close);
    }

    private void NewLine()
    {
        if (_indented)
            _text.Append('\n').Append(' ', 2 * _depth);
    }

    private void WriteValue(JsonValue value)
    {
        switch (value.GetValueKind())
        {
            case JsonValueKind.String:
                WriteText(value.GetValue<string>());
                break;
            case JsonValueKind.Number:
                _text.Append(CanonicalJson.Number(value));
                break;
            default:
                _text.Append(value.GetValueKind() == JsonValueKind.True ? "true" : "false");
                break;
        }
    }

    private void WriteText(string text)
    {
        _text.Append('"');
        foreach (char c in text)
            WriteCharacter(c);
        _text.Append('"');
    }

    private void WriteCharacter(char c)
    {
        _ = c switch
        {
            '"' => _text.Append("\\\""),
            '\\' => _text.Append("\\\\"),
            '\n' => _text.Append("\\n"),
            '\r' => _text.Append("\\r"),
            '\t' => _text.Append("\\t"),
            '\b' => _text.Append("\\b"),
            '\f' => _text.Append("\\f"),
            < ' ' => _text.Append("\\u").Append(((int)c).ToString("x4", CultureInfo.InvariantCulture)),
            _ => _text.Append(c),
        };
    }
}
