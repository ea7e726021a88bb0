using System.Diagnostics;
using System.Globalization;
using System.Text;

namespace TensorRG.EndToEnd.Harness;

/// <summary>
/// Kills runs of one scheme at random instants of their life, several times in a row, and checks after each row that
/// the run comes to the bits of one that nobody disturbed. Some of the blows are SIGTERM instead: it leaves a checkpoint
/// at a random step, from which the next process then starts.
/// </summary>
internal sealed class KillCampaign : IDisposable
{
    private readonly TemporaryFolder _folder = new();
    private readonly RunSetup _setup;
    private readonly Random _random;
    private readonly RunBits _reference;
    private readonly StringBuilder _story = new();
    private TimeSpan _life;
    private int _chains;

    public KillCampaign(RunSetup setup, int seed)
    {
        _setup = setup;
        _random = new Random(seed);
        Say($"{setup}, seed {seed}");
        string whole = _folder.Sub("whole");
        long begin = Stopwatch.GetTimestamp();
        CommandLineProcess.Run(_folder.Path, setup.Run(whole)).Expect(0);
        _life = Stopwatch.GetElapsedTime(begin);
        _reference = RunBits.Of(whole);
        Say($"undisturbed run: {_life.TotalMilliseconds:0} ms");
    }

    /// <summary>Kills that met a living process.</summary>
    public int Kills { get; private set; }

    /// <summary>Kills with a checkpoint on disk and the run not finished.</summary>
    public int KillsDuringComputation { get; private set; }

    /// <summary>Final resumes that went on from a checkpoint.</summary>
    public int Resumed { get; private set; }

    public string Story => _story.ToString();

    /// <summary>A new run, struck up to so many times in a row, then brought to its end and compared.</summary>
    public void Chain(int blows)
    {
        RunFiles run = new(_folder.Sub(string.Create(CultureInfo.InvariantCulture, $"killed{_chains++}")));
        for (int i = 0; i < blows && !run.IsFinished; i++)
            Strike(run, i);
        int[] before = run.Steps;
        bool wasFinished = run.IsFinished;
        ProcessOutcome end = CommandLineProcess.Run(_folder.Path, Command(run, threads: 2)).Expect(0);
        if (!wasFinished && before.Length > 0 && before[^1] > 0)
        {
            // Computing everything again would give the same bits, and be no resume. (SIGTERM before the first step leaves
            // a checkpoint of step 0, from which there is nothing to save.)
            Assert.Contains(string.Create(CultureInfo.InvariantCulture, $"Resumed after step {before[^1]}."), end.Out, StringComparison.Ordinal);
            Resumed++;
        }

        Assert.True(end.Error.Length == 0, $"A killed run is not a damaged one.\n{end}\n{Story}");
        _reference.AssertSame(run.Path, Story);
    }

    public void Dispose() => _folder.Dispose();

    private void Strike(RunFiles run, int number)
    {
        using CommandLineProcess process = CommandLineProcess.Start(_folder.Path, Command(run, threads: 1 + (number % 2)));
        TimeSpan delay = _life * _random.NextDouble();
        bool gently = _random.Next(4) == 0;
        if (process.EndsWithin(delay))
            EndEarly(process);
        else if (gently)
            Stop(process);
        else
            Kill(process, run);
        Say($"run {_chains}, {(gently ? "SIGTERM" : "SIGKILL")} at {delay.TotalMilliseconds:0} ms: checkpoints {string.Join(' ', run.Steps)}{(run.IsFinished ? ", finished" : "")}");
    }

    /// <summary>The machine is faster by now than when the undisturbed run was timed; the blows must not all come late.</summary>
    private void EndEarly(CommandLineProcess process)
    {
        process.End().Expect(0);
        _life *= 0.8;
    }

    private void Kill(CommandLineProcess process, RunFiles run)
    {
        if (!process.Kill())
            return;
        Kills++;
        if (run.Steps.Length > 0 && !run.IsFinished)
            KillsDuringComputation++;
    }

    /// <summary>Stops politely; the signal may also meet a process that does not listen yet, or no longer.</summary>
    private static void Stop(CommandLineProcess process)
    {
        process.Signal("TERM");
        ProcessOutcome outcome = process.End();
        Assert.True(outcome.ExitCode is 0 or 3 or 128 + 15, outcome.ToString());
    }

    /// <summary>Both ways to go on are used; a run that was killed before it was stored can only be begun.</summary>
    private string[] Command(RunFiles run, int threads)
        => run.HasHeader && _random.Next(2) == 0 ? RunSetup.Resume(run.Path, threads) : _setup.Run(run.Path, threads);

    private void Say(FormattableString text) => _story.AppendLine(FormattableString.Invariant(text));
}
