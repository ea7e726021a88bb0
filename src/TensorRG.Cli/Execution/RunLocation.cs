using TensorRG.Runs;

namespace TensorRG.Cli.Execution;

/// <summary>Where runs go when the user names no folder.</summary>
internal static class RunLocation
{
    /// <summary>Below the present folder; the name says what it is, the digits of the identity keep runs apart.</summary>
    public static string For(RunInputs inputs)
        => Path.Combine(Root, FormattableString.Invariant($"{inputs.Model}-{inputs.Scheme}-chi{inputs.BondDimension}-{inputs.Identity[..10]}"));

    /// <summary>The run of these inputs in a folder, new or stored.</summary>
    /// <exception cref="UsageException">The folder cannot be made or used: another must be named.</exception>
    /// <exception cref="RunStoreException">It holds something else, or its disk is full.</exception>
    public static RunFolder OpenOrCreate(string path, RunInputs inputs)
        => Reach(() => RunFolder.OpenOrCreate(path, inputs, RunLabels.Now()));

    /// <summary>A stored run.</summary>
    /// <exception cref="UsageException">The folder cannot be read.</exception>
    /// <exception cref="RunStoreException">It holds no run, or a damaged one.</exception>
    public static RunFolder Open(string path) => Reach(() => RunFolder.Open(path));

    /// <summary>Before anything is computed, a folder that cannot be used is bad input; a full disk is a failure at any time.</summary>
    public static T Reach<T>(Func<T> open)
    {
        try
        {
            return open();
        }
        catch (RunStoreException e) when (e is { Problem: RunStoreProblem.Storage, IsDiskFull: false })
        {
            throw new UsageException(e.Message, e);
        }
    }

    /// <summary>The folder that holds runs and scans.</summary>
    public static string Root => Path.Combine("results", "runs");
}
