namespace TensorRG.Runs.Tests;

/// <summary>Ends the process at every point of the run in turn: the next one must come to the same bits.</summary>
public class CrashTests
{
    private const string Folder = "/runs/a";
    private const int MostDeaths = 1000;
    private readonly string _expected = Uninterrupted();

    [Theory]
    [InlineData(CrashKind.Kill)]
    [InlineData(CrashKind.PowerCut)]
    [InlineData(CrashKind.PowerCutAfterNames)]
    public void Death_at_every_point_loses_no_stored_step_and_changes_no_bit(CrashKind kind)
    {
        int point = 1;
        for (; ; point++)
        {
            MemoryFiles files = new() { DieAt = point };
            int stored = RunUntilDeath(files);
            if (files.Points < point)
                break;
            files = files.Survivor(kind);
            int resumedFrom = Complete(files);
            Assert.True(resumedFrom >= stored, $"Point {point}: step {stored} was stored, but step {resumedFrom} was resumed.");
            Assert.Equal(_expected, Sample.Fingerprint(files, Folder));
            AssertClean(files);
        }

        Assert.True(point > 100, $"Only {point} points: the file system is not in use.");
    }

    [Theory]
    [InlineData(CrashKind.Kill)]
    [InlineData(CrashKind.PowerCut)]
    [InlineData(CrashKind.PowerCutAfterNames)]
    public void Many_deaths_in_one_run_change_no_bit(CrashKind kind)
    {
        for (int seed = 0; seed < 50; seed++)
        {
            Random random = new(seed);
            MemoryFiles files = new() { DieAt = random.Next(1, 60) };
            int deaths = 0;
            while (true)
            {
                RunUntilDeath(files);
                if (files.Points < files.DieAt)
                    break;
                deaths++;
                Assert.True(deaths < MostDeaths, $"Seed {seed}: the run does not get on.");
                files = files.Survivor(kind, random.Next(1, 60));
            }

            Assert.True(deaths > 0 && Sample.Fingerprint(files.Survivor(CrashKind.Kill), Folder) == _expected, $"Seed {seed}, {deaths} deaths.");
        }
    }

    [Fact]
    public void Failure_at_every_point_is_reported_with_path_and_remedy_and_changes_no_bit()
    {
        int point = 1;
        for (; ; point++)
        {
            MemoryFiles files = new() { FailAt = point };
            RunStoreException? failure = null;
            try
            {
                Sample.Run(Open(files));
            }
            catch (RunStoreException e)
            {
                failure = e;
            }

            if (files.Points < point)
                break;
            Assert.True(failure is null || failure.Message.Contains(Folder, StringComparison.Ordinal), failure?.Message);
            Assert.True(failure is null || failure.Message.Contains("free some space", StringComparison.Ordinal), failure?.Message);
            Sample.Run(Open(files));
            Assert.Equal(_expected, Sample.Fingerprint(files, Folder));
            AssertClean(files);
        }

        Assert.True(point > 100, $"Only {point} points: the file system is not in use.");
    }

    private static string Uninterrupted()
    {
        MemoryFiles files = new();
        Sample.Run(Open(files));
        return Sample.Fingerprint(files, Folder);
    }

    private static RunFolder Open(MemoryFiles files) =>
        RunFolder.OpenOrCreate(new GuardedFiles(files), Folder, Sample.Inputs(), null);

    /// <summary>Returns the last step whose end was announced, which is after it was stored.</summary>
    private static int RunUntilDeath(MemoryFiles files)
    {
        int stored = 0;
        try
        {
            RunOptions options = new() { Checkpoints = Sample.EveryStep, StepDone = r => stored = r.Step };
            Sample.Run(Open(files), options);
        }
        catch (SimulatedDeathException)
        {
        }

        // The last step is announced before it is stored with the result.
        return stored == Sample.Steps ? Sample.Steps - 1 : stored;
    }

    /// <summary>Returns the step that was resumed from, after checking that the times up to it were not lost.</summary>
    private static int Complete(MemoryFiles files)
    {
        RunStart? start = null;
        Sample.Run(Open(files), new RunOptions { Checkpoints = Sample.EveryStep, Started = s => start = s });
        Assert.All(start?.Records ?? [], r => Assert.True(double.IsFinite(r.Seconds)));
        Assert.Empty(start?.Notices ?? []);
        return start?.Step ?? Sample.Steps;
    }

    /// <summary>Two generations, no half-written files.</summary>
    private static void AssertClean(MemoryFiles files)
    {
        Assert.DoesNotContain(files.Names, n => n.EndsWith(".tmp", StringComparison.Ordinal));
        Assert.Equal(2, files.Names.Count(n => RunFiles.TryReadState(n, out _)));
    }
}
