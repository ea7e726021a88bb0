using System.Runtime.ExceptionServices;
using System.Text;
using TensorRG.Models;
using TensorRG.Physics.Measurements;

namespace TensorRG.Runs.Points;

/// <summary>One process working on one sweep, under its lock.</summary>
internal sealed class SweepSession
{
    private readonly SweepFolder _sweep;
    private readonly Func<IMeasurer> _createMeasurer;
    private readonly SweepOptions _options;
    private readonly PointResult?[] _points;
    private readonly List<string> _notices = [];
    private readonly Lock _store = new();
    private readonly Queue<int> _open = new();
    private Exception? _failure;
    private int _computed;

    public SweepSession(SweepFolder sweep, Func<IMeasurer> createMeasurer, SweepOptions options)
    {
        _sweep = sweep;
        _createMeasurer = createMeasurer;
        _options = options;
        _points = new PointResult?[sweep.Inputs.Count];
    }

    private IRunFiles Files => _sweep.Files;

    public SweepOutcome Run(CancellationToken stop)
    {
        Prepare();
        Load();
        _options.Started?.Invoke(new SweepStart(_points.Length - _open.Count, _points.Length, [.. _notices]));
        using (var linked = CancellationTokenSource.CreateLinkedTokenSource(stop))
            WorkInParallel(linked);
        int done = _points.Count(static p => p is not null);
        if (done < _points.Length)
            return new SweepOutcome(RunStatus.Stopped, done, _computed, []);
        _options.Completed?.Invoke([.. _points!]);
        return new SweepOutcome(RunStatus.Completed, done, _computed, [.. _points!]);
    }

    private void Prepare()
    {
        Files.DeleteLeftovers(_sweep.Path);
        if (!Files.FolderExists(_sweep.PointsPath))
            Files.CreateFolder(_sweep.PointsPath);
        Files.DeleteLeftovers(_sweep.PointsPath);
        if (_sweep.Inputs.Definition is { } text && !Files.FileExists(Path.Combine(_sweep.Path, RunFiles.ModelText)))
            Files.Replace(_sweep.Path, RunFiles.ModelText, Encoding.UTF8.GetBytes(text));
    }

    private void Load()
    {
        var present = Files.List(_sweep.PointsPath).ToHashSet(StringComparer.Ordinal);
        for (int i = 0; i < _points.Length; i++)
        {
            if (present.Contains(RunFiles.Point(i)))
                _points[i] = Load(i);
            if (_points[i] is null)
                _open.Enqueue(i);
        }
    }

    private PointResult? Load(int index)
    {
        (PointResult? result, string defect) = PointFile.Read(_sweep.Inputs.PointIdentity(index), Files.Read(_sweep.PointPath(index)));
        if (result is null)
            _notices.Add($"{RunFiles.Points}/{RunFiles.Point(index)} was changed or damaged and is computed again: {defect}.");
        return result;
    }

    private void WorkInParallel(CancellationTokenSource stop)
    {
        int workers = Math.Min(_options.Concurrency, _open.Count);
        Thread[] threads = [.. Enumerable.Range(0, Math.Max(0, workers - 1)).Select(_ => new Thread(() => Work(stop)))];
        foreach (Thread thread in threads)
            thread.Start();
        if (workers > 0)
            Work(stop);
        foreach (Thread thread in threads)
            thread.Join();
        if (_failure is not null)
            ExceptionDispatchInfo.Throw(_failure);
    }

    /// <summary>One worker: takes points until none is left. What ends it ends the others too.</summary>
    private void Work(CancellationTokenSource stop)
    {
        try
        {
            IMeasurer measurer = _createMeasurer();
            while (!stop.IsCancellationRequested && Next() is { } index)
                Store(index, Measure(measurer, _sweep.Inputs.At(index), stop.Token));
        }
        catch (OperationCanceledException) when (stop.IsCancellationRequested)
        {
            // The point at work is dropped; it was asked for.
        }
#pragma warning disable CA1031 // Thrown again on the thread that started the workers.
        catch (Exception e)
#pragma warning restore CA1031
        {
            Interlocked.CompareExchange(ref _failure, e, null);
            stop.Cancel();
        }
    }

    private int? Next()
    {
        lock (_store)
            return _open.TryDequeue(out int index) ? index : null;
    }

    /// <summary>A failure that lies in the numbers or the model belongs to the point; it would come again.</summary>
    private static PointResult Measure(IMeasurer measurer, MeasurementInputs inputs, CancellationToken stop)
    {
        try
        {
            return PointResult.Of(measurer.Measure(inputs, null, stop));
        }
        catch (Exception e) when (e is ArithmeticException or ModelException)
        {
            return PointResult.Failed(e.Message);
        }
    }

    private void Store(int index, PointResult result)
    {
        SweepInputs inputs = _sweep.Inputs;
        byte[] bytes = PointFile.Write(inputs.PointIdentity(index), inputs.At(index).Parameters, result);
        lock (_store)
        {
            if (_failure is not null)
                return;
            Files.Replace(_sweep.PointsPath, RunFiles.Point(index), bytes);
            _points[index] = result;
            _computed++;
            _options.PointDone?.Invoke(index, result);
        }
    }
}
