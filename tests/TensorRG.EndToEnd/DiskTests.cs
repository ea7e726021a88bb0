using TensorRG.EndToEnd.Harness;

namespace TensorRG.EndToEnd;

/// <summary>Full and read-only disks. They need root and mount; elsewhere the tests say so and are skipped.</summary>
public sealed class DiskTests(StoppedRun stopped) : IClassFixture<StoppedRun>, IDisposable
{
    private readonly TemporaryFolder _folder = new();

    public void Dispose() => _folder.Dispose();

    [SkippableFact]
    public void Full_disk_is_reported_and_nothing_is_lost()
    {
        using Mount disk = Mount.Tmpfs(_folder.Sub("disk"), "100k");
        RunFiles run = new(Path.Combine(disk.Path, "run"));
        ProcessOutcome failed = CommandLineProcess.Run(_folder.Path, StoppedRun.Setup.Run(run.Path)).Expect(1);
        Assert.Single(failed.ExpectError(run.Path, "full", "free some space and resume").ErrorLines);
        int stored = run.Steps.Max();
        Assert.False(run.HasAny("*.tmp"));

        disk.Remount("size=8m");
        ProcessOutcome end = CommandLineProcess.Run(_folder.Path, RunSetup.Resume(run.Path)).Expect(0);
        Assert.Contains($"Resumed after step {stored}.", end.Out, StringComparison.Ordinal);
        AssertSame(run);
    }

    [SkippableFact]
    public void Disk_that_is_full_from_the_start_is_reported()
    {
        using Mount disk = Mount.Tmpfs(_folder.Sub("disk"), "64k");
        Fill(Path.Combine(disk.Path, "filler"));
        RunFiles run = new(Path.Combine(disk.Path, "run"));
        ProcessOutcome failed = CommandLineProcess.Run(_folder.Path, StoppedRun.Setup.Run(run.Path)).Expect(1);
        Assert.Single(failed.ExpectError(run.Path, "full", "free some space").ErrorLines);
        Assert.False(run.HasHeader);

        disk.Remount("size=8m");
        CommandLineProcess.Run(_folder.Path, StoppedRun.Setup.Run(run.Path)).Expect(0);
        AssertSame(run);
    }

    [SkippableFact]
    public void Stop_signal_on_a_full_disk_is_an_error_and_the_older_checkpoint_stays()
    {
        using Mount disk = Mount.Tmpfs(_folder.Sub("disk"), "4m");
        RunFiles run = new(Path.Combine(disk.Path, "run"));
        using CommandLineProcess process = CommandLineProcess.Start(_folder.Path, StoppedRun.Setup.Run(run.Path));
        Assert.True(process.WaitUntil(() => run.Steps.Length > 0 && !run.HasAny("*.tmp")));
        Fill(Path.Combine(disk.Path, "filler"));
        process.Signal("TERM");
        process.End().Expect(1).ExpectError(run.Path, "full");
        File.Delete(Path.Combine(disk.Path, "filler"));
        CommandLineProcess.Run(_folder.Path, RunSetup.Resume(run.Path)).Expect(0);
        AssertSame(run);
    }

    [SkippableFact]
    public void Read_only_disk_is_reported_and_a_finished_run_can_be_read()
    {
        using Mount disk = Mount.Tmpfs(_folder.Sub("disk"), "8m");
        RunFiles begun = new(Path.Combine(disk.Path, "begun")), whole = new(Path.Combine(disk.Path, "whole"));
        TemporaryFolder.CopyInto(stopped.Path, Directory.CreateDirectory(begun.Path).FullName);
        TemporaryFolder.CopyInto(stopped.Whole, Directory.CreateDirectory(whole.Path).FullName);
        disk.Remount("ro");
        Dictionary<string, byte[]> before = begun.Content();

        Assert.Single(CommandLineProcess.Run(_folder.Path, RunSetup.Resume(begun.Path)).Expect(1).ExpectError(begun.Path, "read-only").ErrorLines);
        string fresh = Path.Combine(disk.Path, "fresh");
        Assert.Single(CommandLineProcess.Run(_folder.Path, StoppedRun.Setup.Run(fresh)).Expect(2).ExpectError(fresh, "read-only").ErrorLines);
        CommandLineProcess.Run(_folder.Path, RunSetup.Resume(whole.Path)).Expect(0);
        Assert.Equal(before, begun.Content());

        disk.Remount("rw");
        CommandLineProcess.Run(_folder.Path, RunSetup.Resume(begun.Path)).Expect(0);
        AssertSame(begun);
    }

    [SkippableFact]
    public void Folder_that_turns_read_only_during_the_run_loses_nothing()
    {
        RunFiles run = new(_folder.Sub("run"));
        using CommandLineProcess process = CommandLineProcess.Start(_folder.Path, StoppedRun.Setup.Run(run.Path));
        Assert.True(process.WaitUntil(() => run.Steps.Length > 0));
        using (Mount.ReadOnlyView(run.Path))
            process.End().Expect(1).ExpectError(run.Path, "read-only");
        CommandLineProcess.Run(_folder.Path, RunSetup.Resume(run.Path)).Expect(0);
        AssertSame(run);
    }

    private static void Fill(string path)
    {
        using FileStream filler = new(path, FileMode.Create, FileAccess.Write, FileShare.None, bufferSize: 0);
        try
        {
            while (true)
                filler.Write(new byte[512]);
        }
        catch (IOException)
        {
        }
    }

    private void AssertSame(RunFiles run) => stopped.Bits.AssertSame(run.Path, "disk");
}
