namespace TensorRG.Runs.Tests;

/// <summary>A clock that moves only when told to.</summary>
internal sealed class ManualClock : TimeProvider
{
    private long _ticks;

    public override long TimestampFrequency => TimeSpan.TicksPerSecond;

    public override long GetTimestamp() => _ticks;

    public void Advance(double seconds) => _ticks += TimeSpan.FromSeconds(seconds).Ticks;
}
