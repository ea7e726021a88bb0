namespace TensorRG.Runs.Tests;

/// <summary>Real full and read-only file systems. They need root and mount; elsewhere the tests say so and are skipped.</summary>
public class StorageFailureTests
{
    [SkippableFact]
    public void Full_disk_is_reported_and_the_run_goes_on_once_there_is_space()
    {
        using TemporaryFolder folder = new();
        using Mount mount = Mount.Tmpfs(folder.Sub("disk"), "256k");
        RunFolder run = RunFolder.Create(Path.Combine(mount.Path, "a"), Sample.Inputs());
        RunOptions options = new()
        {
            Checkpoints = Sample.EveryStep,
            StepDone = r => Fill(Path.Combine(mount.Path, "filler"), r.Step == 3),
        };
        RunStoreException error = Assert.Throws<RunStoreException>(() => Sample.Run(run, options));
        Assert.Equal(RunStoreProblem.Storage, error.Problem);
        Assert.Contains("free some space", error.Message, StringComparison.Ordinal);
        Assert.Contains(mount.Path, error.Message, StringComparison.Ordinal);
        Assert.DoesNotContain(Directory.GetFiles(run.Path), n => n.EndsWith(".tmp", StringComparison.Ordinal));

        File.Delete(Path.Combine(mount.Path, "filler"));
        RunStart? start = null;
        Sample.Run(RunFolder.Open(run.Path), new RunOptions { Started = s => start = s });
        Assert.Equal(3, start!.Step);
        Assert.Empty(start.Notices);
        AssertSameAsUninterrupted(folder, run.Path);
    }

    [SkippableFact]
    public void Read_only_folder_is_reported_but_a_finished_run_can_be_read()
    {
        using TemporaryFolder folder = new();
        using Mount mount = Mount.Tmpfs(folder.Sub("disk"), "1m");
        string finished = Path.Combine(mount.Path, "finished");
        Sample.Run(RunFolder.Create(finished, Sample.Inputs()));
        string begun = RunFolder.Create(Path.Combine(mount.Path, "begun"), Sample.Inputs()).Path;
        mount.Remount("ro");

        AssertReadOnly(() => Sample.Run(RunFolder.Open(begun)), begun);
        string fresh = Path.Combine(mount.Path, "fresh");
        AssertReadOnly(() => RunFolder.Create(fresh, Sample.Inputs()), fresh);
        Assert.Equal(RunStatus.Completed, Sample.Run(RunFolder.Open(finished)).Status);
        Assert.Equal(Sample.Steps + 1, RunFolder.Open(finished).ReadFlow().Count);

        mount.Remount("rw");
        Sample.Run(RunFolder.Open(begun));
        AssertSameAsUninterrupted(folder, begun);
    }

    [SkippableFact]
    public void Folder_that_turns_read_only_during_the_run_loses_nothing()
    {
        using TemporaryFolder folder = new();
        using Mount mount = Mount.Tmpfs(folder.Sub("disk"), "1m");
        RunFolder run = RunFolder.Create(Path.Combine(mount.Path, "a"), Sample.Inputs());
        using ReadOnlyView view = new();
        RunOptions options = new()
        {
            Checkpoints = Sample.EveryStep,
            StepDone = r => view.Close(r.Step == 2, run.Path),
        };
        Assert.Equal(RunStoreProblem.Storage, Assert.Throws<RunStoreException>(() => Sample.Run(run, options)).Problem);
        view.Dispose();
        RunStart? start = null;
        Sample.Run(RunFolder.Open(run.Path), new RunOptions { Started = s => start = s });
        Assert.Equal(2, start!.Step);
        AssertSameAsUninterrupted(folder, run.Path);
    }

    [SkippableFact]
    public void Folder_without_permission_is_reported()
    {
        Skip.If(OperatingSystem.IsWindows() || Environment.IsPrivilegedProcess, "Permission bits do not bind this user.");
        using TemporaryFolder folder = new();
        string path = Directory.CreateDirectory(folder.Sub("closed")).FullName;
#pragma warning disable CA1416 // Skipped on Windows above.
        File.SetUnixFileMode(path, UnixFileMode.UserRead | UnixFileMode.UserExecute);
        Assert.Contains("permission", Assert.Throws<RunStoreException>(() => RunFolder.Create(Path.Combine(path, "a"), Sample.Inputs())).Message, StringComparison.OrdinalIgnoreCase);
        File.SetUnixFileMode(path, UnixFileMode.UserRead | UnixFileMode.UserWrite | UnixFileMode.UserExecute);
#pragma warning restore CA1416
    }

    private static void AssertReadOnly(Action act, string path)
    {
        RunStoreException error = Assert.Throws<RunStoreException>(act);
        Assert.Equal(RunStoreProblem.Storage, error.Problem);
        Assert.Contains(path, error.Message, StringComparison.Ordinal);
        Assert.Contains("read-only", error.Message, StringComparison.OrdinalIgnoreCase);
    }

    private static void AssertSameAsUninterrupted(TemporaryFolder folder, string path)
    {
        string whole = folder.Sub("whole");
        Sample.Run(RunFolder.Create(whole, Sample.Inputs()));
        DiskFiles files = new();
        Assert.Equal(Sample.Fingerprint(files, whole), Sample.Fingerprint(files, path));
    }

    private static void Fill(string path, bool now)
    {
        if (!now)
            return;
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

    /// <summary>A read-only bind mount over the run folder, put there while the run has its lock file open.</summary>
    private sealed class ReadOnlyView : IDisposable
    {
        private Mount? _view;

        public void Close(bool now, string path)
        {
            if (now)
                _view = Mount.ReadOnlyBind(path);
        }

        public void Dispose()
        {
            _view?.Dispose();
            _view = null;
        }
    }
}
