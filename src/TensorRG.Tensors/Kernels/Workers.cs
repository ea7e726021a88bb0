using System.Runtime.ExceptionServices;

namespace TensorRG.Tensors.Kernels;

/// <summary>
/// A fork-join team: the caller and <c>Threads - 1</c> background threads share the parts of one call. Threads spin for
/// some ten microseconds after a call and then block, so that calls in close succession start within a microsecond and
/// an idle team costs nothing. A call allocates nothing. A call made while the team is busy, from a part or from another thread,
/// runs inline on its caller.
/// </summary>
public sealed class Workers : IDisposable
{
    private const int SpinRounds = 1000;
    private const long CountMask = 0xFFFFFFFF;

    private readonly Thread[] _team;
    private readonly object _gate = new();

    // Call number in the high half, parts nobody has claimed in the low half: one compare-exchange claims a part and
    // proves that the call is still the one whose body was read.
    private long _ticket;
    private int _busy;
    private int _sleepers;
    private int _unfinished;
    private int _parts;
    private Action<int>? _body;
    private Exception? _failure;
    private volatile bool _disposed;

    /// <summary>A team of the given size; one thread means that every call runs inline.</summary>
    /// <param name="threads">Number of threads that share the work, the caller included, at least 1.</param>
    public Workers(int threads)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(threads, 1);
        Threads = threads;
        _team = new Thread[threads - 1];
        for (int i = 0; i < _team.Length; i++)
        {
            _team[i] = new Thread(Serve) { IsBackground = true, Name = $"TensorRG worker {i + 1}" };
            _team[i].Start();
        }
    }

    /// <summary>Number of threads that share the work, the caller included.</summary>
    public int Threads { get; }

    /// <summary>
    /// Runs body(0) .. body(parts - 1), each exactly once, in no fixed order and on any thread of the team, and returns when
    /// all have finished. If a part throws, parts not yet begun are dropped and the first exception is rethrown here.
    /// </summary>
    /// <param name="parts">Number of parts, at least 0.</param>
    /// <param name="body">The work of one part. Keep the delegate in a field to avoid allocating it per call.</param>
    /// <exception cref="ObjectDisposedException">The team was disposed.</exception>
    public void Run(int parts, Action<int> body)
    {
        ArgumentNullException.ThrowIfNull(body);
        ArgumentOutOfRangeException.ThrowIfNegative(parts);
        ObjectDisposedException.ThrowIf(_disposed, this);
        if (_team.Length == 0 || parts < 2 || Interlocked.CompareExchange(ref _busy, 1, 0) != 0)
        {
            for (int part = 0; part < parts; part++)
                body(part);
            return;
        }

        Exception? failure = RunShared(parts, body);
        Volatile.Write(ref _busy, 0);
        if (failure is not null)
            ExceptionDispatchInfo.Throw(failure);
    }

    /// <summary>Ends the background threads. A call still running finishes on its caller.</summary>
    public void Dispose()
    {
        _disposed = true;
        lock (_gate)
            Monitor.PulseAll(_gate);
    }

    private Exception? RunShared(int parts, Action<int> body)
    {
        _failure = null;
        _body = body;
        _parts = parts;
        Volatile.Write(ref _unfinished, parts);
        long call = (Volatile.Read(ref _ticket) >> 32) + 1;
        Interlocked.Exchange(ref _ticket, (call << 32) | (uint)parts);
        if (Volatile.Read(ref _sleepers) > 0)
        {
            lock (_gate)
                Monitor.PulseAll(_gate);
        }

        while (TryRunPart())
        {
        }

        var wait = default(SpinWait);
        while (Volatile.Read(ref _unfinished) != 0)
            wait.SpinOnce(sleep1Threshold: -1);
        _body = null;
        return _failure;
    }

    private void Serve()
    {
        while (!_disposed)
        {
            if (!TryRunPart() && !SpinForWork())
                Sleep();
        }
    }

    /// <summary>Claims and runs one part; false when none is left.</summary>
    private bool TryRunPart()
    {
        while (true)
        {
            long ticket = Volatile.Read(ref _ticket);
            int left = (int)(ticket & CountMask);
            if (left == 0)
                return false;
            Action<int>? body = _body;
            int part = _parts - left;
            if (Interlocked.CompareExchange(ref _ticket, ticket - 1, ticket) != ticket)
                continue;
            Execute(body!, part);
            return true;
        }
    }

    private void Execute(Action<int> body, int part)
    {
        try
        {
            if (Volatile.Read(ref _failure) is null)
                body(part);
        }
#pragma warning disable CA1031 // Whatever a part throws is handed to the caller of Run; nothing is swallowed.
        catch (Exception e)
#pragma warning restore CA1031
        {
            Interlocked.CompareExchange(ref _failure, e, null);
        }

        Interlocked.Decrement(ref _unfinished);
    }

    private bool HasWork() => (Volatile.Read(ref _ticket) & CountMask) != 0;

    private bool SpinForWork()
    {
        for (int round = 0; round < SpinRounds; round++)
        {
            if (HasWork() || _disposed)
                return true;
            Thread.SpinWait(4);
        }

        return false;
    }

    private void Sleep()
    {
        lock (_gate)
        {
            // The caller publishes the ticket and then looks for sleepers; we announce ourselves and then look at the
            // ticket. Both steps are full fences, so one of the two sees the other.
            Interlocked.Increment(ref _sleepers);
            while (!HasWork() && !_disposed)
                Monitor.Wait(_gate);
            Interlocked.Decrement(ref _sleepers);
        }
    }
}
