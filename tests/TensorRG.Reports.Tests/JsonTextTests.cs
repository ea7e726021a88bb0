using System.Text.Json;
using System.Text.Json.Nodes;

namespace TensorRG.Reports.Tests;

public class JsonTextTests
{
    public enum Outcome
    {
        NotConverged,
    }

    public sealed record Result(string ModelName, double LogZPerSite, double Error, double? Missing, Outcome State, Dictionary<string, double> Parameters);

    [Theory]
    [MemberData(nameof(Cultures.Names), MemberType = typeof(Cultures))]
    public void A_result_object_is_the_committed_file_under_every_culture(string culture) =>
        Golden.Verify("result.json", Cultures.Run(culture, () => JsonText.Write(Sample())));

    [Fact]
    public void Numbers_round_trip_to_the_bit()
    {
        var random = new Random(11);
        for (var i = 0; i < 1000; i++)
        {
            var value = BitConverter.Int64BitsToDouble(random.NextInt64());
            if (!double.IsFinite(value)) continue;
            var text = JsonText.Write(JsonText.Ordered(("x", JsonText.Number(value))));
            Assert.Equal(value, JsonDocument.Parse(text).RootElement.GetProperty("x").GetDouble());
        }
    }

    [Fact]
    public void What_JSON_cannot_say_is_null_wherever_it_hides()
    {
        var nested = new JsonObject { ["a"] = new JsonArray(JsonValue.Create(double.NaN), JsonValue.Create(double.NegativeInfinity), JsonValue.Create(1.5)) };
        Assert.Equal("{\n  \"a\": [\n    null,\n    null,\n    1.5\n  ]\n}\n", JsonText.Write(nested));
        Assert.Null(JsonText.Number(double.NaN));
        Assert.Equal("null\n", JsonText.Write(null));
    }

    [Fact]
    public void Names_are_checked()
    {
        Assert.Throws<ArgumentException>(() => JsonText.Ordered(("LogZ", null)));
        Assert.Throws<ArgumentException>(() => JsonText.Ordered(("", null)));
        Assert.Throws<ArgumentException>(() => JsonText.Ordered(("a", 1), ("a", 2)));
    }

    private static JsonObject Sample() => JsonText.Ordered(
        ("model", "square Ising, χ < 32 & \"more\""),
        ("steps", 50),
        ("logZPerSite", JsonText.Number(0.9296953852610692)),
        ("tiny", JsonText.Number(-1.407e-8)),
        ("exact", null),
        ("converged", true),
        ("result", JsonText.From(new Result("ising", 0.1, double.NaN, double.PositiveInfinity, Outcome.NotConverged, new() { ["J"] = 1, ["Jx"] = -0.5 }))),
        ("points", new JsonArray(1.5, JsonText.Number(double.NaN), 2)));
}
