using System.Globalization;
using TensorRG.EndToEnd.Harness;

namespace TensorRG.EndToEnd;

/// <summary>SIGINT and SIGTERM: the state is stored, the exit code is 3, and the message says how to go on.</summary>
public class SignalTests
{
    private static readonly RunSetup Setup = new("bond-weighted", 24, 24);

    [SkippableTheory]
    [InlineData("TERM")]
    [InlineData("INT")]
    public void Stopped_by_a_signal_twice_a_run_comes_to_the_same_bits(string signal)
    {
        using TemporaryFolder folder = new();
        CommandLineProcess.Run(folder.Path, Setup.Run(folder.Sub("whole"))).Expect(0);
        RunFiles run = new(folder.Sub("stopped"));
        AssertStopped(Stop(folder, Setup.Run(run.Path), run, signal), run);
        int first = run.Steps[^1];
        AssertStopped(Stop(folder, RunSetup.Resume(run.Path), run, signal), run);
        int second = run.Steps[^1];
        Assert.True(second > first);
        ProcessOutcome end = CommandLineProcess.Run(folder.Path, RunSetup.Resume(run.Path)).Expect(0);
        Assert.Contains(string.Create(CultureInfo.InvariantCulture, $"Resumed after step {second}."), end.Out, StringComparison.Ordinal);
        RunBits.Of(folder.Sub("whole")).AssertSame(run.Path, signal);
    }

    [SkippableFact]
    public void Json_prints_no_half_object_when_stopped()
    {
        using TemporaryFolder folder = new();
        RunFiles run = new(folder.Sub("stopped"));
        ProcessOutcome stopped = Stop(folder, [.. Setup.Run(run.Path), "--json"], run, "TERM");
        AssertStopped(stopped, run);
        Assert.Empty(stopped.Out);
    }

    [SkippableFact]
    public void Stopped_scan_goes_on_with_the_same_command()
    {
        using TemporaryFolder folder = new();
        string[] args = ["converge", "ising", "--bond-dimensions", "8,24", "--steps", "30", "--grading", "off", "--threads", "1", "--json", "--into"];
        ProcessOutcome whole = CommandLineProcess.Run(folder.Path, [.. args, "whole"]).Expect(0);
        RunFiles last = new(folder.Sub("scan/chi24"));
        ProcessOutcome stopped = Stop(folder, [.. args, "scan"], last, "TERM");
        stopped.Expect(3).ExpectError("Stopped", "same command");
        Assert.Empty(stopped.Out);
        ProcessOutcome end = CommandLineProcess.Run(folder.Path, [.. args, "scan"]).Expect(0);
        Assert.Equal(whole.Json["extrapolated"]!.ToJsonString(), end.Json["extrapolated"]!.ToJsonString());
        RunBits.Of(folder.Sub("whole/chi24")).AssertSame(last.Path, "scan");
    }

    /// <summary>Starts a command and stops it once the run has a checkpoint that was not there before.</summary>
    private static ProcessOutcome Stop(TemporaryFolder folder, string[] args, RunFiles run, string signal)
    {
        Skip.If(OperatingSystem.IsWindows(), "Signals are those of Unix.");
        int[] before = run.Steps;

        // A test host in the background may have SIGINT ignored, and processes inherit that.
        using CommandLineProcess process = CommandLineProcess.Start(folder.Path, args, null, "env", "--default-signal");
        Assert.True(process.WaitUntil(() => run.Steps.Any(s => !before.Contains(s))), "The run ended before it could be stopped.");
        process.Signal(signal);
        return process.End();
    }

    private static void AssertStopped(ProcessOutcome stopped, RunFiles run)
    {
        stopped.Expect(3).ExpectError("tensorrg resume 'stopped'");
        Assert.False(run.IsFinished);
        Assert.NotEmpty(run.Steps);
    }
}
