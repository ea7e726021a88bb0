using System.Globalization;
using TensorRG.EndToEnd.Harness;

namespace TensorRG.EndToEnd;

/// <summary>Several processes on one run folder.</summary>
public sealed class ConcurrencyTests : IDisposable
{
    private readonly TemporaryFolder _folder = new();

    public void Dispose() => _folder.Dispose();

    [SkippableFact]
    public void Second_process_is_refused_at_once_and_the_first_is_not_harmed()
    {
        Skip.If(OperatingSystem.IsWindows(), "SIGSTOP is a signal of Unix.");
        RunSetup setup = RunSetup.Long("bond-weighted");
        CommandLineProcess.Run(_folder.Path, setup.Run(_folder.Sub("whole"))).Expect(0);
        RunFiles run = new(_folder.Sub("run"));
        using CommandLineProcess first = CommandLineProcess.Start(_folder.Path, setup.Run(run.Path));
        Assert.True(first.WaitUntil(() => run.Steps.Length > 0));

        // Held still, the first cannot end before the others have tried.
        first.Signal("STOP");
        string owner = string.Create(CultureInfo.InvariantCulture, $"process {first.Id}");
        foreach (string[] args in (string[][])[RunSetup.Resume(run.Path), setup.Run(run.Path), [.. RunSetup.Resume(run.Path), "--json"]])
        {
            ProcessOutcome refused = CommandLineProcess.Run(_folder.Path, args).Expect(2);
            Assert.Single(refused.ExpectError(run.Path, "in use", owner, "Wait for it to end").ErrorLines);
            Assert.Empty(refused.Out);
        }

        first.Signal("CONT");
        first.End().Expect(0);
        RunBits.Of(_folder.Sub("whole")).AssertSame(run.Path, "second process");
    }

    [Fact]
    public void Processes_that_start_together_on_a_new_run_do_not_spoil_it()
    {
        RunSetup setup = RunSetup.Short("trg");
        CommandLineProcess.Run(_folder.Path, setup.Run(_folder.Sub("whole"))).Expect(0);
        string run = _folder.Sub("run");
        CommandLineProcess[] together = [.. Enumerable.Range(0, 4).Select(_ => CommandLineProcess.Start(_folder.Path, setup.Run(run)))];
        ProcessOutcome[] ends = [.. together.Select(static p => p.End())];
        foreach (CommandLineProcess process in together)
            process.Dispose();
        Assert.Contains(ends, static e => e.ExitCode == 0);
        foreach (ProcessOutcome refused in ends.Where(static e => e.ExitCode != 0))
            refused.Expect(2).ExpectError(run, "in use");
        RunBits.Of(_folder.Sub("whole")).AssertSame(run, "four at once");
    }
}
