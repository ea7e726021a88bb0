using System.Numerics;
using System.Text;
using System.Text.Json.Nodes;
using TensorRG.EndToEnd.Harness;

namespace TensorRG.EndToEnd;

/// <summary>Models of the user's own: a file goes through every command, stored runs do without it, and what is wrong with it is said.</summary>
public sealed class ModelFileTests : IDisposable
{
    private const string Mine = """
        name = "mine"
        lattice = "square"
        parameters = { T = 2.5, J = 1 }
        site = { s = [1, -1] }
        energy = { bond = "-J*s_i*s_j" }
        observables = { m = { site = "s", order = true, meaning = "Mean spin" } }
        """;

    // Onsager, Phys. Rev. 65, 117 (1944): ln Z and energy per site at T = 2.5; ln Z evaluated with 30 digits.
    private const double LogZ = 0.8793638207749482;

    private readonly TemporaryFolder _folder = new();

    public ModelFileTests() => File.WriteAllText(Path, Mine);

    private string Path => _folder.Sub("mine.toml");

    public void Dispose() => _folder.Dispose();

    [Fact]
    public void A_run_of_a_file_does_not_need_the_file_any_more()
    {
        JsonObject run = Run("run", "mine.toml", "-c", "12", "--steps", "24", "--run", "here", "--json").Expect(0).Json;
        Assert.Equal("mine", (string?)run["model"]);
        double value = (double)run["logZPerSite"]!, error = (double)run["logZPerSiteError"]!;
        Assert.True(error is > 0 and < 1e-4 && Math.Abs(value - LogZ) <= error);
        Assert.Null(run["exact"]);
        File.WriteAllText(Path, "another text");
        Assert.Equal(value, (double)Run("resume", "here", "--json").Expect(0).Json["logZPerSite"]!);
        File.Delete(Path);
        File.Delete(_folder.Sub("here/result.json"));
        Assert.Equal(value, (double)Run("resume", "here", "--json").Expect(0).Json["logZPerSite"]!);
    }

    [Fact]
    public void A_killed_run_of_a_file_comes_to_the_same_bits()
    {
        string[] args = ["run", "./mine.toml", "--temperature", "2.3", "-c", "18", "--steps", "24", "--grading", "off", "--threads", "1", "--run"];
        Run([.. args, "whole"]).Expect(0);
        RunFiles run = new(_folder.Sub("killed"));
        string[] next = [.. args, "killed"];
        int kills = 0;
        for (int i = 0; i < 2; i++)
        {
            int[] before = run.Steps;
            using CommandLineProcess process = CommandLineProcess.Start(_folder.Path, next);
            process.WaitUntil(() => run.Steps.Any(s => !before.Contains(s)));
            kills += process.Kill() ? 1 : 0;
            File.Delete(Path);
            next = RunSetup.Resume(run.Path, threads: 2);
        }

        Assert.True(kills > 0, "No kill met a living process.");
        Run(next).Expect(0);
        RunBits.Of(_folder.Sub("whole")).AssertSame(run.Path, "killed twice, file deleted");
    }

