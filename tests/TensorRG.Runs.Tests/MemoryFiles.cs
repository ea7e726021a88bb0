namespace TensorRG.Runs.Tests;

/// <summary>
/// A file system that dies, or fails once, at a chosen point: before each operation, and within a write after the
/// file was created, after half of the content, and before the flush.
/// </summary>
internal sealed class MemoryFiles : IRunFiles
{
    private readonly Dictionary<string, Node> _names = new(StringComparer.Ordinal);
    private readonly HashSet<string> _folders = new(StringComparer.Ordinal);
    private Dictionary<string, Node> _flushedNames = new(StringComparer.Ordinal);
    private int _points;
    private bool _dead;
    private bool _locked;

    public int DieAt { get; init; } = -1;

    public int FailAt { get; init; } = -1;

    public int Points => _points;

    public IEnumerable<string> Names => _names.Keys.Select(p => Path.GetFileName(p)!);

    public bool FileExists(string path) => _names.ContainsKey(path);

    public bool FolderExists(string path) => _folders.Contains(path);

    public IReadOnlyList<string> List(string folder)
    {
        Point();
        return [.. _names.Keys.Where(p => Path.GetDirectoryName(p) == folder).Select(static p => Path.GetFileName(p)!)];
    }

    public byte[] Read(string path)
    {
        Point();
        return _names.TryGetValue(path, out Node? node) ? node.Content : throw new FileNotFoundException(path);
    }

    public void CreateFolder(string folder)
    {
        Point();
        _folders.Add(folder);
    }

    public void Write(string path, ReadOnlySpan<byte> content)
    {
        Point();
        if (!_names.TryGetValue(path, out Node? node))
            _names[path] = node = new Node();
        node.Content = [];
        Point();
        node.Content = content[..(content.Length / 2)].ToArray();
        Point();
        node.Content = content.ToArray();
        Point();
        node.Flushed = node.Content;
    }

    public void Move(string from, string to)
    {
        Point();
        _names.Remove(from, out Node? node);
        _names[to] = node!;
    }

    public void Delete(string path)
    {
        Point();
        _names.Remove(path);
    }

    public void FlushFolder(string folder)
    {
        Point();
        _flushedNames = new(_names, StringComparer.Ordinal);
    }

    public IDisposable Lock(string folder)
    {
        Assert.False(_locked, "The lock is taken twice.");
        _locked = true;
        return new Held(this);
    }

    /// <summary>Replaces content behind the back of the store, as damage does.</summary>
    public void Damage(string path, byte[]? content)
    {
        if (content is null)
            _names.Remove(path);
        else
            _names[path] = new Node { Content = content, Flushed = content };
    }

    /// <summary>What the next process finds.</summary>
    public MemoryFiles Survivor(CrashKind kind, int dieAt = -1)
    {
        MemoryFiles next = new() { DieAt = dieAt };
        next._folders.UnionWith(_folders);
        foreach ((string path, Node node) in kind == CrashKind.PowerCut ? _flushedNames : _names)
            next.Damage(path, kind == CrashKind.Kill ? node.Content : node.Flushed);
        next._flushedNames = new(next._names, StringComparer.Ordinal);
        return next;
    }

    private void Point()
    {
        _points++;
        _dead |= _points == DieAt;
        if (_dead)
            throw new SimulatedDeathException();
        if (_points == FailAt)
            throw new IOException("No space left on device", 28);
    }

    private sealed class Node
    {
        public byte[] Content { get; set; } = [];

        public byte[] Flushed { get; set; } = [];
    }

    private sealed class Held(MemoryFiles files) : IDisposable
    {
        public void Dispose() => files._locked = false;
    }
}
