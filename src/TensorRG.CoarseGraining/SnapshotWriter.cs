namespace TensorRG.CoarseGraining;

/// <summary>Collects named values for a snapshot.</summary>
/// <param name="step">Completed steps.</param>
internal sealed class SnapshotWriter(int step)
{
    private readonly SortedDictionary<string, double[]> _numbers = new(StringComparer.Ordinal);
    private readonly SortedDictionary<string, long[]> _integers = new(StringComparer.Ordinal);
    private readonly SortedDictionary<string, string> _texts = new(StringComparer.Ordinal);

    public void Add(string name, params double[] values) => _numbers.Add(name, values);

    public void Add(string name, IEnumerable<int> values) => _integers.Add(name, [.. values.Select(static v => (long)v)]);

    public void Add(string name, string text) => _texts.Add(name, text);

    public Snapshot ToSnapshot() => new(step, _numbers, _integers, _texts);
}
