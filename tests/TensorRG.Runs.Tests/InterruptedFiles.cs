namespace TensorRG.Runs.Tests;

/// <summary>Another process gets in between: an action that runs once, just before the folder is first listed.</summary>
internal sealed class InterruptedFiles(IRunFiles files, Action intrusion) : IRunFiles
{
    private Action? _pending = intrusion;

    public bool FileExists(string path) => files.FileExists(path);

    public bool FolderExists(string path) => files.FolderExists(path);

    public IReadOnlyList<string> List(string folder)
    {
        Action? now = _pending;
        _pending = null;
        now?.Invoke();
        return files.List(folder);
    }

    public byte[] Read(string path) => files.Read(path);

    public void CreateFolder(string folder) => files.CreateFolder(folder);

    public void Write(string path, ReadOnlySpan<byte> content) => files.Write(path, content);

    public void Move(string from, string to) => files.Move(from, to);

    public void Delete(string path) => files.Delete(path);

    public void FlushFolder(string folder) => files.FlushFolder(folder);

    public IDisposable Lock(string folder) => files.Lock(folder);
}
