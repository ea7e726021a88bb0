using System.Globalization;

namespace TensorRG.EndToEnd.Harness;

/// <summary>What is in a run folder.</summary>
/// <param name="path">The folder.</param>
internal sealed class RunFiles(string path)
{
    public string Path => path;

    public string Result => System.IO.Path.Combine(path, "result.json");

    public string Header => System.IO.Path.Combine(path, "run.json");

    public string Flow => System.IO.Path.Combine(path, "flow.csv");

    public bool HasHeader => File.Exists(Header);

    public bool IsFinished => File.Exists(Result);

    /// <summary>Steps of the checkpoints, ascending.</summary>
    public int[] Steps => Directory.Exists(path)
        ? [.. Directory.GetFiles(path, "state-*.h5").Select(StepOf).Order()]
        : [];

    public string State(int step) => System.IO.Path.Combine(path, string.Create(CultureInfo.InvariantCulture, $"state-{step:D6}.h5"));

    /// <summary>Whether a file whose name ends so is there.</summary>
    public bool HasAny(string pattern) => Directory.Exists(path) && Directory.EnumerateFiles(path, pattern).Any();

    /// <summary>Everything but the lock, by name.</summary>
    public Dictionary<string, byte[]> Content() => Directory.GetFiles(path)
        .Where(static f => System.IO.Path.GetFileName(f) is not ("run.lock" or "run.owner"))
        .ToDictionary(static f => System.IO.Path.GetFileName(f), File.ReadAllBytes);

    private static int StepOf(string file) => int.Parse(System.IO.Path.GetFileNameWithoutExtension(file)["state-".Length..], CultureInfo.InvariantCulture);
}
