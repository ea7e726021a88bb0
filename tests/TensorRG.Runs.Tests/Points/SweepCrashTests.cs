using TensorRG.Runs.Points;

namespace TensorRG.Runs.Tests.Points;

/// <summary>Death and failure at every single file operation of a sweep.</summary>
public class SweepCrashTests
{
    private const string Folder = "/runs/a";
    private readonly string _expected = Uninterrupted();

    [Theory]
    [InlineData(CrashKind.Kill)]
    [InlineData(CrashKind.PowerCut)]
    [InlineData(CrashKind.PowerCutAfterNames)]
    public void Death_at_every_point_loses_no_stored_point_and_changes_no_bit(CrashKind kind)
    {
        int at = 1;
        for (; ; at++)
        {
            MemoryFiles files = new() { DieAt = at };
            int stored = RunUntilDeath(files);
            if (files.Points < at)
                break;
            files = files.Survivor(kind);
            SweepStart? start = null;
            SweepSample.Run(Open(files), new SweepOptions { Started = s => start = s });
            Assert.True(start!.Done >= stored, $"Operation {at}: {stored} points were stored, {start.Done} were found.");
            Assert.Empty(start.Notices);
            Assert.Equal(_expected, SweepSample.Fingerprint(files, Folder));
            Assert.DoesNotContain(files.Names, static n => n.EndsWith(".tmp", StringComparison.Ordinal));
        }

        Assert.True(at > 50, $"Only {at} operations: the file system is not in use.");
    }

    [Fact]
    public void Failure_at_every_point_is_reported_with_path_and_remedy_and_changes_no_bit()
    {
        int at = 1;
        for (; ; at++)
        {
            MemoryFiles files = new() { FailAt = at };
            RunStoreException? failure = Record.Exception(() => SweepSample.Run(Open(files))) as RunStoreException;
            if (files.Points < at)
                break;
            Assert.True(failure is null || failure.Message.Contains(Folder, StringComparison.Ordinal), failure?.Message);
            Assert.True(failure is null || failure.Message.Contains("free some space", StringComparison.Ordinal), failure?.Message);
            SweepSample.Run(Open(files));
            Assert.Equal(_expected, SweepSample.Fingerprint(files, Folder));
        }

        Assert.True(at > 50, $"Only {at} operations: the file system is not in use.");
    }

    private static string Uninterrupted()
    {
        MemoryFiles files = new();
        SweepSample.Run(Open(files));
        return SweepSample.Fingerprint(files, Folder);
    }

    private static SweepFolder Open(MemoryFiles files)
        => SweepFolder.OpenOrCreate(new GuardedFiles(files), Folder, SweepSample.Inputs("text of the model"), null);

    /// <summary>Returns how many points were announced as stored.</summary>
    private static int RunUntilDeath(MemoryFiles files)
    {
        int stored = 0;
        Exception? end = Record.Exception(() => SweepSample.Run(Open(files), new SweepOptions { PointDone = (_, _) => stored++ }));
        Assert.True(end is null or SimulatedDeathException, end?.ToString());
        return stored;
    }
}
