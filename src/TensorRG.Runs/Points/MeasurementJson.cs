using System.Text.Json.Nodes;
using TensorRG.Models;
using TensorRG.Models.Lattices;
using TensorRG.Physics.Measurements;

namespace TensorRG.Runs.Points;

/// <summary>
/// Everything that determines the numbers of a measurement as JSON, and back. The SHA-256 of its canonical form is the identity
/// of the measurement; see <see cref="RunInputs.Identity"/> for how to compute it elsewhere.
/// </summary>
public static class MeasurementJson
{
    /// <summary>The inputs as JSON.</summary>
    /// <param name="inputs">What and how.</param>
    /// <param name="definition">The text that defines the model; null for a model of the catalogue.</param>
    /// <param name="backend">Name of the linear-algebra backend.</param>
    /// <param name="numericsVersion">Version of the algorithms, <see cref="FlowFactory.NumericsVersion"/>.</param>
    /// <param name="keep">Which parameters to write, by name; null for all.</param>
    public static JsonObject Write(
        MeasurementInputs inputs, string? definition, string backend, int numericsVersion, Func<string, bool>? keep = null)
    {
        ArgumentNullException.ThrowIfNull(inputs);
        var json = new JsonObject { ["model"] = inputs.Parameters.Model.Name };
        if (definition is not null)
            json["definition"] = definition;
        json["parameters"] = new JsonObject(inputs.Parameters.Values
            .Where(p => keep is null || keep(p.Key))
            .Select(static p => KeyValuePair.Create(p.Key, (JsonNode?)JsonValue.Create(p.Value))));
        json["quantities"] = new JsonArray([.. inputs.Quantities.Select(static q => (JsonNode)q)]);
        json["method"] = inputs.Method;
        json["bondDimension"] = inputs.BondDimension;
        json["torusLength"] = inputs.TorusLength;
        json["form"] = inputs.Form.ToString();
        json["seed"] = inputs.Seed;
        json["backend"] = backend;
        json["numericsVersion"] = numericsVersion;
        return json;
    }

    /// <summary>SHA-256 of the canonical JSON of the inputs, as 64 lower-case hexadecimal digits.</summary>
    /// <param name="inputs">What and how.</param>
    /// <param name="definition">The text that defines the model; null for a model of the catalogue.</param>
    /// <param name="backend">Name of the linear-algebra backend.</param>
    /// <param name="numericsVersion">Version of the algorithms.</param>
    public static string Identity(MeasurementInputs inputs, string? definition, string backend, int numericsVersion)
        => CanonicalJson.Hash(Write(inputs, definition, backend, numericsVersion));

    /// <summary>Reads what <see cref="Write"/> wrote. Parameters that were not written take the model's defaults.</summary>
    /// <param name="json">The inputs.</param>
    /// <param name="resolve">Finds a model by its name, or makes it from the text that defines it.</param>
    /// <exception cref="ModelException">There is no such model or parameter in this program.</exception>
    /// <exception cref="Exception">A member is missing or of another type; any other exception means "not inputs".</exception>
    public static MeasurementInputs Read(JsonObject json, Func<string, string?, Model> resolve)
    {
        ArgumentNullException.ThrowIfNull(json);
        ArgumentNullException.ThrowIfNull(resolve);
        Model model = resolve(json["model"]!.GetValue<string>(), json["definition"]?.GetValue<string>());
        return new MeasurementInputs
        {
            Parameters = model.CreateParameters(json["parameters"]!.AsObject().Select(static p => KeyValuePair.Create(p.Key, p.Value!.GetValue<double>()))),
            Quantities = [.. json["quantities"]!.AsArray().Select(static q => q!.GetValue<string>())],
            Method = json["method"]!.GetValue<string>(),
            BondDimension = json["bondDimension"]!.GetValue<int>(),
            TorusLength = json["torusLength"]?.GetValue<int>(),
            Form = Enum.Parse<NetworkForm>(json["form"]!.GetValue<string>()),
            Seed = json["seed"]!.GetValue<long>(),
        };
    }
}
