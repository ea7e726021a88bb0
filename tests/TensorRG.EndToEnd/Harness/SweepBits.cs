namespace TensorRG.EndToEnd.Harness;

/// <summary>What a finished sweep comes to: the bytes of its table, its JSON and all its points.</summary>
internal sealed class SweepBits
{
    private readonly SortedDictionary<string, byte[]> _files;

    private SweepBits(SortedDictionary<string, byte[]> files)
    {
        _files = files;
    }

    public static SweepBits Of(string folder)
    {
        var files = new SortedDictionary<string, byte[]>(StringComparer.Ordinal);
        foreach (string file in Directory.GetFiles(Path.Combine(folder, "points")).Concat(Directory.GetFiles(folder, "sweep.*")))
            files[Path.GetRelativePath(folder, file)] = File.ReadAllBytes(file);
        return new SweepBits(files);
    }

    /// <summary>Points that are stored in a folder.</summary>
    public static int Points(string folder)
    {
        string points = Path.Combine(folder, "points");
        return Directory.Exists(points) ? Directory.GetFiles(points, "*.json").Length : 0;
    }

    /// <summary>Checks that a sweep has the same files with the same bytes, and no others.</summary>
    public void AssertSame(string folder, string story)
    {
        SweepBits other = Of(folder);
        Assert.Equal(_files.Keys, other._files.Keys);
        foreach ((string name, byte[] bytes) in _files)
            Assert.True(bytes.AsSpan().SequenceEqual(other._files[name]), $"{name} differs. {story}");
    }
}
