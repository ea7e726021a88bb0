using System.Text.Json;
using System.Text.Json.Nodes;
using System.Xml.Linq;
using TensorRG.EndToEnd.Harness;

namespace TensorRG.EndToEnd;

/// <summary>What the commands print and write when all is well.</summary>
public sealed class OutputTests : IDisposable
{
    // Kramers and Wannier, Phys. Rev. 60, 252 (1941): T = 2 / ln(1 + sqrt 2). Onsager, Phys. Rev. 65, 117 (1944):
    // ln Z per site = ln(2) / 2 + 2 G / pi there, G = 0.9159655941772190 (Catalan).
    private const double CriticalTemperature = 2.269185314213022;
    private const double CriticalLogZ = 0.92969539834161021;
    private readonly TemporaryFolder _folder = new();

    public void Dispose() => _folder.Dispose();

    [Fact]
    public void Default_run_does_what_the_readme_promises()
    {
        ProcessOutcome run = Run("run", "ising").Expect(0);
        Assert.Empty(run.Error);
        foreach (string text in (string[])["ln Z per site", "f per site", "error of ln Z", "exact value", "Onsager", "inside the error bar", "phase", "bond-weighted, bond dimension 32, 44 steps"])
            Assert.Contains(text, run.Out, StringComparison.Ordinal);
        Assert.Equal(45, run.Out.Split('\n').Count(static l => l.Length > 4 && int.TryParse(l.AsSpan(0, 4), out _)));

        ProcessOutcome json = Run("run", "ising", "--json").Expect(0);
        Assert.True(Math.Abs(Number(json.Json, "logZPerSite") / CriticalLogZ - 1) <= 3e-8);
    }

    [Fact]
    public void Json_has_every_field_with_its_type()
    {
        JsonObject json = Run("run", "ising", "--json", "--bond-dimension", "8", "--threads", "1", "--run", "here").Expect(0).Json;
        Assert.Equal("ising", (string?)json["model"]);
        Assert.True(Math.Abs(Number(json["parameters"]!, "temperature") / CriticalTemperature - 1) <= 1e-15);
        Assert.Equal("bond-weighted", (string?)json["scheme"]);
        Assert.Equal(8, (int?)json["bondDimension"]);
        Assert.Equal(44, (int?)json["steps"]);
        double logZ = Number(json, "logZPerSite"), error = Number(json, "logZPerSiteError");
        Assert.True(error is > 0 and <= 1e-4);
        Assert.True(Math.Abs(Number(json, "freeEnergyPerSite") / (-CriticalTemperature * logZ) - 1) <= 1e-15);
        JsonNode exact = json["exact"]!;
        Assert.True(Math.Abs(Number(exact, "logZPerSite") / CriticalLogZ - 1) <= 1e-14);
        Assert.True(Math.Abs(Number(exact, "relativeDeviation") - (logZ - CriticalLogZ) / CriticalLogZ) <= 1e-14);
        Assert.Contains("Onsager", (string?)exact["source"], StringComparison.Ordinal);
        Assert.True(Math.Abs(logZ - CriticalLogZ) <= error);
        Assert.Equal("here", (string?)json["run"]);
        Assert.Equal("managed", (string?)json["backend"]);
        Assert.Equal(1, (int?)json["threads"]);
        Assert.True(Number(json, "seconds") > 0);
        Assert.NotEmpty(json["errorParts"]!.AsArray());
    }

    [Fact]
    public void Plot_draws_the_flow_into_the_run_folder()
    {
        ProcessOutcome run = Run("run", "ising", "--bond-dimension", "8", "--run", "drawn", "--plot", "--quiet").Expect(0);
        Assert.Contains(Path.Combine("drawn", "flow.png"), run.Out, StringComparison.Ordinal);
        Assert.Equal("svg", XDocument.Load(_folder.Sub(Path.Combine("drawn", "flow.svg"))).Root!.Name.LocalName);
        byte[] signature = [0x89, 0x50, 0x4E, 0x47];
        Assert.Equal(signature, File.ReadAllBytes(_folder.Sub(Path.Combine("drawn", "flow.png")))[..4]);
        Run("resume", "drawn", "--plot", "--json").Expect(0);
    }

