using System.Text.Json.Nodes;
using TensorRG.CoarseGraining;

namespace TensorRG.Runs.Tests;

public class RunDriverTests
{
    private const string Folder = "/runs/a";
    private readonly MemoryFiles _files = new();

    [Fact]
    public void Run_does_all_steps_and_stores_the_result()
    {
        RunFolder run = Create();
        List<int> announced = [];
        RunStart? start = null;
        RunOutcome outcome = Sample.Run(run, new RunOptions { Started = s => start = s, StepDone = r => announced.Add(r.Step) });
        Assert.Equal(RunStatus.Completed, outcome.Status);
        Assert.Equal(Sample.Steps, outcome.StepsDone);
        Assert.Equal([1, 2, 3, 4, 5, 6], announced);
        Assert.Equal(0, start!.Step);
        Assert.Empty(start.Notices);
        Assert.Single(start.Records);
        FakeFlow flow = Advanced(Sample.Steps);
        string expected = flow.Records[^1].LogZPerSite.ToString("R");
        Assert.Equal(expected, outcome.Result!["logZPerSite"]!.GetValue<double>().ToString("R"));
        Assert.True(JsonNode.DeepEquals(outcome.Result, run.ReadResult()));
    }

    [Fact]
    public void Finished_run_gives_its_result_at_once_and_writes_nothing()
    {
        RunFolder run = Create();
        RunOutcome first = Sample.Run(run);
        MemoryFiles readOnly = _files.Survivor(CrashKind.Kill);
        int before = readOnly.Points;
        RunOutcome again = RunDriver.Run(
            RunFolder.Open(new GuardedFiles(readOnly), Folder),
            () => throw new InvalidOperationException("A finished run needs no flow."),
            Sample.Summarize);
        Assert.Equal(RunStatus.Completed, again.Status);
        Assert.Equal(0, again.StepsDone);
        Assert.Equal(Sample.Steps, again.Step);
        Assert.True(JsonNode.DeepEquals(first.Result, again.Result));
        Assert.Equal(2, readOnly.Points - before);
    }

    [Theory]
    [InlineData(0)]
    [InlineData(1)]
    [InlineData(4)]
    public void Stop_stores_the_state_even_where_none_is_due_and_the_next_call_goes_on(int stopAt)
    {
        RunFolder run = Create();
        using CancellationTokenSource stop = new();
        RunOptions rare = new()
        {
            Checkpoints = new CheckpointPolicy(1e-12),
            Started = s => CancelAt(s.Step, stopAt, stop),
            StepDone = r => CancelAt(r.Step, stopAt, stop),
        };
        RunOutcome stopped = Sample.Run(run, rare, stop.Token);
        Assert.Equal((RunStatus.Stopped, stopAt, stopAt), (stopped.Status, stopped.Step, stopped.StepsDone));
        Assert.Null(stopped.Result);
        Assert.Null(run.ReadResult());
        Assert.Contains(RunFiles.State(stopAt), _files.Names);
        Assert.Equal(stopAt + 1, run.ReadFlow().Count);

        RunStart? start = null;
        RunOutcome done = Sample.Run(run, new RunOptions { Started = s => start = s });
        Assert.Equal(stopAt, start!.Step);
        Assert.Empty(start.Notices);
        Assert.All(start.Records, r => Assert.True(double.IsFinite(r.Seconds)));
        Assert.Equal(Sample.Steps - stopAt, done.StepsDone);
        Assert.Equal(Uninterrupted(), Sample.Fingerprint(_files, Folder));
    }

    [Fact]
    public void Stop_during_the_last_step_finishes_the_run()
    {
        using CancellationTokenSource stop = new();
        RunOptions options = new() { StepDone = r => CancelAt(r.Step, Sample.Steps, stop) };
        Assert.Equal(RunStatus.Completed, Sample.Run(Create(), options, stop.Token).Status);
    }

    [Fact]
    public void Rare_checkpoints_leave_the_same_bits()
    {
        Sample.Run(Create(), new RunOptions { Checkpoints = new CheckpointPolicy(1e-12) });
        Assert.Equal(Uninterrupted(), Sample.Fingerprint(_files, Folder));
    }

