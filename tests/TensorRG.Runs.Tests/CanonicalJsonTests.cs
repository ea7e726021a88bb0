using System.Text;
using System.Text.Json.Nodes;

namespace TensorRG.Runs.Tests;

public class CanonicalJsonTests
{
    [Fact]
    public void Members_are_sorted_by_code_point_at_every_depth()
    {
        JsonObject json = new()
        {
            ["b"] = 1,
            ["B"] = new JsonObject { ["z"] = 1, ["a"] = 2 },
            ["\U0001D11E"] = 3,
            ["\uFF5E"] = 4,
            ["a"] = 5,
        };

        // U+FF5E comes before U+1D11E, though its UTF-16 unit is larger than the surrogate of the latter.
        Assert.Equal("{\"B\":{\"a\":2,\"z\":1},\"a\":5,\"b\":1,\"\uFF5E\":4,\"\U0001D11E\":3}", Compact(json));
    }

    [Fact]
    public void Reals_and_integers_stay_apart()
    {
        JsonArray json = [1, 1L, 1.0, -0.0, 1e-8, 1e300, 2.5f, long.MinValue, true, false, null, "x"];
        Assert.Equal("[1,1,1.0,-0.0,1e-08,1e+300,2.5,-9223372036854775808,true,false,null,\"x\"]", Compact(json));
    }

    [Fact]
    public void Text_is_escaped_only_where_JSON_demands_it()
    {
        JsonArray json = ["a\"\\/\n\r\t\b\f\u0001\u007Fé€\U0001D11E<>&+'"];
        Assert.Equal("[\"a\\\"\\\\/\\n\\r\\t\\b\\f\\u0001\u007Fé€\U0001D11E<>&+'\"]", Compact(json));
    }

    [Fact]
    public void Parsed_text_is_written_as_it_was()
    {
        JsonObject json = new()
        {
            ["z"] = new JsonArray(1, 1.0, -0.0, 1e16),
            ["a"] = new JsonObject { ["empty"] = new JsonObject(), ["none"] = new JsonArray(), ["null"] = null },
        };
        byte[] indented = CanonicalJson.Indented(json);
        Assert.Equal(indented, CanonicalJson.Indented(JsonNode.Parse(indented)));
        Assert.Equal(Compact(json), Compact(JsonNode.Parse(indented)!));
        Assert.Contains("\"none\": []", Encoding.UTF8.GetString(indented), StringComparison.Ordinal);
    }

    [Theory]
    [InlineData(double.NaN)]
    [InlineData(double.PositiveInfinity)]
    public void What_is_no_JSON_number_is_refused(double value) =>
        Assert.Throws<ArgumentException>(() => CanonicalJson.Compact(new JsonObject { ["x"] = value }));

    [Fact]
    public void Broken_Unicode_is_refused() =>
        Assert.ThrowsAny<ArgumentException>(() => CanonicalJson.Compact(new JsonObject { ["x"] = "\uD800" }));

    private static string Compact(JsonNode json) => Encoding.UTF8.GetString(CanonicalJson.Compact(json));
}
