namespace TensorRG.Runs;

/// <summary>Turns every failure of the file system into a <see cref="RunStoreException"/> that names path and remedy.</summary>
internal sealed class GuardedFiles : IRunFiles
{
    // errno values of Linux, which .NET puts into the low bits of HResult for IOException.
    private const int ReadOnlyFileSystem = 30;
    private const int QuotaExceeded = 122;
    private const int NoSpace = 28;
    private const int WindowsDiskFull = 112;
    private readonly IRunFiles _inner;

    public GuardedFiles(IRunFiles inner)
    {
        _inner = inner;
    }

    public bool FileExists(string path) => _inner.FileExists(path);

    public bool FolderExists(string path) => _inner.FolderExists(path);

    public IReadOnlyList<string> List(string folder) => Guard("list", folder, () => _inner.List(folder));

    public byte[] Read(string path) => Guard("read", path, () => _inner.Read(path));

    public void CreateFolder(string folder) => Guard("create the folder", folder, () => _inner.CreateFolder(folder));

    public void Write(string path, ReadOnlySpan<byte> content)
    {
        try
        {
            _inner.Write(path, content);
        }
        catch (Exception cause) when (IsFileFailure(cause))
        {
            throw Failure("write", path, cause);
        }
    }

    public void Move(string from, string to) => Guard("rename a file to", to, () => _inner.Move(from, to));

    public void Delete(string path) => Guard("delete", path, () => _inner.Delete(path));

    public void FlushFolder(string folder) => Guard("flush", folder, () => _inner.FlushFolder(folder));

    public IDisposable Lock(string folder) => Guard("lock", folder, () => _inner.Lock(folder));

    private static void Guard(string what, string path, Action act) => Guard(what, path, () =>
    {
        act();
        return true;
    });

    private static T Guard<T>(string what, string path, Func<T> act)
    {
        try
        {
            return act();
        }
        catch (Exception cause) when (IsFileFailure(cause))
        {
            throw Failure(what, path, cause);
        }
    }

    /// <summary>Whether a failure comes from a full disk or quota.</summary>
    public static bool IsDiskFull(Exception? cause) =>
        cause is IOException && (cause.HResult & 0xFFFF) is NoSpace or QuotaExceeded or WindowsDiskFull;

    private static bool IsFileFailure(Exception cause) =>
        cause is IOException or UnauthorizedAccessException or NotSupportedException or System.Security.SecurityException;

    private static RunStoreException Failure(string what, string path, Exception cause) =>
        new(RunStoreProblem.Storage, $"Cannot {what} '{path}': {cause.Message.TrimEnd('.')}. {Remedy(cause)}", cause);

    private static string Remedy(Exception cause) => (cause, cause.HResult & 0xFFFF) switch
    {
        _ when IsDiskFull(cause) =>
            "The disk or quota is full: free some space and resume the run; the last checkpoint is intact.",
        (_, ReadOnlyFileSystem) => "The file system is read-only: make it writable, or use a folder elsewhere.",
        (UnauthorizedAccessException, _) => "Check the permissions of the folder, or use another one.",
        (DirectoryNotFoundException or FileNotFoundException, _) => "Check the path; a part of it does not exist.",
        (PathTooLongException or NotSupportedException, _) => "Use another path.",
        _ => "Check the path and the device, then resume the run; the last checkpoint is intact.",
    };
}
