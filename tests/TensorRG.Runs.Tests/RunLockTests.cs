using System.Diagnostics;
using System.Globalization;

namespace TensorRG.Runs.Tests;

public class RunLockTests
{
    [Fact]
    public void Second_process_is_told_who_holds_the_run_and_kill_releases_it()
    {
        using TemporaryFolder folder = new();
        Process child = ChildProcess.Start("hold", folder.Path);
        string id = child.Id.ToString(CultureInfo.InvariantCulture);
        try
        {
            RunStoreException refused = Assert.Throws<RunStoreException>(() => RunLock.Take(folder.Path));
            Assert.Equal(RunStoreProblem.InUse, refused.Problem);
            Assert.Contains($"process {id} on {Environment.MachineName} since ", refused.Message, StringComparison.Ordinal);
            Assert.Contains(folder.Path, refused.Message, StringComparison.Ordinal);
        }
        finally
        {
            ChildProcess.Kill(child);
        }

        Assert.True(File.Exists(folder.Sub("run.lock")) && File.Exists(folder.Sub("run.owner")), "The killed process left no trace to ignore.");
        RunLock.Take(folder.Path).Dispose();
    }

    [Fact]
    public void Driver_refuses_a_run_in_use_and_changes_nothing()
    {
        using TemporaryFolder folder = new();
        RunFolder run = RunFolder.Create(folder.Path, Sample.Inputs());
        using RunLock held = RunLock.Take(folder.Path);
        string[] before = Directory.GetFiles(folder.Path);
        Assert.Equal(RunStoreProblem.InUse, Assert.Throws<RunStoreException>(() => Sample.Run(run)).Problem);
        Assert.Equal(before, Directory.GetFiles(folder.Path));
    }

    [Fact]
    public void Released_lock_can_be_taken_again()
    {
        using TemporaryFolder folder = new();
        for (int i = 0; i < 3; i++)
        {
            using RunLock held = RunLock.Take(folder.Path);
            Assert.Throws<RunStoreException>(() => RunLock.Take(folder.Path));
        }
    }

    [Fact]
    public void Stale_lock_and_owner_files_do_not_block()
    {
        using TemporaryFolder folder = new();
        File.WriteAllText(folder.Sub("run.lock"), "left behind");
        File.WriteAllText(folder.Sub("run.owner"), "process 1 on elsewhere");
        RunLock.Take(folder.Path).Dispose();
    }
}
