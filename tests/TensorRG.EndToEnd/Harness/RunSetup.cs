using System.Globalization;

namespace TensorRG.EndToEnd.Harness;

/// <summary>The inputs of a run. Grading is off: the same numbers take longer, which leaves time to interfere.</summary>
/// <param name="Scheme">Scheme.</param>
/// <param name="BondDimension">Bond dimension.</param>
/// <param name="StepCount">Steps.</param>
internal sealed record RunSetup(string Scheme, int BondDimension, int StepCount)
{
    /// <summary>A run that takes a second or two: long enough to be interrupted anywhere.</summary>
    public static RunSetup Long(string scheme) => scheme == "hotrg" ? new(scheme, 12, 24) : new(scheme, 16, 24);

    /// <summary>A run that takes a second or less.</summary>
    public static RunSetup Short(string scheme) => new(scheme, 6, 8);

    /// <summary>The command that begins the run, or goes on with it.</summary>
    public string[] Run(string folder, int threads = 1) =>
    [
        "run", "ising", "--temperature", "2.3", "--scheme", Scheme, "--bond-dimension", Text(BondDimension), "--steps", Text(StepCount),
        "--grading", "off", "--threads", Text(threads), "--run", folder,
    ];

    /// <summary>The command that goes on with a run.</summary>
    public static string[] Resume(string folder, int threads = 1) => ["resume", folder, "--threads", Text(threads)];

    private static string Text(int value) => value.ToString(CultureInfo.InvariantCulture);
}