    [Fact]
    public void Where_nothing_is_known_exactly_json_says_null()
    {
        JsonObject json = Run("run", "ising", "--json", "--bond-dimension", "4", "--set", "h=0.1", "--temperature", "2", "--steps", "10").Expect(0).Json;
        Assert.True(json.ContainsKey("exact"));
        Assert.Null(json["exact"]);
        Assert.Equal(0.1, Number(json["parameters"]!, "h"));
    }

    [Fact]
    public void Model_without_temperature_has_no_free_energy()
    {
        JsonObject json = Run("run", "six-vertex", "--json", "--bond-dimension", "8", "--steps", "20").Expect(0).Json;
        Assert.Null(json["freeEnergyPerSite"]);

        // Lieb, Phys. Rev. 162, 162 (1967): W = (4/3)^(3/2). How near chi = 8 comes is not the matter here.
        double exact = 1.5 * Math.Log(4.0 / 3);
        Assert.True(Math.Abs(Number(json["exact"]!, "logZPerSite") / exact - 1) <= 1e-14);
        Assert.True(Math.Abs(Number(json, "logZPerSite") / exact - 1) <= 1e-2);
    }

    [Fact]
    public void Second_run_with_the_same_inputs_gives_the_stored_numbers()
    {
        string[] args = ["run", "potts", "--set", "q=3", "--json", "--bond-dimension", "9", "--steps", "12"];
        JsonObject first = Run(args).Expect(0).Json;
        RunFiles run = new(_folder.Sub((string)first["run"]!));
        Dictionary<string, byte[]> before = run.Content();
        DateTime written = File.GetLastWriteTimeUtc(run.Result);
        JsonObject second = Run(args).Expect(0).Json;
        Assert.Equal(Without(first, "seconds"), Without(second, "seconds"));
        Assert.Equal(before, run.Content());
        Assert.Equal(written, File.GetLastWriteTimeUtc(run.Result));
        JsonObject resumed = Run("resume", run.Path, "--json").Expect(0).Json;
        Assert.Equal(Without(first, "seconds"), Without(resumed, "seconds"));
        Assert.Contains("computed earlier", Run([.. args.Where(static a => a != "--json")]).Expect(0).Out, StringComparison.Ordinal);
    }

    [Fact]
    public void Stored_result_holds_the_numbers_that_are_printed()
    {
        JsonObject json = Run("run", "clock", "--set", "q=4", "--json", "--bond-dimension", "8", "--steps", "10").Expect(0).Json;
        JsonNode stored = JsonNode.Parse(File.ReadAllText(new RunFiles(_folder.Sub((string)json["run"]!)).Result))!["result"]!;
        foreach (string name in (string[])["logZPerSite", "logZPerSiteError", "freeEnergyPerSite", "degeneracyRatio"])
            Assert.Equal(Number(json, name), Number(stored, name));
    }

    [Fact]
    public void Threads_and_instruction_path_do_not_change_a_bit()
    {
        Run("run", "ising", "--bond-dimension", "16", "--steps", "20", "--threads", "1", "--run", "one").Expect(0);
        Run("run", "ising", "--bond-dimension", "16", "--steps", "20", "--threads", "3", "--run", "three").Expect(0);
        string[] portable = ["run", "ising", "--bond-dimension", "16", "--steps", "20", "--threads", "2", "--run", "portable"];
        using CommandLineProcess process = CommandLineProcess.Start(_folder.Path, portable, new Dictionary<string, string> { ["TENSORRG_SIMD"] = "portable" });
        Assert.Contains("portable", process.End().Expect(0).Out, StringComparison.Ordinal);
        RunBits one = RunBits.Of(_folder.Sub("one"));
        one.AssertSame(_folder.Sub("three"), "three threads");
        one.AssertSame(_folder.Sub("portable"), "portable");
    }

    [Theory]
    [InlineData("de_DE.UTF-8")]
    [InlineData("tr_TR.UTF-8")]
    public void Language_of_the_user_does_not_change_a_character(string language)
    {
        string[] args = ["run", "ising", "--json", "--bond-dimension", "6", "--steps", "8", "--temperature", "2.5"];
        JsonObject plain = Run(args).Expect(0).Json;
        Directory.Delete(_folder.Sub((string)plain["run"]!), recursive: true);
        Dictionary<string, string> environment = new() { ["LANG"] = language, ["LC_ALL"] = language };
        using CommandLineProcess process = CommandLineProcess.Start(_folder.Path, args, environment);
        Assert.Equal(Without(plain, "seconds"), Without(process.End().Expect(0).Json, "seconds"));
        using CommandLineProcess models = CommandLineProcess.Start(_folder.Path, ["models", "xy", "--set", "nodes=4"], environment);
        Assert.Equal(Run("models", "xy", "--set", "nodes=4").Out, models.End().Out);
    }

