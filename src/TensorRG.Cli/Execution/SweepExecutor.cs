using System.Diagnostics;
using Spectre.Console;
using TensorRG.Cli.Input;
using TensorRG.Cli.Output;
using TensorRG.Physics.Measurements;
using TensorRG.Reports;
using TensorRG.Runs.Points;

namespace TensorRG.Cli.Execution;

/// <summary>Carries out a sweep, new or resumed, and publishes it.</summary>
internal static class SweepExecutor
{
    /// <summary>Runs to the end or to a stop signal.</summary>
    /// <param name="folder">The sweep.</param>
    /// <param name="threads">Points at a time, one thread each: small tensors gain more from many points than from many threads.</param>
    /// <param name="mode">How much is printed.</param>
    public static int Execute(SweepFolder folder, int threads, OutputMode mode)
    {
        long start = Stopwatch.GetTimestamp();

        // A backend that is missing here is bad input, not a failure of all points.
        _ = BackendChoice.Create(folder.Inputs.Backend, 1);
        using var signal = new StopSignal();
        using var display = new SweepDisplay(mode == OutputMode.Full ? Consoles.Out : null, Consoles.Error);
        SweepPublication? publication = null;
        var options = new SweepOptions
        {
            Concurrency = threads,
            Started = display.Start,
            PointDone = display.Show,
            Completed = points => publication = SweepPublication.Write(folder, points),
        };
        SweepOutcome outcome = SweepDriver.Run(folder, () => Measurers.Create(BackendChoice.Create(folder.Inputs.Backend, 1)), options, signal.Token);
        if (publication is null)
        {
            Consoles.Error.WriteLine(FormattableString.Invariant($"Stopped; {outcome.Done} of {folder.Inputs.Count} points are stored. Go on with: tensorrg resume '{ShownPath.Of(folder.Path)}'"));
            return ExitCode.Stopped;
        }

        string origin = outcome.Computed == 0 ? "computed earlier" : NumberFormat.Duration(Stopwatch.GetElapsedTime(start).TotalSeconds);
        publication.Show(mode, origin);
        return publication.Report.Failed.Any() ? ExitCode.Failed : ExitCode.Done;
    }

    /// <summary>The folder of a sweep when none is named.</summary>
    public static string DefaultPath(SweepInputs inputs)
    {
        string axes = string.Join('-', inputs.Axes.Select(static a => a.Name));
        return Path.Combine(RunLocation.Root, FormattableString.Invariant($"sweep-{inputs.Model.Name}-{axes}-chi{inputs.Measurement.BondDimension}-{inputs.Identity[..10]}"));
    }

    /// <summary>
    /// Tries the first point with the smallest tensors, so that what the model or the method does not have is said before a folder is made.
    /// </summary>
    /// <exception cref="Models.ModelException">It cannot be measured; the message has the remedy.</exception>
    public static void Probe(MeasureRequest request, SweepInputs inputs)
    {
        const int small = 2;
        MeasurementInputs first = inputs.At(0);
        try
        {
            Measurers.Create(BackendChoice.Create(request.Backend, 1)).Measure(first with { BondDimension = Math.Min(first.BondDimension, small) }, null, CancellationToken.None);
        }
        catch (ArithmeticException)
        {
            // So few states may be too few; the point itself will tell.
        }
    }
}
