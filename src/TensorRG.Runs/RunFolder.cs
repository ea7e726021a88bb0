using System.Collections.Immutable;
using System.Text.Json.Nodes;
using TensorRG.CoarseGraining;

namespace TensorRG.Runs;

/// <summary>
/// A run on disk: <c>run.json</c> (inputs, never changed), <c>flow.csv</c> (a row a step), <c>state-*.h5</c> (the
/// newest two checkpoints), <c>result.json</c> (when it is done). All are readable with h5py, pandas and json alone,
/// and each carries its own checksum, verified whenever it is read. The layout is described in README.md beside this
/// source.
/// </summary>
public sealed class RunFolder
{
    private RunFolder(IRunFiles files, string path, RunHeader header)
    {
        Files = files;
        Path = path;
        Inputs = header.Inputs;
        Labels = header.Labels;
        Identity = header.Inputs.Identity;
    }

    /// <summary>Full path of the folder.</summary>
    public string Path { get; }

    /// <summary>What determines the numbers.</summary>
    public RunInputs Inputs { get; }

    /// <summary>Facts about the run that change no number, such as threads, machine, program version.</summary>
    public ImmutableSortedDictionary<string, string> Labels { get; }

    /// <summary>Identity of the inputs, verified when the folder was opened.</summary>
    public string Identity { get; }

    internal IRunFiles Files { get; }

    /// <summary>Makes a new run. The folder may exist if it is empty.</summary>
    /// <param name="path">Folder of the run; missing parents are made.</param>
    /// <param name="inputs">What determines the numbers.</param>
    /// <param name="labels">Facts worth keeping that change no number; may be null.</param>
    /// <exception cref="RunStoreException">There is something else already, or the folder cannot be written.</exception>
    /// <exception cref="ArgumentException">An input is out of its range.</exception>
    public static RunFolder Create(string path, RunInputs inputs, IReadOnlyDictionary<string, string>? labels = null) =>
        Create(Disk(), path, inputs, labels);

    /// <summary>Opens a run and verifies that run.json is as it was written.</summary>
    /// <param name="path">Folder of the run.</param>
    /// <exception cref="RunStoreException">There is no run, its run.json was changed, or a newer version wrote it.</exception>
    public static RunFolder Open(string path) => Open(Disk(), path);

    /// <summary>Opens the run of these inputs in the folder, or makes it where there is none.</summary>
    /// <param name="path">Folder of the run.</param>
    /// <param name="inputs">What determines the numbers.</param>
    /// <param name="labels">Labels for a new run; an existing one keeps its own.</param>
    /// <exception cref="RunStoreException">The folder holds a run of other inputs (the message lists them), or as for
    /// <see cref="Create(string, RunInputs, IReadOnlyDictionary{string, string}?)"/> and <see cref="Open(string)"/>.</exception>
    public static RunFolder OpenOrCreate(string path, RunInputs inputs, IReadOnlyDictionary<string, string>? labels = null) =>
        OpenOrCreate(Disk(), path, inputs, labels);

    /// <summary>Refuses to go on with a run that other algorithms began: its numbers would be a mixture.</summary>
    /// <param name="current">The numerics version of this program.</param>
    /// <exception cref="RunStoreException">The run has another numerics version.</exception>
    public void RequireNumericsVersion(int current)
    {
        if (Inputs.NumericsVersion != current)
        {
            throw new RunStoreException(
                RunStoreProblem.OtherVersion,
                $"The run '{Path}' was begun with numerics version {Inputs.NumericsVersion}; this program has {current}. "
                + "Finish it with the version that began it, or compute it anew in another folder.");
        }
    }

    /// <summary>The stored result; null while the run is not finished.</summary>
    /// <exception cref="RunStoreException">result.json was changed or cannot be read.</exception>
    public JsonObject? ReadResult() =>
        Files.FileExists(FilePath(RunFiles.Result)) ? RunResult.Read(this, Files.Read(FilePath(RunFiles.Result))) : null;

    /// <summary>The records in flow.csv, times included (NaN where unknown).</summary>
    /// <exception cref="RunStoreException">flow.csv is missing, was changed or cannot be read.</exception>
    public IReadOnlyList<StepRecord> ReadFlow()
    {
        FlowContent content = FlowTable.Read(Identity, Files.Read(FilePath(RunFiles.Flow)));
        return content.Defect is null ? content.Records : throw new RunStoreException(
            RunStoreProblem.Damaged,
            $"'{FilePath(RunFiles.Flow)}' was changed or damaged: {content.Defect}. Delete result.json and resume the run: "
            + "the file is then written again from the last checkpoint.");
    }

    internal static RunFolder Create(
        IRunFiles files, string path, RunInputs inputs, IReadOnlyDictionary<string, string>? labels)
    {
        inputs.Validate();
        string folder = System.IO.Path.GetFullPath(path);
        if (files.FileExists(folder))
            throw NotARun($"'{folder}' is a file. Give a folder for the run.");
        files.CreateFolder(folder);

        // Before the lock too, which would leave its file in a folder that is not ours.
        RequireEmpty(files, folder);
        using IDisposable held = files.Lock(folder);
        RequireEmpty(files, folder);
        files.DeleteLeftovers(folder);
        RunHeader header = new(inputs, RunHeader.Sort(labels));
        files.Replace(folder, RunFiles.Run, header.Write());
        return new RunFolder(files, folder, header);
    }

    internal static RunFolder Open(IRunFiles files, string path)
    {
        string folder = System.IO.Path.GetFullPath(path);
        if (files.FileExists(folder))
            throw NotARun($"'{folder}' is a file. Give the folder of a run.");
        if (!files.FolderExists(folder))
            throw NotARun($"There is no folder '{folder}'. Check the path, or start a new run.");
        string file = System.IO.Path.Combine(folder, RunFiles.Run);
        if (!files.FileExists(file))
        {
            // A folder that may not be read looks empty; listing it says so.
            _ = files.List(folder);
            throw NotARun($"The folder '{folder}' holds no run: it has no {RunFiles.Run}. Check the path, or start a new run.");
        }

        return new RunFolder(files, folder, RunHeader.Read(file, files.Read(file)));
    }

    internal static RunFolder OpenOrCreate(
        IRunFiles files, string path, RunInputs inputs, IReadOnlyDictionary<string, string>? labels)
    {
        string header = System.IO.Path.Combine(System.IO.Path.GetFullPath(path), RunFiles.Run);
        if (!files.FileExists(header))
        {
            try
            {
                return Create(files, path, inputs, labels);
            }
            catch (RunStoreException refused) when (refused.Problem == RunStoreProblem.NotARun && files.FileExists(header))
            {
                // Another process made the run since we looked.
            }
        }

        inputs.Validate();
        RunFolder run = Open(files, path);
        return run.Inputs == inputs ? run : throw new RunStoreException(
            RunStoreProblem.OtherInputs,
            $"The folder '{run.Path}' holds a run of other inputs: "
            + string.Join("; ", RunInputsJson.Differences(run.Inputs, inputs))
            + ". Use another folder, or ask for the inputs of the stored run.");
    }

    internal string FilePath(string name) => System.IO.Path.Combine(Path, name);

    private static void RequireEmpty(IRunFiles files, string folder)
    {
        if (files.List(folder).FirstOrDefault(name => !RunFiles.IsFromCreation(name)) is { } found)
            throw NotARun($"The folder '{folder}' is not empty (it holds '{found}'). Give a new or empty folder for the run.");
    }

    private static GuardedFiles Disk() => new(new DiskFiles());

    private static RunStoreException NotARun(string message) => new(RunStoreProblem.NotARun, message);
}
