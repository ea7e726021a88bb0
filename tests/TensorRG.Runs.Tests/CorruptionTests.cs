using System.Text;

namespace TensorRG.Runs.Tests;

/// <summary>Damage to any file is found; a wrong number never gets through.</summary>
public class CorruptionTests
{
    private const string Folder = "/runs/a";
    private const int StoppedAt = 4;
    private readonly string _expected;
    private readonly MemoryFiles _files = new();
    private readonly RunFolder _run;

    public CorruptionTests()
    {
        MemoryFiles whole = new();
        Sample.Run(RunFolder.Create(new GuardedFiles(whole), Folder, Sample.Inputs(), null));
        _expected = Sample.Fingerprint(whole, Folder);
        _run = RunFolder.Create(new GuardedFiles(_files), Folder, Sample.Inputs(), null);
        RunUntil(_run, StoppedAt);
    }

    [Fact]
    public void Any_changed_byte_of_the_newest_checkpoint_leads_to_the_older_one()
    {
        byte[] good = _files.Read(State(StoppedAt));
        for (int i = 0; i < good.Length; i++)
            AssertOlderIsUsed(Flip(good, i, i % 8));
    }

    [Fact]
    public void Any_flipped_bit_of_the_seal_is_found()
    {
        byte[] good = _files.Read(State(StoppedAt));
        for (int i = 0; i < 8 * CheckpointFile.SealBytes; i++)
            Assert.Throws<RunStoreException>(() => CheckpointFile.Read(Flip(good, i / 8, i % 8), _run.Identity, StoppedAt));
    }

    [Fact]
    public void Truncated_or_extended_checkpoint_leads_to_the_older_one()
    {
        byte[] good = _files.Read(State(StoppedAt));
        Random random = new(3);
        foreach (int length in Enumerable.Range(0, 200).Select(_ => random.Next(good.Length)).Append(0).Append(512).Append(good.Length - 1))
            AssertOlderIsUsed(good[..length]);
        AssertOlderIsUsed([.. good, 0]);
        AssertOlderIsUsed(new byte[good.Length]);
    }

    [Theory]
    [InlineData(null)]
    [InlineData(100)]
    [InlineData(3000)]
    public void Run_goes_on_from_the_older_generation_to_the_same_bits(int? damagedByte)
    {
        byte[] good = _files.Read(State(StoppedAt));
        _files.Damage(State(StoppedAt), damagedByte is { } at ? Flip(good, at, 5) : null);
        RunStart? start = null;
        Sample.Run(_run, new RunOptions { Checkpoints = Sample.EveryStep, Started = s => start = s });
        Assert.Equal(StoppedAt - 1, start!.Step);
        Assert.Equal(damagedByte is null ? 0 : 1, start.Notices.Count);
        Assert.Equal(_expected, Sample.Fingerprint(_files, Folder));
        Assert.Equal(damagedByte is not null, _files.Names.Contains("state-000004.h5.damaged"));
    }

    [Fact]
    public void Checkpoint_under_the_name_of_another_step_is_refused()
    {
        _files.Damage(State(StoppedAt), _files.Read(State(StoppedAt - 1)));
        LoadedCheckpoint loaded = Store().Load();
        Assert.Equal(StoppedAt - 1, loaded.Snapshot!.Step);
        Assert.Contains("another step", Assert.Single(loaded.Refused).Reason, StringComparison.Ordinal);
    }

    [Fact]
    public void Checkpoint_of_another_run_is_refused()
    {
        MemoryFiles others = new();
        RunFolder other = RunFolder.Create(new GuardedFiles(others), Folder, Sample.Inputs(seed: 43), null);
        RunUntil(other, StoppedAt);
        _files.Damage(State(StoppedAt), others.Read(State(StoppedAt)));
        Assert.Contains("another run", Assert.Single(Store().Load().Refused).Reason, StringComparison.Ordinal);
    }

    [Fact]
    public void Checkpoint_beyond_the_last_step_is_refused()
    {
        _files.Damage(State(99), _files.Read(State(StoppedAt)));
        Assert.Contains("beyond", Assert.Single(Store().Load().Refused).Reason, StringComparison.Ordinal);
    }

    [Fact]
    public void No_good_checkpoint_is_a_clear_error_that_changes_nothing()
    {
        foreach (int step in new[] { StoppedAt - 1, StoppedAt })
            _files.Damage(State(step), Flip(_files.Read(State(step)), 2000, 0));
        string[] names = [.. _files.Names.Order()];
        RunStoreException error = Assert.Throws<RunStoreException>(() => Sample.Run(_run));
        Assert.Equal(RunStoreProblem.Damaged, error.Problem);
        Assert.Contains("state-000004.h5", error.Message, StringComparison.Ordinal);
        Assert.Contains("state-000003.h5", error.Message, StringComparison.Ordinal);
        Assert.Contains("backup", error.Message, StringComparison.Ordinal);
        Assert.Equal(names, _files.Names.Order());
    }

