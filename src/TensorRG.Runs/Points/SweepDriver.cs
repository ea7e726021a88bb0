using TensorRG.Physics.Measurements;

namespace TensorRG.Runs.Points;

/// <summary>
/// Measures all points of a sweep that are not stored yet. Each point is stored the moment it is done, so that a kill at any instant
/// loses no more than the points at work; calling again gives the same points, bit by bit.
/// </summary>
public static class SweepDriver
{
    /// <summary>Runs until all points are there or until stopped.</summary>
    /// <param name="sweep">The folder.</param>
    /// <param name="createMeasurer">Makes a measurer for each worker.</param>
    /// <param name="options">Concurrency and callbacks.</param>
    /// <param name="stop">Asks to stop: handed to the measurers; points at work are dropped.</param>
    /// <exception cref="RunStoreException">The folder is in use or cannot be written, or another version of the algorithms began it.</exception>
    /// <exception cref="Exception">Whatever a measurer throws that is no failure of its point alone, such as too little memory.</exception>
    public static SweepOutcome Run(SweepFolder sweep, Func<IMeasurer> createMeasurer, SweepOptions options, CancellationToken stop = default)
    {
        ArgumentNullException.ThrowIfNull(sweep);
        ArgumentNullException.ThrowIfNull(createMeasurer);
        ArgumentNullException.ThrowIfNull(options);
        ArgumentOutOfRangeException.ThrowIfLessThan(options.Concurrency, 1);
        if (sweep.Inputs.NumericsVersion != FlowFactory.NumericsVersion)
        {
            throw new RunStoreException(
                RunStoreProblem.OtherVersion,
                FormattableString.Invariant($"The sweep '{sweep.Path}' was begun with numerics version {sweep.Inputs.NumericsVersion}; this program has {FlowFactory.NumericsVersion}. ")
                + "Finish it with the version that began it, or compute it anew in another folder.");
        }

        using IDisposable held = sweep.Files.Lock(sweep.Path);
        return new SweepSession(sweep, createMeasurer, options).Run(stop);
    }
}
