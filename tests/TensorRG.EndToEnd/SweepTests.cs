using System.Globalization;
using System.Text.Json.Nodes;
using System.Xml.Linq;
using TensorRG.EndToEnd.Harness;

namespace TensorRG.EndToEnd;

/// <summary><c>tensorrg sweep</c>: what it writes, and that nothing that befalls it changes a byte.</summary>
public sealed class SweepTests : IDisposable
{
    private const int PointCount = 24;

    private static readonly string[] Command =
        ["sweep", "ising", "--over", "temperature=2.6:3.75:24", "--observables", "ln-z,free-energy", "--bond-dimension", "4", "--threads", "2", "--into"];

    private readonly TemporaryFolder _folder = new();

    private string Stopped => _folder.Sub("stopped");

    public void Dispose() => _folder.Dispose();

    [Fact]
    public void Table_json_and_figure_agree_and_the_same_command_gives_them_again()
    {
        ProcessOutcome sweep = Run([.. Command, "a"]).Expect(0);
        Assert.Empty(sweep.Error);
        foreach (string text in (string[])["24 points", "temperature", "ln-z", "free-energy [energy]", "sweep.csv", "sweep.png"])
            Assert.Contains(text, sweep.Out, StringComparison.Ordinal);
        string[] lines = File.ReadAllLines(_folder.Sub("a/sweep.csv"));
        Assert.Equal("temperature,Jx,Jy,h,ln-z,ln-z_error,ln-z_converged,free-energy,free-energy_error,free-energy_converged", lines[0]);
        Assert.Equal(PointCount, lines.Length - 1);
        JsonArray points = JsonNode.Parse(File.ReadAllText(_folder.Sub("a/sweep.json")))!["points"]!.AsArray();
        for (int i = 0; i < PointCount; i++)
        {
            string[] cells = lines[i + 1].Split(',');
            Assert.Equal((2.6 + (0.05 * i)).ToString("0.##", CultureInfo.InvariantCulture), cells[0]);
            Assert.Equal((double)points[i]!["values"]![0]!["value"]!, double.Parse(cells[4], CultureInfo.InvariantCulture));
            Assert.True((bool)points[i]!["values"]![0]!["exact"]!["insideErrorBar"]!);
        }

        Assert.Equal("svg", XDocument.Load(_folder.Sub("a/sweep.svg")).Root!.Name.LocalName);
        SweepBits bits = SweepBits.Of(_folder.Sub("a"));
        Assert.Contains("computed earlier", Run([.. Command, "a"]).Expect(0).Out, StringComparison.Ordinal);
        ProcessOutcome resumed = Run("resume", "a", "--json").Expect(0);
        Assert.Equal(File.ReadAllText(_folder.Sub("a/sweep.json")), resumed.Out);
        bits.AssertSame(_folder.Sub("a"), "again");
    }

    [Fact]
    public void Two_axes_make_a_map_and_three_none()
    {
        string[] settings = ["--observables", "ln-z", "-c", "4", "--quiet", "--over", "h=0.1,0", "--over", "J=1:2:2"];
        Assert.Contains("sweep.svg", Run(["sweep", "ising", .. settings, "--into", "two"]).Expect(0).Out, StringComparison.Ordinal);
        string[] rows = File.ReadAllLines(_folder.Sub("two/sweep.csv"));
        Assert.Equal(["2.269185314213022,1,1,0.1", "2.269185314213022,2,2,0.1"], rows[1..3].Select(static r => string.Join(',', r.Split(',')[..4])));
        Assert.StartsWith("4.53837062842604", rows[4], StringComparison.Ordinal);
        ProcessOutcome three = Run(["sweep", "ising", .. settings, "--over", "T=1,2", "--into", "three"]).Expect(0);
        Assert.Contains("no figure", three.Out, StringComparison.Ordinal);
        Assert.False(File.Exists(_folder.Sub("three/sweep.svg")));
        Assert.Equal(9, File.ReadAllLines(_folder.Sub("three/sweep.csv")).Length);
    }

