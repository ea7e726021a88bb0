using System.Collections.Immutable;
using System.Security.Cryptography;
using System.Text;
using System.Text.Json.Nodes;

namespace TensorRG.Runs;

/// <summary>Inputs to JSON and back, and what differs between two of them.</summary>
internal static class RunInputsJson
{
    private const int LongestShown = 120;

    public static JsonObject Write(RunInputs inputs)
    {
        JsonObject json = WriteAlways(inputs);
        if (inputs.Definition is not null)
            json["definition"] = inputs.Definition;
        if (inputs.NetworkForm is not null)
            json["networkForm"] = inputs.NetworkForm;
        return json;
    }

    private static JsonObject WriteAlways(RunInputs inputs) => new()
    {
        ["model"] = inputs.Model,
        ["parameters"] = Write(inputs.Parameters),
        ["scheme"] = inputs.Scheme,
        ["schemeOptions"] = Write(inputs.SchemeOptions),
        ["bondDimension"] = inputs.BondDimension,
        ["steps"] = inputs.Steps,
        ["seed"] = inputs.Seed,
        ["multipletGap"] = inputs.MultipletGap,
        ["graded"] = inputs.Graded,
        ["elementType"] = inputs.ElementType,
        ["backend"] = inputs.Backend,
        ["numericsVersion"] = inputs.NumericsVersion,
    };

    /// <summary>Reads what <see cref="Write(RunInputs)"/> wrote.</summary>
    /// <exception cref="Exception">A member is missing or of another type; any exception means "not inputs".</exception>
    public static RunInputs Read(JsonObject json) => new()
    {
        Model = json["model"]!.GetValue<string>(),
        Definition = json["definition"]?.GetValue<string>(),
        NetworkForm = json["networkForm"]?.GetValue<string>(),
        Parameters = ReadValues(json["parameters"]!.AsObject()),
        Scheme = json["scheme"]!.GetValue<string>(),
        SchemeOptions = ReadValues(json["schemeOptions"]!.AsObject()),
        BondDimension = json["bondDimension"]!.GetValue<int>(),
        Steps = json["steps"]!.GetValue<int>(),
        Seed = json["seed"]!.GetValue<long>(),
        MultipletGap = json["multipletGap"]!.GetValue<double>(),
        Graded = json["graded"]!.GetValue<bool>(),
        ElementType = json["elementType"]!.GetValue<string>(),
        Backend = json["backend"]!.GetValue<string>(),
        NumericsVersion = json["numericsVersion"]!.GetValue<int>(),
    };

    /// <summary>One line for each input that differs: <c>bondDimension is 16 in the folder, 32 asked for</c>.</summary>
    public static IReadOnlyList<string> Differences(RunInputs stored, RunInputs asked) => Differences(Write(stored), Write(asked));

    /// <summary>The same for any two trees of inputs.</summary>
    public static IReadOnlyList<string> Differences(JsonObject stored, JsonObject asked)
    {
        var left = new SortedDictionary<string, string>(StringComparer.Ordinal);
        var right = new SortedDictionary<string, string>(StringComparer.Ordinal);
        Flatten(stored, "", left);
        Flatten(asked, "", right);
        return [.. left.Keys.Union(right.Keys).Order(StringComparer.Ordinal)
            .Where(name => left.GetValueOrDefault(name) != right.GetValueOrDefault(name))
            .Select(name => $"{name} is {Short(left.GetValueOrDefault(name, "absent"))} in the folder, "
                + $"{Short(right.GetValueOrDefault(name, "absent"))} asked for")];
    }

    private static void Flatten(JsonObject json, string prefix, SortedDictionary<string, string> flat)
    {
        foreach ((string name, JsonNode? node) in json)
        {
            if (node is JsonObject inner)
                Flatten(inner, $"{prefix}{name}.", flat);
            else
                flat[prefix + name] = Encoding.UTF8.GetString(CanonicalJson.Compact(node));
        }
    }

    /// <summary>A long list or text by its beginning and its checksum.</summary>
    private static string Short(string text) => text.Length <= LongestShown
        ? text
        : $"{text[..(LongestShown / 2)]}... (SHA-256 {Convert.ToHexStringLower(SHA256.HashData(Encoding.UTF8.GetBytes(text)))[..10]}...)";

    private static JsonObject Write(ImmutableSortedDictionary<string, InputValue> values) =>
        new(values.Select(v => KeyValuePair.Create(v.Key, (JsonNode?)v.Value.ToJson())));

    private static ImmutableSortedDictionary<string, InputValue> ReadValues(JsonObject json) =>
        json.ToImmutableSortedDictionary(p => p.Key, p => InputValue.FromJson(p.Value), StringComparer.Ordinal);
}