    [Fact]
    public void Scan_measurement_and_sweep_take_a_file()
    {
        JsonObject scan = Run("converge", "mine.toml", "--bond-dimensions", "6,12", "--steps", "20", "--into", "scan", "--json").Expect(0).Json;
        Assert.True(Math.Abs((double)scan["points"]![1]!["logZPerSite"]! - LogZ) <= 1e-5);
        JsonArray values = Run("measure", "mine.toml", "-o", "ln-z,energy,m", "-c", "12", "--json").Expect(0).Json["values"]!.AsArray();
        Assert.True(Math.Abs((double)values[0]!["value"]! - LogZ) <= (double)values[0]!["error"]!);
        JsonNode ising = Run("measure", "ising", "-T", "2.5", "-o", "energy", "-c", "12", "--json").Expect(0).Json["values"]![0]!;
        Assert.True(Math.Abs((double)values[1]!["value"]! - (double)ising["exact"]!["value"]!) <= (double)values[1]!["error"]!);
        Assert.True(Math.Abs((double)values[2]!["value"]!) <= (double)values[2]!["error"]!);

        Run("sweep", "mine.toml", "--over", "T=2.5,3", "-o", "ln-z", "-c", "6", "--into", "sweep").Expect(0);
        SweepBits whole = SweepBits.Of(_folder.Sub("sweep"));
        File.Delete(Path);
        File.Delete(_folder.Sub("sweep/points/000001.json"));
        File.Delete(_folder.Sub("sweep/sweep.csv"));
        Run("resume", "sweep").Expect(0);
        whole.AssertSame(_folder.Sub("sweep"), "file deleted");
    }

    [Fact]
    public void Explanation_and_text_of_a_file()
    {
        Assert.Equal(Mine, Run("models", "mine.toml", "--file").Expect(0).Out);
        string text = Run("models", "mine.toml").Expect(0).Out;
        foreach (string part in (string[])["mine: mine", "2 of a site: 1; -1", "Z2: s -> -s", "The bond form", "--form face, --form row", "order parameter, breaks the symmetry", "tensorrg run mine.toml"])
            Assert.Contains(part, text, StringComparison.Ordinal);
    }

    [Fact]
    public void The_text_of_a_built_in_model_is_a_start_for_ones_own()
    {
        string text = Run("models", "ISING", "--file").Expect(0).Out;
        Assert.Equal(File.ReadAllText(System.IO.Path.Combine(Repository.Root, "src/TensorRG.Models/Catalogue/ising.toml")), text);
        File.WriteAllText(_folder.Sub("copy.toml"), text);
        JsonObject copy = Run("run", "copy.toml", "-c", "4", "--steps", "4", "--json").Expect(0).Json;
        JsonObject original = Run("run", "ISING", "-c", "4", "--steps", "4", "--json").Expect(0).Json;
        Assert.Equal("ising", (string?)original["model"]);
        Assert.Equal((double)original["logZPerSite"]!, (double)copy["logZPerSite"]!);
        Assert.NotEqual((string?)original["run"], (string?)copy["run"]);
    }

    [Fact]
    public void A_complex_parameter_is_set_by_its_own_name()
    {
        // Independent spins in a field: ln Z per site is the real part of ln(2 cosh(h/T)).
        JsonObject run = Run("run", "ising-imaginary-field", "--set", "h=0.2+0.1i", "--set", "J=0", "-T", "0.5", "-c", "4", "--steps", "8", "--json").Expect(0).Json;
        Assert.Equal((0.2, 0.1), ((double)run["parameters"]!["h.re"]!, (double)run["parameters"]!["h.im"]!));
        double exact = Complex.Log(2 * Complex.Cosh(new Complex(0.4, 0.2))).Real;
        Assert.True(Math.Abs((double)run["logZPerSite"]! - exact) <= 1e-12);
        InProcess.Run(_folder.Path, "run", "ising-imaginary-field", "--set", "h=0.2+i0.1").Expect(2).ExpectError("'h'", "such as 0.2+0.1i");
        InProcess.Run(_folder.Path, "run", "ising", "--set", "h=0.1i").Expect(2).ExpectError("'h'", "finite number");
    }

