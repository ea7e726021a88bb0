using System.Collections.Immutable;
using System.Text.Json.Nodes;
using TensorRG.Models;

namespace TensorRG.Runs.Points;

/// <summary>
/// A sweep on disk: <c>inputs.json</c> (never changed), <c>points/NNNNNN.json</c> (one a point, written when it is done), the text of
/// a model that came from a file, and whatever tables and figures are made of them. Files of the store carry their own checksums.
/// </summary>
public sealed class SweepFolder
{
    private SweepFolder(IRunFiles files, string path, SweepHeader header)
    {
        Files = files;
        Path = path;
        Inputs = header.Inputs;
        Labels = header.Labels;
    }

    /// <summary>Full path of the folder.</summary>
    public string Path { get; }

    /// <summary>What determines the numbers.</summary>
    public SweepInputs Inputs { get; }

    /// <summary>Facts about the sweep that change no number.</summary>
    public ImmutableSortedDictionary<string, string> Labels { get; }

    internal IRunFiles Files { get; }

    internal string PointsPath => System.IO.Path.Combine(Path, RunFiles.Points);

    /// <summary>Whether a folder holds a sweep.</summary>
    /// <param name="path">Any path.</param>
    public static bool IsSweep(string path) => File.Exists(System.IO.Path.Combine(path, RunFiles.Inputs));

    /// <summary>Opens a sweep and verifies that inputs.json is as it was written.</summary>
    /// <param name="path">Folder of the sweep.</param>
    /// <param name="resolve">Finds a model by its name, or makes it from the text that defines it.</param>
    /// <exception cref="RunStoreException">There is no sweep, its inputs.json was changed, or a newer version wrote it.</exception>
    /// <exception cref="ModelException">The model is not known to this program.</exception>
    public static SweepFolder Open(string path, Func<string, string?, Model> resolve) => Open(Disk(), path, resolve);

    /// <summary>Opens the sweep of these inputs in the folder, or makes it where there is none.</summary>
    /// <param name="path">Folder of the sweep; missing parents are made, an existing one must be empty or hold this sweep.</param>
    /// <param name="inputs">What determines the numbers.</param>
    /// <param name="labels">Labels for a new sweep; an existing one keeps its own. May be null.</param>
    /// <exception cref="RunStoreException">The folder holds something else, such as a sweep of other inputs (the message lists them), or
    /// cannot be written.</exception>
    public static SweepFolder OpenOrCreate(string path, SweepInputs inputs, IReadOnlyDictionary<string, string>? labels = null)
        => OpenOrCreate(Disk(), path, inputs, labels);

    internal static SweepFolder Open(IRunFiles files, string path, Func<string, string?, Model> resolve)
    {
        string folder = System.IO.Path.GetFullPath(path);
        string file = System.IO.Path.Combine(folder, RunFiles.Inputs);
        return new SweepFolder(files, folder, SweepHeader.Read(file, files.Read(file), resolve));
    }

    internal static SweepFolder OpenOrCreate(IRunFiles files, string path, SweepInputs inputs, IReadOnlyDictionary<string, string>? labels)
    {
        ArgumentNullException.ThrowIfNull(inputs);
        string folder = System.IO.Path.GetFullPath(path);
        string header = System.IO.Path.Combine(folder, RunFiles.Inputs);
        if (!files.FileExists(header) && Create(files, folder, inputs, labels) is { } made)
            return made;
        (JsonObject stored, ImmutableSortedDictionary<string, string> kept) = SweepHeader.ReadRaw(header, files.Read(header));
        if (CanonicalJson.Hash(stored) == inputs.Identity)
            return new SweepFolder(files, folder, new SweepHeader(inputs, kept));
        throw new RunStoreException(
            RunStoreProblem.OtherInputs,
            $"The folder '{folder}' holds a sweep of other inputs: "
            + string.Join("; ", RunInputsJson.Differences(stored, SweepInputsJson.Write(inputs)))
            + ". Use another folder, or ask for the inputs of the stored sweep.");
    }

    internal string PointPath(int index) => System.IO.Path.Combine(PointsPath, RunFiles.Point(index));

    /// <summary>Makes the sweep; null where another process made one since we looked.</summary>
    private static SweepFolder? Create(IRunFiles files, string folder, SweepInputs inputs, IReadOnlyDictionary<string, string>? labels)
    {
        if (files.FileExists(folder))
            throw NotARun($"'{folder}' is a file. Give a folder for the sweep.");
        files.CreateFolder(folder);

        // Before the lock too, which would leave its file in a folder that is not ours.
        if (!IsFree(files, folder))
            return null;
        using IDisposable held = files.Lock(folder);
        if (!IsFree(files, folder))
            return null;
        files.DeleteLeftovers(folder);
        var header = new SweepHeader(inputs, RunHeader.Sort(labels));
        files.Replace(folder, RunFiles.Inputs, header.Write());
        return new SweepFolder(files, folder, header);
    }

    private static bool IsFree(IRunFiles files, string folder)
    {
        IReadOnlyList<string> names = files.List(folder);
        if (names.Contains(RunFiles.Inputs))
            return false;
        return names.FirstOrDefault(static name => !RunFiles.IsFromCreation(name)) is not { } found
            ? true
            : throw NotARun($"The folder '{folder}' is not empty (it holds '{found}'). Give a new or empty folder for the sweep.");
    }

    private static GuardedFiles Disk() => new(new DiskFiles());

    private static RunStoreException NotARun(string message) => new(RunStoreProblem.NotARun, message);
}
