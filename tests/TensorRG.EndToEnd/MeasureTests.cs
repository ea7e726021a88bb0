using System.Text.Json.Nodes;
using TensorRG.EndToEnd.Harness;

namespace TensorRG.EndToEnd;

/// <summary><c>tensorrg measure</c>.</summary>
public sealed class MeasureTests : IDisposable
{
    // Onsager, Phys. Rev. 65, 117 (1944): ln Z per site at T = 2.5, evaluated with 30 digits.
    private const double LogZ = 0.8793638207749482;
    private readonly TemporaryFolder _folder = new();

    public void Dispose() => _folder.Dispose();

    [Fact]
    public void Text_shows_value_bar_exact_value_and_where_the_bar_comes_from()
    {
        ProcessOutcome text = Measure("measure", "ising", "--temperature", "2.5", "--observables", "ln-z,free-energy", "--bond-dimension", "12").Expect(0);
        Assert.Empty(text.Error);
        foreach (string part in (string[])["quantity", "ln-z", "free-energy", "energy", "exact value", "inside the bar", "error of ln-z", "round-off", "Onsager", "bond dimension 12", "infinite lattice"])
            Assert.Contains(part, text.Out, StringComparison.Ordinal);
        Assert.Empty(Directory.GetFileSystemEntries(_folder.Path));
    }

    [Fact]
    public void Json_has_every_field()
    {
        JsonObject json = Measure("measure", "ising", "-T", "2.5", "-o", "free-energy,ln-z", "-c", "12", "--threads", "1", "--json").Expect(0).Json;
        Assert.Equal(("ising", "boundary", 12, 1L, "managed"), ((string)json["model"]!, (string)json["method"]!, (int)json["bondDimension"]!, (long)json["seed"]!, (string)json["backend"]!));
        Assert.Equal(2.5, (double)json["parameters"]!["temperature"]!);
        Assert.Equal(["free-energy", "ln-z"], json["values"]!.AsArray().Select(static v => (string)v!["name"]!));
        JsonNode logZ = json["values"]![1]!;
        double value = (double)logZ["value"]!, error = (double)logZ["error"]!;
        Assert.True(error is > 0 and < 1e-4);
        Assert.True(Math.Abs(value - LogZ) <= error);
        Assert.True(Math.Abs(((double)logZ["exact"]!["value"]! / LogZ) - 1) <= 1e-14);
        Assert.True((bool)logZ["exact"]!["insideErrorBar"]!);
        Assert.True(Math.Abs(((double)json["values"]![0]!["value"]! / (-2.5 * value)) - 1) <= 1e-14);
        Assert.NotEmpty(logZ["errorParts"]!.AsArray());
        Assert.True(json["torusLength"] is null && json.ContainsKey("torusLength"));
    }

    private ProcessOutcome Measure(params string[] args) => CommandLineProcess.Run(_folder.Path, args);
}
