namespace TensorRG.EndToEnd.Harness;

/// <summary>A run that was stopped by SIGTERM half way, with two checkpoints, and the bits that it must come to.</summary>
public sealed class StoppedRun : IDisposable
{
    private readonly TemporaryFolder _folder = new();

    public StoppedRun()
    {
        CommandLineProcess.Run(_folder.Path, Setup.Run(Whole)).Expect(0);
        Bits = RunBits.Of(Whole);
        RunFiles run = new(Path);
        for (int attempt = 1; !Stop(run, TimeSpan.FromMilliseconds(20 * attempt)); attempt++)
        {
            Assert.True(attempt < 10, "The run could not be stopped between its first and its last step.");
            Directory.Delete(Path, recursive: true);
        }

        (Older, Newer) = (run.Steps[0], run.Steps[1]);
    }

    /// <summary>The stopped run. Copy it before changing it.</summary>
    public string Path => _folder.Sub("stopped");

    /// <summary>The run that nobody disturbed.</summary>
    public string Whole => _folder.Sub("whole");

    /// <summary>Step of the older checkpoint.</summary>
    public int Older { get; }

    /// <summary>Step of the newer checkpoint.</summary>
    public int Newer { get; }

    internal static RunSetup Setup { get; } = new("bond-weighted", 16, 24);

    internal RunBits Bits { get; }

    public void Dispose() => _folder.Dispose();

    /// <summary>Whether the run was stopped at a later step than that of its first checkpoint, and not at the end.</summary>
    private bool Stop(RunFiles run, TimeSpan delay)
    {
        using CommandLineProcess process = CommandLineProcess.Start(_folder.Path, Setup.Run(Path));
        process.WaitUntil(() => run.Steps.Length > 0);
        if (process.EndsWithin(delay))
            return false;
        process.Signal("TERM");
        return process.End().ExitCode == 3 && run.Steps.Length == 2;
    }
}
