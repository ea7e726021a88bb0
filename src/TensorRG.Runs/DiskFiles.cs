namespace TensorRG.Runs;

/// <summary>The file system of the machine.</summary>
internal sealed class DiskFiles : IRunFiles
{
    public bool FileExists(string path) => File.Exists(path);

    public bool FolderExists(string path) => Directory.Exists(path);

    public IReadOnlyList<string> List(string folder) =>
        [.. new DirectoryInfo(folder).EnumerateFileSystemInfos().Select(e => e.Name)];

    public byte[] Read(string path) => File.ReadAllBytes(path);

    public void CreateFolder(string folder)
    {
        Directory.CreateDirectory(folder);
        if (Path.GetDirectoryName(Path.GetFullPath(folder)) is { } parent)
            FolderFlush.Flush(parent);
    }

    public void Write(string path, ReadOnlySpan<byte> content)
    {
        using FileStream stream = new(path, FileMode.Create, FileAccess.Write, FileShare.None, bufferSize: 0);
        stream.Write(content);
        stream.Flush(flushToDisk: true);
    }

    public void Move(string from, string to) => File.Move(from, to, overwrite: true);

    public void Delete(string path) => File.Delete(path);

    public void FlushFolder(string folder) => FolderFlush.Flush(folder);

    public IDisposable Lock(string folder) => RunLock.Take(folder);
}
