using TensorRG.Physics.Measurements;

namespace TensorRG.Runs.Points;

/// <summary>What came of one point of a sweep: its numbers, or why there are none.</summary>
/// <param name="Measurement">The numbers; null where the point failed.</param>
/// <param name="Failure">Why it failed; null where it did not.</param>
public sealed record PointResult(Measurement? Measurement, string? Failure)
{
    /// <summary>A measured point.</summary>
    /// <param name="measurement">Its numbers.</param>
    public static PointResult Of(Measurement measurement) => new(measurement, null);

    /// <summary>A point that failed.</summary>
    /// <param name="message">Why.</param>
    public static PointResult Failed(string message) => new(null, message);
}