    [Fact]
    public void Times_of_earlier_steps_survive_stopping()
    {
        RunFolder run = Create();
        using CancellationTokenSource stop = new();
        Sample.Run(run, new RunOptions { StepDone = r => CancelAt(r.Step, 3, stop) }, stop.Token);
        double[] before = [.. run.ReadFlow().Select(r => r.Seconds)];
        Sample.Run(run);
        Assert.Equal(before, run.ReadFlow().Take(4).Select(r => r.Seconds));
        Assert.All(run.ReadFlow(), r => Assert.True(r.Seconds > 0));
    }

    [Fact]
    public void Run_of_no_steps_has_a_result()
    {
        RunFolder run = RunFolder.Create(new GuardedFiles(_files), Folder, Sample.Inputs(steps: 0), null);
        RunOutcome outcome = RunDriver.Run(run, () => new FakeFlow(1), f => new JsonObject { ["step"] = f.Step });
        Assert.Equal((RunStatus.Completed, 0), (outcome.Status, outcome.Step));
        Assert.Single(run.ReadFlow());
    }

    [Fact]
    public void Failed_step_is_passed_on_and_leaves_the_records_and_the_checkpoint()
    {
        RunFolder run = Create();
        Assert.Throws<ArithmeticException>(() => RunDriver.Run(
            run,
            () => new FakeFlow(42) { FailAtStep = 4 },
            Sample.Summarize,
            new RunOptions { Checkpoints = new CheckpointPolicy(1e-12) }));
        Assert.Equal(5, run.ReadFlow().Count);
        Assert.Null(run.ReadResult());
        Sample.Run(run);
        Assert.Equal(Uninterrupted(), Sample.Fingerprint(_files, Folder));
    }

    [Fact]
    public void Result_that_is_no_json_is_refused_after_the_checkpoint_was_stored()
    {
        RunFolder run = Create();
        Assert.Throws<ArgumentException>(() => RunDriver.Run(
            run, () => new FakeFlow(42), _ => new JsonObject { ["bad"] = double.NaN }));
        Assert.Null(run.ReadResult());
        Assert.Equal(0, Sample.Run(run).StepsDone);
        Assert.Equal(Uninterrupted(), Sample.Fingerprint(_files, Folder));
    }

    [Fact]
    public void Flow_that_has_begun_is_refused() =>
        Assert.Throws<ArgumentException>(() => RunDriver.Run(Create(), () => Advanced(1), Sample.Summarize));

    [Fact]
    public void Snapshot_that_does_not_fit_is_passed_on_and_keeps_the_checkpoints()
    {
        RunFolder run = Create();
        using CancellationTokenSource stop = new();
        Sample.Run(run, new RunOptions { StepDone = r => CancelAt(r.Step, 3, stop) }, stop.Token);
        string[] names = [.. _files.Names.Order()];
        Assert.Throws<SnapshotException>(() => RunDriver.Run(run, () => new UnfittingFlow(), Sample.Summarize));
        Assert.Equal(names, _files.Names.Order());
    }

    private static void CancelAt(int step, int stopAt, CancellationTokenSource stop)
    {
        if (step == stopAt)
            stop.Cancel();
    }

    private static FakeFlow Advanced(int steps)
    {
        FakeFlow flow = new(Sample.Inputs().Seed);
        while (flow.Step < steps)
            flow.Advance();
        return flow;
    }

    private static string Uninterrupted()
    {
        MemoryFiles files = new();
        Sample.Run(RunFolder.Create(new GuardedFiles(files), Folder, Sample.Inputs(), null));
        return Sample.Fingerprint(files, Folder);
    }

    private RunFolder Create() => RunFolder.Create(new GuardedFiles(_files), Folder, Sample.Inputs(), null);

    private sealed class UnfittingFlow : IFlow
    {
        public int Step => 0;

        public IReadOnlyList<StepRecord> Records => [];

        public StepRecord Advance() => throw new NotSupportedException();

        public Snapshot Save() => throw new NotSupportedException();

        public void Restore(Snapshot snapshot) => throw new SnapshotException("bond dimension 8, not 16");
    }
}
