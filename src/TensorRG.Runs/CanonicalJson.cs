using System.Globalization;
using System.Security.Cryptography;
using System.Text;
using System.Text.Json;
using System.Text.Json.Nodes;

namespace TensorRG.Runs;

/// <summary>
/// JSON with exactly one spelling of every value, independent of culture: reals as <see cref="NumberText"/>, integers
/// without a point, text in UTF-8 with only the escapes JSON demands. In the compact form object members are sorted by
/// Unicode code point, and the bytes are those of Python's
/// <c>json.dumps(x, sort_keys=True, separators=(",", ":"), ensure_ascii=False)</c>. The indented form is for files that
/// people read and keeps the order of members.
/// </summary>
internal static class CanonicalJson
{
    /// <summary>The sorted compact form in UTF-8, for hashing.</summary>
    /// <exception cref="ArgumentException">A number is not finite, or a text is not valid Unicode.</exception>
    public static byte[] Compact(JsonNode? node) => new CanonicalJsonWriter(indented: false).Utf8(node);

    /// <summary>The indented form in UTF-8, members in their own order, with a newline at the end.</summary>
    /// <exception cref="ArgumentException">A number is not finite, or a text is not valid Unicode.</exception>
    public static byte[] Indented(JsonNode? node) => new CanonicalJsonWriter(indented: true).Utf8(node);

    /// <summary>SHA-256 of the compact form, as 64 lower-case hexadecimal digits.</summary>
    public static string Hash(JsonNode? node) => Convert.ToHexStringLower(SHA256.HashData(Compact(node)));

    /// <summary>The text of a number: reals by <see cref="NumberText"/>, integers in plain digits.</summary>
    public static string Number(JsonValue value)
    {
        if (value.TryGetValue(out JsonElement element))
            return Number(element.GetRawText());
        if (value.TryGetValue(out double real))
            return Finite(real);
        if (value.TryGetValue(out float single))
            return Finite(single);
        return Number(value.ToJsonString());
    }

    private static string Number(string raw)
    {
        if (raw.AsSpan().IndexOfAny('.', 'e', 'E') < 0)
            return raw;
        return Finite(double.Parse(raw, NumberStyles.Float, CultureInfo.InvariantCulture));
    }

    private static string Finite(double value) => double.IsFinite(value)
        ? NumberText.Of(value)
        : throw new ArgumentException($"JSON has no number {NumberText.Of(value)}; give null instead.", nameof(value));

    /// <summary>Orders texts by Unicode code point, which is the byte order of their UTF-8.</summary>
    public static int Compare(string left, string right) =>
        Encoding.UTF8.GetBytes(left).AsSpan().SequenceCompareTo(Encoding.UTF8.GetBytes(right));
}
