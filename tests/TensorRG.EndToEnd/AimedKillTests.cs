using TensorRG.CoarseGraining;
using TensorRG.EndToEnd.Harness;
using Xunit.Abstractions;

namespace TensorRG.EndToEnd;

/// <summary>
/// Kill -9 at the instants that random ones seldom meet: while files are written, renamed and deleted. A kill that
/// comes a little late is as good: the run must come to the same bits after any.
/// </summary>
public class AimedKillTests(ITestOutputHelper output)
{
    public static TheoryData<string> Schemes => [.. SchemeRegistry.All.Select(static s => s.Name)];

    /// <summary>What the killer waits for.</summary>
    private static (string Name, Func<RunFiles, bool> Reached)[] Instants =>
    [
        ("the folder is made", static run => Directory.Exists(run.Path)),
        ("run.json is written aside", static run => run.HasAny("run.json.tmp")),
        ("flow.csv is written aside", static run => run.HasAny("flow.csv.tmp")),
        ("a checkpoint is written aside", static run => run.HasAny("state-*.h5.tmp")),
        ("the second checkpoint is written aside", static run => run.Steps.Length == 1 && run.HasAny("state-*.h5.tmp")),
        ("the last checkpoint is there", static run => run.Steps.Length == 2),
        ("the result is written aside", static run => run.HasAny("result.json.tmp")),
        ("the result is there", static run => run.IsFinished),
    ];

    [Theory]
    [MemberData(nameof(Schemes))]
    public void Killed_while_it_writes_a_run_comes_to_the_same_bits(string scheme)
    {
        using TemporaryFolder folder = new();
        RunSetup setup = RunSetup.Short(scheme);
        CommandLineProcess.Run(folder.Path, setup.Run(folder.Sub("whole"))).Expect(0);
        RunBits reference = RunBits.Of(folder.Sub("whole"));
        int kills = Instants.Count(instant => Kill(folder, setup, instant.Name, instant.Reached));
        Assert.True(kills >= 3, $"Only {kills} kills met a living process.");
        foreach ((string name, _) in Instants)
        {
            CommandLineProcess.Run(folder.Path, setup.Run(folder.Sub(name), threads: 2)).Expect(0);
            reference.AssertSame(folder.Sub(name), "Killed when " + name);
        }
    }

    private bool Kill(TemporaryFolder folder, RunSetup setup, string name, Func<RunFiles, bool> reached)
    {
        RunFiles run = new(folder.Sub(name));
        using CommandLineProcess process = CommandLineProcess.Start(folder.Path, setup.Run(run.Path));
        process.WaitUntil(() => reached(run));
        bool killed = process.Kill();
        string[] files = Directory.Exists(run.Path) ? [.. Directory.GetFiles(run.Path).Select(static f => Path.GetFileName(f)).Order(StringComparer.Ordinal)] : [];
        output.WriteLine($"{name}: {(killed ? "killed" : "it had ended")}, {string.Join(' ', files)}");
        return killed;
    }
}
