namespace TensorRG.Runs;

/// <summary>
/// The few file operations a run needs. A seam: tests put a file system behind it that fails or dies at every single
/// operation, or loses whatever was not flushed.
/// </summary>
internal interface IRunFiles
{
    /// <summary>Whether a file of that name exists.</summary>
    bool FileExists(string path);

    /// <summary>Whether a folder of that name exists.</summary>
    bool FolderExists(string path);

    /// <summary>Names, without the folder, of everything in a folder.</summary>
    IReadOnlyList<string> List(string folder);

    /// <summary>The whole content of a file.</summary>
    byte[] Read(string path);

    /// <summary>Makes a folder and its parents, and flushes the parent.</summary>
    void CreateFolder(string folder);

    /// <summary>Creates or overwrites a file and flushes its content to the device.</summary>
    void Write(string path, ReadOnlySpan<byte> content);

    /// <summary>Renames a file in one step, replacing what has the new name.</summary>
    void Move(string from, string to);

    /// <summary>Removes a file.</summary>
    void Delete(string path);

    /// <summary>Flushes the names in a folder to the device, so that renames survive a power cut.</summary>
    void FlushFolder(string folder);

    /// <summary>Takes the lock of a run folder until disposed; see <see cref="RunLock"/>.</summary>
    IDisposable Lock(string folder);
}
