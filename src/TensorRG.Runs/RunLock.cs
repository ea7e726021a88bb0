using System.Globalization;

namespace TensorRG.Runs;

/// <summary>
/// One process per run folder. The lock is held on an open file (<c>flock</c> on Unix), so the operating system
/// releases it however the process ends; a lock file that lies around means nothing and is never deleted, since
/// deleting it would let two processes lock two files of the same name. Who holds the lock stands in a second file,
/// because a locked one cannot be read.
/// </summary>
internal sealed class RunLock : IDisposable
{
    private const int WouldBlockLinux = 11;
    private const int WouldBlockMac = 35;
    private const int WindowsSharingViolation = 32;
    private readonly FileStream _stream;
    private readonly string _owner;

    private RunLock(FileStream stream, string owner)
    {
        _stream = stream;
        _owner = owner;
    }

    /// <summary>Takes the lock at once or not at all.</summary>
    /// <exception cref="RunStoreException">Another holder: <see cref="RunStoreProblem.InUse"/>.</exception>
    /// <exception cref="IOException">The lock file cannot be opened.</exception>
    public static RunLock Take(string folder)
    {
        string owner = Path.Combine(folder, RunFiles.Owner);
        FileStream stream;
        try
        {
            stream = new(Path.Combine(folder, RunFiles.Lock), FileMode.OpenOrCreate, FileAccess.ReadWrite, FileShare.None);
        }
        catch (IOException cause) when ((cause.HResult & 0xFFFF) is WouldBlockLinux or WouldBlockMac or WindowsSharingViolation)
        {
            throw InUse(folder, owner, cause);
        }

        Try(() => File.WriteAllText(owner, Describe()));
        return new RunLock(stream, owner);
    }

    /// <summary>Gives the lock back.</summary>
    public void Dispose()
    {
        Try(() => File.Delete(_owner));
        _stream.Dispose();
    }

    private static string Describe() => string.Create(
        CultureInfo.InvariantCulture,
        $"process {Environment.ProcessId} on {Environment.MachineName} since {DateTime.UtcNow:yyyy-MM-dd HH:mm:ss} UTC\n");

    private static RunStoreException InUse(string folder, string owner, IOException cause)
    {
        string holder = "another process";
        Try(() => holder = File.ReadAllText(owner).Trim() is { Length: > 0 } text ? text : holder);
        return new RunStoreException(
            RunStoreProblem.InUse,
            $"The run '{folder}' is in use by {holder}. Wait for it to end or stop it, or use another folder.",
            cause);
    }

    /// <summary>The name of the holder is a courtesy; the lock counts without it.</summary>
    private static void Try(Action act)
    {
        try
        {
            act();
        }
        catch (Exception e) when (e is IOException or UnauthorizedAccessException)
        {
        }
    }
}
