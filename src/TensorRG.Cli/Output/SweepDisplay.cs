using System.Diagnostics;
using Spectre.Console;
using TensorRG.Reports;
using TensorRG.Runs.Points;

namespace TensorRG.Cli.Output;

/// <summary>Shows a sweep while it goes on: notices about damage, and on a terminal how far it is.</summary>
/// <param name="output">Where progress goes; null for none.</param>
/// <param name="errors">Where notices go that must not mix with the output.</param>
internal sealed class SweepDisplay(IAnsiConsole? output, IAnsiConsole errors) : IDisposable
{
    private readonly StatusLine? _status = output is null ? null : new StatusLine(output);
    private long _begin;
    private int _count;
    private int _before;
    private int _done;

    public void Start(SweepStart start)
    {
        foreach (string notice in start.Notices)
            (output ?? errors).WriteLine(notice);
        (_begin, _count, _before, _done) = (Stopwatch.GetTimestamp(), start.Count, start.Done, start.Done);
        if (start.Done > 0)
            output?.WriteLine(FormattableString.Invariant($"{start.Done} of {start.Count} points were stored before."));
        Status();
    }

    public void Show(int index, PointResult result)
    {
        _done++;
        Status();
    }

    public void Dispose() => _status?.Dispose();

    private void Status()
    {
        if (_done >= _count)
        {
            _status?.Clear();
            return;
        }

        double each = Stopwatch.GetElapsedTime(_begin).TotalSeconds / Math.Max(1, _done - _before);
        string left = _done == _before ? "" : $", about {NumberFormat.Duration(each * (_count - _done))} left";
        _status?.Report(FormattableString.Invariant($"{_done} of {_count} points{left}, Ctrl+C stops and keeps them"));
    }
}
