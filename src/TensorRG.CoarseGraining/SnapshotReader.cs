namespace TensorRG.CoarseGraining;

/// <summary>Reads named values from a snapshot and complains clearly about what does not fit.</summary>
/// <param name="snapshot">The snapshot.</param>
internal sealed class SnapshotReader(Snapshot snapshot)
{
    /// <summary>The names of arrays of reals below a group, with the group and everything after the next '/' cut off.</summary>
    public IEnumerable<string> Children(string group)
        => snapshot.Integers.Keys
            .Where(name => name.StartsWith(group + "/", StringComparison.Ordinal))
            .Select(name => name[(group.Length + 1)..].Split('/')[0])
            .Distinct();

    public double[] Numbers(string name, long count = -1)
    {
        if (!snapshot.Numbers.TryGetValue(name, out double[]? values))
            throw new SnapshotException($"The snapshot lacks the numbers '{name}'.");
        return count < 0 || values.Length == count
            ? values
            : throw new SnapshotException($"The snapshot holds {values.Length} numbers under '{name}' where {count} belong.");
    }

    public int[] Integers(string name, long count = -1)
    {
        if (!snapshot.Integers.TryGetValue(name, out long[]? values))
            throw new SnapshotException($"The snapshot lacks the integers '{name}'.");
        return count < 0 || values.Length == count
            ? Array.ConvertAll(values, static v => checked((int)v))
            : throw new SnapshotException($"The snapshot holds {values.Length} integers under '{name}' where {count} belong.");
    }

    public string Text(string name)
        => snapshot.Texts.TryGetValue(name, out string? text) ? text : throw new SnapshotException($"The snapshot lacks the text '{name}'.");
}