    [Fact]
    public void Scan_writes_table_and_plots()
    {
        ProcessOutcome scan = Run("converge", "ising", "--json", "--bond-dimensions", "4,6,8,12", "--steps", "24", "--into", "scan").Expect(0);
        JsonObject json = scan.Json;
        Assert.Equal([4, 6, 8, 12], json["points"]!.AsArray().Select(static p => (int)p!["bondDimension"]!));
        Assert.All(json["points"]!.AsArray(), static p => Assert.True(Math.Abs(Number(p!, "logZPerSite") / CriticalLogZ - 1) <= 2e-3));
        Assert.Null(json["points"]![0]!["change"]);
        Assert.All(json["points"]!.AsArray().Skip(1), static p => Assert.True(double.IsFinite(Number(p!, "change"))));
        JsonNode extrapolated = json["extrapolated"]!;
        Assert.True(Number(extrapolated, "logZPerSiteError") > 0);
        Assert.True(Math.Abs(Number(extrapolated, "logZPerSite") - CriticalLogZ) <= Number(extrapolated, "logZPerSiteError"));
        Assert.Equal(12, (int?)json["bondDimension"]);
        string stem = _folder.Sub("scan/convergence");
        Assert.Equal(scan.Out, File.ReadAllText(stem + ".json"));
        Assert.Equal(5, File.ReadAllLines(stem + ".csv").Length);
        Assert.Equal("svg", XDocument.Load(stem + ".svg").Root!.Name.LocalName);
        Assert.Equal([0x89, 0x50, 0x4E, 0x47, 0x0D, 0x0A, 0x1A, 0x0A], File.ReadAllBytes(stem + ".png")[..8]);
    }

    [Fact]
    public void Scan_as_text_shows_the_points_and_the_limit()
    {
        ProcessOutcome scan = Run("converge", "ising", "--temperature", "3", "--bond-dimensions", "4,8", "--steps", "16", "--scheme", "hotrg").Expect(0);
        Assert.Empty(scan.Error);
        foreach (string text in (string[])["chi = 4:", "chi = 8:", "exact value", "convergence.png", "error"])
            Assert.Contains(text, scan.Out, StringComparison.Ordinal);
        Assert.Single(Directory.GetDirectories(_folder.Sub("results/runs"), "converge-ising-hotrg-*"));
    }

    [Fact]
    public void Single_bond_dimension_is_a_scan_too()
    {
        JsonObject json = Run("converge", "ising", "--set", "h=0.2", "--json", "--bond-dimensions", "4", "--steps", "6", "--into", "one").Expect(0).Json;
        Assert.Single(json["points"]!.AsArray());
        Assert.False((bool)json["extrapolated"]!["isExtrapolated"]!);
    }

    [Theory]
    [InlineData("")]
    [InlineData("run")]
    [InlineData("resume")]
    [InlineData("converge")]
    [InlineData("models")]
    [InlineData("measure")]
    [InlineData("sweep")]
    public void Help_is_there(string command)
    {
        ProcessOutcome help = Run([.. command.Split(' ', StringSplitOptions.RemoveEmptyEntries), "--help"]).Expect(0);
        Assert.Empty(help.Error);
        Assert.Contains("Usage", help.Out, StringComparison.OrdinalIgnoreCase);
        Assert.Contains(command, help.Out, StringComparison.Ordinal);
    }

    [Fact]
    public void Version_is_printed() => Assert.Matches(@"^\d+\.\d+\.\d+", Run("--version").Expect(0).Out);

    private static double Number(JsonNode node, string name)
    {
        Assert.Equal(JsonValueKind.Number, node[name]!.GetValueKind());
        return node[name]!.GetValue<double>();
    }

    private static string Without(JsonObject json, string name)
    {
        JsonObject copy = json.DeepClone().AsObject();
        Assert.True(copy.Remove(name));
        return copy.ToJsonString();
    }

    private ProcessOutcome Run(params string[] args) => CommandLineProcess.Run(_folder.Path, args);
}
