using System.Diagnostics;
using Spectre.Console;
using TensorRG.CoarseGraining;
using TensorRG.Reports;
using TensorRG.Runs;

namespace TensorRG.Cli.Output;

/// <summary>
/// The table of steps, a line as each is done. On a terminal a last line below it says how far the run is and how long
/// it will take; it is overwritten and leaves no trace.
/// </summary>
/// <param name="console">Where to.</param>
/// <param name="label">For one run among many: its name in the last line, and no table. Null for a run on its own.</param>
internal sealed class LiveDisplay(IAnsiConsole console, string? label = null) : IStepDisplay
{
    private readonly bool _hasStatus = console.Profile.Capabilities.Interactive && console.Profile.Capabilities.Ansi;
    private readonly List<(int Step, long Time)> _times = [];
    private StepRecord? _previous;
    private int _steps;

    public void Start(RunStart start, int steps)
    {
        _steps = steps;
        foreach (string notice in start.Notices)
            console.WriteLine(notice);
        if (label is null)
            StartTable(start);
        Mark(start.Step);
        Status(start.Step);
    }

    public void Show(StepRecord record)
    {
        ClearStatus();
        if (label is null)
            WriteLine(record);
        Mark(record.Step);
        Status(record.Step);
    }

    public void Dispose() => ClearStatus();

    private void StartTable(RunStart start)
    {
        if (start.Step > 0)
            console.WriteLine(FormattableString.Invariant($"Resumed after step {start.Step}."));
        console.WriteLine(StepLine.Header);
        foreach (StepRecord record in start.Records)
            WriteLine(record);
    }

    private void WriteLine(StepRecord record)
    {
        console.WriteLine(StepLine.Of(record, _previous));
        _previous = record;
    }

    private void Mark(int step)
    {
        _times.Add((step, Stopwatch.GetTimestamp()));
        if (_times.Count > 5)
            _times.RemoveAt(0);
    }

    private void Status(int step)
    {
        if (!_hasStatus || step >= _steps)
            return;
        string left = _times.Count < 2 ? "" : ", about " + NumberFormat.Duration(Left(step)) + " left";
        console.Write(new Text(FormattableString.Invariant($"{(label is null ? "" : label + ": ")}step {step} of {_steps}{left}, Ctrl+C stops after this step"), new Style(decoration: Decoration.Dim)));
    }

    private double Left(int step)
    {
        (int first, long begin) = _times[0];
        return Stopwatch.GetElapsedTime(begin, _times[^1].Time).TotalSeconds / (step - first) * (_steps - step);
    }

    private void ClearStatus()
    {
        if (_hasStatus)
            console.Write(new ControlCode("\r\u001b[2K"));
    }
}