    [Fact]
    public void Without_any_checkpoint_the_run_is_computed_again_with_a_notice()
    {
        _files.Damage(State(StoppedAt), null);
        _files.Damage(State(StoppedAt - 1), null);
        RunStart? start = null;
        Sample.Run(_run, new RunOptions { Started = s => start = s });
        Assert.Equal(0, start!.Step);
        Assert.Contains("no checkpoint", Assert.Single(start.Notices), StringComparison.Ordinal);
        Assert.Equal(_expected, Sample.Fingerprint(_files, Folder));
    }

    [Fact]
    public void Any_flipped_bit_of_run_json_is_refused()
    {
        string path = Folder + "/run.json";
        byte[] good = _files.Read(path);
        for (int i = 0; i < 8 * good.Length; i++)
        {
            _files.Damage(path, Flip(good, i / 8, i % 8));
            RunStoreException error = Assert.Throws<RunStoreException>(() => RunFolder.Open(new GuardedFiles(_files), Folder));
            Assert.True(error.Problem is RunStoreProblem.Damaged or RunStoreProblem.OtherVersion, error.Message);
        }
    }

    [Fact]
    public void Any_flipped_bit_of_the_result_is_refused_and_the_run_writes_it_again()
    {
        Sample.Run(_run);
        string path = Folder + "/result.json";
        byte[] good = _files.Read(path);
        for (int i = 0; i < 8 * good.Length; i++)
        {
            _files.Damage(path, Flip(good, i / 8, i % 8));
            Assert.Equal(RunStoreProblem.Damaged, Assert.Throws<RunStoreException>(_run.ReadResult).Problem);
        }

        RunStart? start = null;
        Sample.Run(_run, new RunOptions { Started = s => start = s });
        Assert.Contains("result.json", Assert.Single(start!.Notices), StringComparison.Ordinal);
        Assert.Equal(_expected, Sample.Fingerprint(_files, Folder));
    }

    [Fact]
    public void Result_of_another_run_is_refused()
    {
        MemoryFiles others = new();
        Sample.Run(RunFolder.Create(new GuardedFiles(others), Folder, Sample.Inputs(seed: 43), null));
        _files.Damage(Folder + "/result.json", others.Read(Folder + "/result.json"));
        Assert.Contains("another run", Assert.Throws<RunStoreException>(_run.ReadResult).Message, StringComparison.Ordinal);
        Sample.Run(_run);
        Assert.Equal(_expected, Sample.Fingerprint(_files, Folder));
    }

    [Fact]
    public void Any_flipped_bit_of_the_flow_table_changes_a_time_at_most()
    {
        string path = Folder + "/flow.csv";
        byte[] good = _files.Read(path);
        string expected = Sample.WithoutTimes(good);
        int refused = 0;
        for (int i = 0; i < 8 * good.Length; i++)
        {
            FlowContent content = FlowTable.Read(_run.Identity, Flip(good, i / 8, i % 8));
            if (content.Defect is null)
                Assert.Equal(expected, Sample.WithoutTimes(FlowTable.Write(_run.Identity, content.Records)));
            else
                refused++;
        }

        Assert.True(refused > 7 * good.Length, $"Only {refused} of {8 * good.Length} flips were found.");
    }

    [Fact]
    public void Damaged_flow_table_is_written_again_from_the_checkpoint()
    {
        string path = Folder + "/flow.csv";
        byte[] good = _files.Read(path);
        _files.Damage(path, Encoding.UTF8.GetBytes(Encoding.UTF8.GetString(good).Replace("\n3,", "\n7,", StringComparison.Ordinal)));
        Assert.Equal(RunStoreProblem.Damaged, Assert.Throws<RunStoreException>(_run.ReadFlow).Problem);
        RunStart? start = null;
        Sample.Run(_run, new RunOptions { Started = s => start = s });
        Assert.Contains("flow.csv", Assert.Single(start!.Notices), StringComparison.Ordinal);
        Assert.All(start.Records, r => Assert.Equal(r.Step < 3, double.IsFinite(r.Seconds)));
        Assert.Equal(_expected, Sample.Fingerprint(_files, Folder));
    }

    private static void RunUntil(RunFolder run, int step)
    {
        using CancellationTokenSource stop = new();
        RunOptions options = new()
        {
            Checkpoints = Sample.EveryStep,
            StepDone = r =>
            {
                if (r.Step == step)
                    stop.Cancel();
            },
        };
        Assert.Equal(RunStatus.Stopped, Sample.Run(run, options, stop.Token).Status);
    }

    private static string State(int step) => Path.Combine(Folder, RunFiles.State(step));

    private static byte[] Flip(byte[] bytes, int at, int bit)
    {
        byte[] copy = [.. bytes];
        copy[at] ^= (byte)(1 << bit);
        return copy;
    }

    private void AssertOlderIsUsed(byte[] damaged)
    {
        _files.Damage(State(StoppedAt), damaged);
        LoadedCheckpoint loaded = Store().Load();
        Assert.Equal(StoppedAt - 1, loaded.Snapshot!.Step);
        Assert.Single(loaded.Refused);
    }

    private CheckpointStore Store() => new(new GuardedFiles(_files), Folder, _run.Identity, Sample.Steps);
}
