using System.Text.Json.Nodes;
using TensorRG.CoarseGraining;

namespace TensorRG.Runs;

/// <summary>One process working on one run, under its lock.</summary>
internal sealed class RunSession
{
    /// <summary>Steps 0 and 1: flow.csv is written just before the first checkpoint, and a kill may fall in between.</summary>
    private const int RowsBeforeFirstCheckpoint = 2;

    private readonly RunFolder _run;
    private readonly IFlow _flow;
    private readonly RunOptions _options;
    private readonly CheckpointPolicy _policy;
    private readonly CheckpointStore _store;
    private readonly List<StepRecord> _records = [];
    private readonly List<string> _notices = [];

    public RunSession(RunFolder run, IFlow flow, RunOptions options)
    {
        if (flow.Step != 0)
            throw new ArgumentException("The flow must be at step 0.", nameof(flow));
        _run = run;
        _flow = flow;
        _options = options;
        _policy = options.Checkpoints ?? new CheckpointPolicy();
        _store = new CheckpointStore(run.Files, run.Path, run.Identity, run.Inputs.Steps);
    }

    public RunOutcome Run(Func<IFlow, JsonObject> summarize, CancellationToken stop)
    {
        _policy.Start();
        _run.Files.DeleteLeftovers(_run.Path);
        Begin();
        int first = _flow.Step;
        while (_flow.Step < _run.Inputs.Steps)
        {
            if (stop.IsCancellationRequested)
                return Stop(first);
            Advance();
        }

        JsonObject result = Finish(summarize);
        return new RunOutcome
        {
            Status = RunStatus.Completed,
            Step = _flow.Step,
            StepsDone = _flow.Step - first,
            Result = result,
            CheckpointSeconds = _policy.Spent.TotalSeconds,
        };
    }

    private void Begin()
    {
        if (_run.Files.FileExists(_run.FilePath(RunFiles.Result)))
            _notices.Add($"{RunFiles.Result} was damaged and is written again from the last checkpoint.");
        LoadedCheckpoint loaded = _store.Load();
        _notices.AddRange(loaded.Refused.Select(r => $"Checkpoint {r.Name} was passed over: {r.Reason}."));
        IReadOnlyList<StepRecord> timed = ReadTimes();
        if (loaded.Snapshot is { } snapshot)
            _flow.Restore(snapshot);
        else if (timed.Count > RowsBeforeFirstCheckpoint)
            _notices.Add("There is no checkpoint although steps were done; they are computed again.");
        _store.SetAside(loaded);
        _store.DeleteOld();
        _records.AddRange(loaded.Snapshot is null ? _flow.Records : _flow.Records.Select(r => WithTime(r, timed)));
        _options.Started?.Invoke(new RunStart(_flow.Step, [.. _records], _notices));
    }

    /// <summary>Checkpoints hold no times, or reruns would differ; those of earlier steps are in flow.csv alone.</summary>
    private static StepRecord WithTime(StepRecord record, IReadOnlyList<StepRecord> timed) =>
        record with { Seconds = record.Step < timed.Count ? timed[record.Step].Seconds : double.NaN };

    /// <summary>The rows of an earlier flow.csv, wanted for their times alone.</summary>
    private IReadOnlyList<StepRecord> ReadTimes()
    {
        string path = _run.FilePath(RunFiles.Flow);
        if (!_run.Files.FileExists(path))
            return [];
        FlowContent content = FlowTable.Read(_run.Identity, _run.Files.Read(path));
        if (content.Defect is { } defect)
            _notices.Add($"{RunFiles.Flow} was damaged ({defect}) and is written again; some step times are lost.");
        return content.Records;
    }

    private void Advance()
    {
        StepRecord record;
        try
        {
            record = _flow.Advance();
        }
        catch (ArithmeticException)
        {
            // The records up to the failure are what one needs to understand it.
            SaveFlow();
            throw;
        }

        _records.Add(record);
        if (_flow.Step < _run.Inputs.Steps && _policy.IsDue())
            Save();
        _options.StepDone?.Invoke(record);
    }

    private RunOutcome Stop(int first)
    {
        Save();
        return new RunOutcome
        {
            Status = RunStatus.Stopped,
            Step = _flow.Step,
            StepsDone = _flow.Step - first,
            CheckpointSeconds = _policy.Spent.TotalSeconds,
        };
    }

    /// <summary>The result comes last: where it is, everything else is complete.</summary>
    private JsonObject Finish(Func<IFlow, JsonObject> summarize)
    {
        Save();
        byte[] bytes = RunResult.Write(_run, summarize(_flow));
        _run.Files.Replace(_run.Path, RunFiles.Result, bytes);
        return RunResult.Read(_run, bytes);
    }

    /// <summary>flow.csv first: a checkpoint whose step times are on no disk would lose them.</summary>
    private void Save() => _policy.Measure(() =>
    {
        SaveFlow();
        if (_store.NewestGood != _flow.Step)
            _store.Save(_flow.Save());
    });

    private void SaveFlow() => _run.Files.Replace(_run.Path, RunFiles.Flow, FlowTable.Write(_run.Identity, _records));
}