    [Fact]
    public void Killed_at_random_instants_it_comes_to_the_same_bytes()
    {
        Run([.. Command, "whole", "--quiet"]).Expect(0);
        SweepBits whole = SweepBits.Of(_folder.Sub("whole"));
        int seed = Environment.TickCount;
        var random = new Random(seed);
        int kills = 0, between = 0;
        for (int chain = 0; chain < 2; chain++)
        {
            string folder = _folder.Sub(FormattableString.Invariant($"killed{chain}"));
            for (int blow = 0; blow < 4; blow++)
            {
                using CommandLineProcess process = CommandLineProcess.Start(_folder.Path, [.. Command, folder, "--quiet"]);
                int target = random.Next(PointCount);
                process.WaitUntil(() => SweepBits.Points(folder) >= target);
                if (!process.EndsWithin(TimeSpan.FromMilliseconds(random.Next(60))) && process.Kill())
                    kills++;
                between += SweepBits.Points(folder) is > 0 and < PointCount ? 1 : 0;
            }

            int before = SweepBits.Points(folder);
            bool resume = chain % 2 == 0 && File.Exists(Path.Combine(folder, "inputs.json"));
            ProcessOutcome end = Run(resume ? ["resume", folder, "--threads", "1"] : [.. Command, folder]).Expect(0);
            Assert.True(end.Error.Length == 0, $"A killed sweep is not a damaged one.\n{end}");
            if (before is > 0 and < PointCount)
                Assert.Contains(FormattableString.Invariant($"{before} of {PointCount} points were stored before."), end.Out, StringComparison.Ordinal);
            whole.AssertSame(folder, FormattableString.Invariant($"seed {seed}, chain {chain}"));
            Assert.Empty(Directory.GetFiles(folder, "*.tmp", SearchOption.AllDirectories));
        }

        Assert.True(kills >= 3 && between >= 2, FormattableString.Invariant($"Seed {seed}: {kills} kills, {between} of them between the first point and the last."));
    }

    [SkippableTheory]
    [InlineData("INT")]
    [InlineData("TERM")]
    public void Stopped_by_a_signal_it_says_how_to_go_on(string signal)
    {
        Skip.If(OperatingSystem.IsWindows(), "Signals are those of Unix.");
        using (CommandLineProcess process = CommandLineProcess.Start(_folder.Path, [.. Command, "stopped"], null, "env", "--default-signal"))
        {
            Assert.True(process.WaitUntil(() => SweepBits.Points(Stopped) >= 3), "It ended before it could be stopped.");
            process.Signal(signal);
            process.End().Expect(3).ExpectError("tensorrg resume 'stopped'", "of 24 points are stored");
        }

        Assert.False(File.Exists(_folder.Sub("stopped/sweep.csv")));
        File.WriteAllText(_folder.Sub("stopped/points/000000.json"), "{}");
        ProcessOutcome end = Run("resume", "stopped").Expect(0);
        Assert.Contains("points/000000.json was changed or damaged", end.Out, StringComparison.Ordinal);
        Assert.Equal(PointCount, SweepBits.Points(Stopped));
    }

    [SkippableFact]
    public void Second_process_is_refused_at_once()
    {
        Skip.If(OperatingSystem.IsWindows(), "SIGSTOP is a signal of Unix.");
        using CommandLineProcess first = CommandLineProcess.Start(_folder.Path, [.. Command, "stopped"]);
        Assert.True(first.WaitUntil(() => SweepBits.Points(Stopped) > 0));

        // Held still, the first cannot end before the second has tried.
        first.Signal("STOP");
        ProcessOutcome refused = Run([.. Command, "stopped"]).Expect(2);
        Assert.Single(refused.ExpectError(Stopped, "in use", FormattableString.Invariant($"process {first.Id}"), "Wait for it to end").ErrorLines);
        first.Signal("CONT");
        first.End().Expect(0);
    }

    [Fact]
    public void Stored_sweep_of_other_inputs_is_named_with_the_differences()
    {
        string[] args = ["sweep", "ising", "--over", "T=2,3", "-o", "ln-z", "-c", "4", "--quiet", "--into", "a"];
        Run(args).Expect(0);
        Run([.. args, "--seed", "5"]).Expect(2).ExpectError("seed is 1 in the folder, 5 asked for", "Use another folder");
        Run("run", "ising", "--run", "a").Expect(2).ExpectError("not empty");
    }

    private ProcessOutcome Run(params string[] args) => CommandLineProcess.Run(_folder.Path, args);
}
