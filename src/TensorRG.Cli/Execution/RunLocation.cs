using TensorRG.Runs;

namespace TensorRG.Cli.Execution;

/// <summary>Where runs go when the user names no folder.</summary>
internal static class RunLocation
{
    /// <summary>Below the present folder; the name says what it is, the digits of the identity keep runs apart.</summary>
    public static string For(RunInputs inputs)
        => Path.Combine(Root, FormattableString.Invariant($"{inputs.Model}-{inputs.Scheme}-chi{inputs.BondDimension}-{inputs.Identity[..10]}"));

    /// <summary>The folder that holds runs and scans.</summary>
    public static string Root => Path.Combine("results", "runs");
}
