using System.Collections.Immutable;
using System.Text.Json.Nodes;

namespace TensorRG.Runs;

/// <summary>Inputs to JSON and back, and what differs between two of them.</summary>
internal static class RunInputsJson
{
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
    public static IReadOnlyList<string> Differences(RunInputs stored, RunInputs asked)
    {
        SortedDictionary<string, string> left = Flatten(stored);
        SortedDictionary<string, string> right = Flatten(asked);
        return [.. left.Keys.Union(right.Keys).Order(StringComparer.Ordinal)
            .Where(name => left.GetValueOrDefault(name) != right.GetValueOrDefault(name))
            .Select(name => $"{name} is {left.GetValueOrDefault(name, "absent")} in the folder, "
                + $"{right.GetValueOrDefault(name, "absent")} asked for")];
    }

    private static SortedDictionary<string, string> Flatten(RunInputs inputs)
    {
        SortedDictionary<string, string> flat = new(StringComparer.Ordinal);
        foreach ((string name, JsonNode? node) in Write(inputs))
        {
            if (node is not JsonObject values)
                flat[name] = Text(node);
            else
                foreach ((string inner, JsonNode? value) in values)
                    flat[$"{name}.{inner}"] = Text(value);
        }

        return flat;
    }

    private static string Text(JsonNode? node) => System.Text.Encoding.UTF8.GetString(CanonicalJson.Compact(node));

    private static JsonObject Write(ImmutableSortedDictionary<string, InputValue> values) =>
        new(values.Select(v => KeyValuePair.Create(v.Key, (JsonNode?)v.Value.ToJson())));

    private static ImmutableSortedDictionary<string, InputValue> ReadValues(JsonObject json) =>
        json.ToImmutableSortedDictionary(p => p.Key, p => InputValue.FromJson(p.Value), StringComparer.Ordinal);
}