    [Theory]
    [InlineData("-J*s_i*s_j", "-J*s_i*s_q", "mine.toml:5:27", "s_q")]
    [InlineData("-J*s_i*s_j", "-J*(s_i*s_j", "mine.toml:5:", "parenthes")]
    [InlineData("-J*s_i*s_j", "-K*s_i*s_j", "mine.toml:5:21", "'K'")]
    [InlineData("\"square\"", "\"sqare\"", "mine.toml:2:11", "Did you mean 'square'?")]
    [InlineData("lattice =", "lattise =", "mine.toml:2:1", "Did you mean 'lattice'?")]
    [InlineData("[1, -1]", "[1, -1", "mine.toml:4:", "]")]
    [InlineData("T = 2.5", "T = 0", "mine.toml:3:", "1e-9")]
    [InlineData("name = \"mine\"", "name = \"My model\"", "mine.toml:1:8", "lower case")]
    [InlineData("-J*s_i*s_j", "-J/(s_i + s_j)", "mine.toml:5:", "s_i")]
    public void A_wrong_file_is_refused_with_the_place_and_the_remedy(string right, string wrong, string place, string remedy)
    {
        File.WriteAllText(Path, Mine.Replace(right, wrong, StringComparison.Ordinal));
        foreach (string command in (string[])["run", "measure", "models"])
            AssertRefused([command, "mine.toml"], place, remedy);
    }

    [Fact]
    public void What_is_no_model_file_is_refused()
    {
        Directory.CreateDirectory(_folder.Sub("folder.toml"));
        File.WriteAllBytes(_folder.Sub("binary.toml"), [0x7F, 0x45, 0x4C, 0x46, 2, 1, 1, 0, 0xFF, 0xFE]);
        File.WriteAllBytes(_folder.Sub("wide.toml"), [0xFF, 0xFE, .. Encoding.Unicode.GetBytes(Mine)]);
        File.WriteAllText(_folder.Sub("empty.toml"), "");
        AssertRefused(["run", "folder.toml"], "folder.toml", "This is a folder");
        AssertRefused(["run", "./"], "./", "This is a folder");
        AssertRefused(["run", "nowhere.toml"], "nowhere.toml", "no such file");
        AssertRefused(["run", "models/Ising.toml"], "models/Ising.toml", "built-in model 'ising'");
        AssertRefused(["sweep", "potts.toml", "--over", "T=1,2"], "potts.toml", "tensorrg models potts --file");
        AssertRefused(["run", "binary.toml"], "binary.toml", "UTF-8");
        AssertRefused(["run", "wide.toml"], "wide.toml", "UTF-8");
        AssertRefused(["run", "empty.toml"], "empty.toml", "needs at least name, lattice");
    }

    /// <summary>Said before a folder is made and before anything is allocated.</summary>
    [Fact]
    public void A_model_that_does_not_fit_in_memory_is_refused()
    {
        File.WriteAllText(Path, Mine.Replace("[1, -1]", "\"0..199\"", StringComparison.Ordinal).Replace("bond", "diagonal", StringComparison.Ordinal));
        foreach (string line in (string[])["run mine.toml", "converge mine.toml", "measure mine.toml -o ln-z", "sweep mine.toml --over T=1,2 -o ln-z", "models mine.toml"])
            AssertRefused(line.Split(' '), "GB", "use fewer states");
    }

    [Theory]
    [InlineData("run ising --form triangles")]
    [InlineData("converge ising --form vertex")]
    [InlineData("measure ising --form triangles -o ln-z")]
    [InlineData("sweep ising --over T=1,2 --form triangles -o ln-z")]
    public void A_form_that_the_model_does_not_have_is_refused(string line) => AssertRefused(line.Split(' '), "form does not exist", "'auto'");

    private void AssertRefused(string[] args, string named, string remedy)
    {
        string[] before = [.. Directory.GetFileSystemEntries(_folder.Path).Order(StringComparer.Ordinal)];
        ProcessOutcome refused = InProcess.Run(_folder.Path, args).Expect(2).ExpectError(named, remedy);
        Assert.Empty(refused.Out);
        Assert.Single(refused.ErrorLines);
        Assert.Equal(before, Directory.GetFileSystemEntries(_folder.Path).Order(StringComparer.Ordinal));
    }

    private ProcessOutcome Run(params string[] args) => CommandLineProcess.Run(_folder.Path, args);
}
