using TensorRG.CoarseGraining;

namespace TensorRG.Runs;

/// <summary>The checkpoints of one run: the newest two that are known to be good are kept.</summary>
internal sealed class CheckpointStore
{
    private const int Generations = 2;
    private readonly IRunFiles _files;
    private readonly string _folder;
    private readonly string _identity;
    private readonly int _lastStep;

    public CheckpointStore(IRunFiles files, string folder, string identity, int lastStep)
    {
        _files = files;
        _folder = folder;
        _identity = identity;
        _lastStep = lastStep;
    }

    /// <summary>Step of the newest checkpoint known to be good; null if there is none yet.</summary>
    public int? NewestGood { get; private set; }

    /// <summary>Finds the newest checkpoint that verifies.</summary>
    /// <exception cref="RunStoreException">There are checkpoints, but none is good; or the folder cannot be read.</exception>
    public LoadedCheckpoint Load()
    {
        List<(string, string)> refused = [];
        foreach (int step in StepsDescending())
        {
            string name = RunFiles.State(step);
            try
            {
                Snapshot snapshot = Read(name, step);
                NewestGood = step;
                return new LoadedCheckpoint(snapshot, refused);
            }
            catch (RunStoreException cause)
            {
                refused.Add((name, cause.Message));
            }
        }

        return refused.Count == 0 ? new LoadedCheckpoint(null, refused) : throw NoneIsGood(refused);
    }

    /// <summary>Renames refused checkpoints, so that they neither count as a generation nor are lost to inspection.</summary>
    public void SetAside(LoadedCheckpoint loaded)
    {
        foreach ((string name, _) in loaded.Refused)
            _files.Move(Path.Combine(_folder, name), Path.Combine(_folder, name + RunFiles.Damaged));
    }

    /// <summary>Stores a snapshot, then removes all but it and the good one before it.</summary>
    public void Save(Snapshot snapshot)
    {
        byte[] bytes = CheckpointFile.Write(snapshot, _identity);
        _files.Replace(_folder, RunFiles.State(snapshot.Step), bytes);
        NewestGood = snapshot.Step;
        DeleteOld();
    }

    /// <summary>Removes generations that a killed process did not come to remove.</summary>
    public void DeleteOld()
    {
        foreach (int step in StepsDescending().Where(s => s <= NewestGood).Skip(Generations))
            _files.Delete(Path.Combine(_folder, RunFiles.State(step)));
    }

    private IEnumerable<int> StepsDescending()
    {
        List<int> steps = [];
        foreach (string name in _files.List(_folder))
        {
            if (RunFiles.TryReadState(name, out int step))
                steps.Add(step);
        }

        return steps.OrderDescending();
    }

    private Snapshot Read(string name, int step)
    {
        if (step > _lastStep)
            throw new RunStoreException(RunStoreProblem.Damaged, "it lies beyond the last step of the run");
        return CheckpointFile.Read(_files.Read(Path.Combine(_folder, name)), _identity, step);
    }

    private RunStoreException NoneIsGood(IEnumerable<(string Name, string Reason)> refused) => new(
        RunStoreProblem.Damaged,
        $"No checkpoint of the run '{_folder}' is usable: "
        + string.Join("; ", refused.Select(r => $"{r.Name}: {r.Reason}"))
        + ". Restore one from a backup, or delete the state files to compute from the start.");
}
