namespace TensorRG.Runs;

/// <summary>
/// Decides after which steps to store a checkpoint: after every step where that costs at most a given share of the
/// time, after fewer where steps are fast. Stopping and finishing store one in any case.
/// </summary>
/// <remarks>
/// A checkpoint is due when the time spent on checkpoints, the next one included at the cost of the last, stays within
/// the share of all time since the start. The first is due after the first step, since its cost is not known before.
/// </remarks>
public sealed class CheckpointPolicy
{
    /// <summary>The share of the time that checkpoints may take by default.</summary>
    public const double DefaultShare = 0.02;

    private readonly double _share;
    private readonly TimeProvider _clock;
    private long _start;
    private TimeSpan _spent;
    private TimeSpan _last;
    private bool _isFirst = true;

    /// <summary>A policy for one run.</summary>
    /// <param name="share">Largest share of the time, above 0 and at most 1; 1 means after every step.</param>
    /// <param name="clock">The clock; null for that of the machine.</param>
    /// <exception cref="ArgumentOutOfRangeException">The share is out of its range or NaN.</exception>
    public CheckpointPolicy(double share = DefaultShare, TimeProvider? clock = null)
    {
        if (!(share is > 0 and <= 1))
            throw new ArgumentOutOfRangeException(nameof(share), share, "The share must lie above 0 and not above 1.");
        _share = share;
        _clock = clock ?? TimeProvider.System;
        Start();
    }

    /// <summary>Time spent on checkpoints since <see cref="Start"/>.</summary>
    internal TimeSpan Spent => _spent;

    /// <summary>Begins to count time anew.</summary>
    internal void Start()
    {
        _start = _clock.GetTimestamp();
        _spent = TimeSpan.Zero;
        _last = TimeSpan.Zero;
    }

    /// <summary>Whether a checkpoint now keeps within the share.</summary>
    internal bool IsDue() => _spent + _last <= _share * (_clock.GetElapsedTime(_start) + _last);

    /// <summary>
    /// Stores a checkpoint and counts the time. The first one is not counted: most of its time goes into the runtime's
    /// compiler, and would keep a short run from storing a second one.
    /// </summary>
    internal void Measure(Action save)
    {
        long begin = _clock.GetTimestamp();
        save();
        if (!_isFirst)
        {
            _last = _clock.GetElapsedTime(begin);
            _spent += _last;
        }

        _isFirst = false;
    }
}
