using System.Text.Json.Nodes;
using TensorRG.EndToEnd.Harness;

namespace TensorRG.EndToEnd;

/// <summary><c>tensorrg models</c>: the list, and models explained.</summary>
public sealed class ModelsTests : IDisposable
{
    private const int Width = 100;
    private readonly TemporaryFolder _folder = new();

    public static TheoryData<string> Names => [.. FileNames];

    private static IEnumerable<string> FileNames
        => Directory.GetFiles(Path.Combine(Repository.Root, "src/TensorRG.Models/Catalogue")).Select(static f => Path.GetFileNameWithoutExtension(f)).Order(StringComparer.Ordinal);

    public void Dispose() => _folder.Dispose();

    [Fact]
    public void The_list_names_every_model_with_its_parameters()
    {
        string list = CommandLineProcess.Run(_folder.Path, "models").Expect(0).Out;
        JsonArray models = InProcess.Run(_folder.Path, "models", "--json").Expect(0).Json["models"]!.AsArray();
        Assert.Equal(FileNames, models.Select(static m => (string)m!["name"]!));
        foreach (JsonNode? model in models)
        {
            string symbols = string.Join(", ", model!["parameters"]!.AsArray().Select(static p => (string)p!["symbol"]!));
            Assert.Matches($@"(?m)^  {model["name"]} +{System.Text.RegularExpressions.Regex.Escape(symbols)} ", list);
        }

        AssertWidth(list);
    }

    [Theory]
    [MemberData(nameof(Names))]
    public void Every_model_is_explained_as_text_and_as_json(string name)
    {
        string text = InProcess.Run(_folder.Path, "models", name).Expect(0).Out;
        JsonObject json = InProcess.Run(_folder.Path, "models", name, "--json").Expect(0).Json;
        Assert.StartsWith(name + ": ", text, StringComparison.Ordinal);
        foreach (JsonNode? parameter in json["parameters"]!.AsArray())
            Assert.Matches($@"(?m)^  {parameter!["name"]}[, ]", text);
        foreach (JsonNode? observable in json["observables"]!.AsArray())
            Assert.Matches($"(?m)^  {observable!["name"]} ", text);
        foreach (string part in (string[])["Exact references", $"tensorrg run {name}", $"tensorrg measure {name}", $"{json["network"]!["verticalBond"]!["dimension"]} x "])
            Assert.Contains(part, text, StringComparison.Ordinal);
        Assert.Contains((string)json["network"]!["form"]!, (string)json["network"]!["choice"]!, StringComparison.Ordinal);
        AssertWidth(text);
        JsonNode run = InProcess.Run(_folder.Path, "models", name, "--form", (string)json["network"]!["form"]!, "--json").Expect(0).Json;
        Assert.Equal(json["states"]!.ToJsonString(), run["states"]!.ToJsonString());
    }

    [Fact]
    public void Energies_and_weights_are_those_of_the_parameters()
    {
        JsonObject ising = Json("ising", "--set", "Jx=0.5", "--set", "h=0.25", "-T", "3");
        JsonArray terms = ising["terms"]!.AsArray();
        Assert.Equal("[-0.25,0.25]", Term(terms, "site")["values"]!.ToJsonString());
        Assert.Equal("[-0.5,0.5,0.5,-0.5]", Term(terms, "horizontal bond")["values"]!.ToJsonString());
        Assert.Equal("[-1,1,1,-1]", Term(terms, "vertical bond")["values"]!.ToJsonString());
        Assert.Equal("none", (string?)ising["symmetry"]);
        Assert.False((bool)Observable(ising, "magnetisation")["breaksSymmetry"]!);
        Assert.True((bool)Observable(Json("ising"), "magnetisation")["breaksSymmetry"]!);

        JsonNode hexagons = Term(Json("hard-hexagons", "--set", "z=2")["terms"]!.AsArray(), "bond");
        Assert.Equal(("weight", 1, "[1,1,1,null]"), ((string?)hexagons["kind"], (int)hexagons["excluded"]!, hexagons["values"]!.ToJsonString()));
        JsonNode clock = Term(Json("clock", "--set", "q=12")["terms"]!.AsArray(), "bond");
        Assert.Equal((144, 7, -1.0, 1.0), ((int)clock["configurations"]!, (int)clock["distinct"]!, (double)clock["smallest"]!, (double)clock["largest"]!));
        JsonObject complex = Json("ising-imaginary-field", "--set", "h=0.2+0.1i");
        Assert.Equal("[{\"re\":-0.2,\"im\":-0.1},{\"re\":0.2,\"im\":0.1}]", Term(complex["terms"]!.AsArray(), "site")["values"]!.ToJsonString());
        Assert.False((bool)complex["network"]!["real"]!);
    }

    [Fact]
    public void Network_bonds_and_charges()
    {
        JsonNode face = Json("ising-next-nearest")["network"]!;
        Assert.Equal(("face", "[\"row\"]", "[2]"), ((string?)face["form"], face["otherForms"]!.ToJsonString(), face["groupOrders"]!.ToJsonString()));
        Assert.Equal("{\"dimension\":4,\"charges\":[{\"charge\":[0],\"states\":2},{\"charge\":[1],\"states\":2}]}", face["verticalBond"]!.ToJsonString());
        JsonNode row = Json("ising-next-nearest", "--form", "row")["network"]!;
        Assert.Equal(("row", 2, 4), ((string?)row["form"], (int)row["verticalBond"]!["dimension"]!, (int)row["horizontalBond"]!["dimension"]!));
        JsonObject ice = Json("six-vertex");
        Assert.Equal(("[0]", true), (ice["network"]!["groupOrders"]!.ToJsonString(), (bool)ice["network"]!["fromExactSolution"]!));
        Assert.Equal(10, (int)Term(ice["terms"]!.AsArray(), "vertex")["excluded"]!);
        Assert.Equal("[64]", Json("potts", "--set", "q=64")["network"]!["groupOrders"]!.ToJsonString());
    }

    private static JsonNode Term(JsonArray terms, string where) => terms.Single(t => (string?)t!["where"] == where)!;

    private static JsonNode Observable(JsonObject model, string name) => model["observables"]!.AsArray().Single(o => (string?)o!["name"] == name)!;

    private static void AssertWidth(string text) => Assert.All(text.Split('\n'), static line => Assert.True(line.Length <= Width, line));

    private JsonObject Json(string name, params string[] options) => InProcess.Run(_folder.Path, ["models", name, .. options, "--json"]).Expect(0).Json;
}
