using System.Runtime.InteropServices;
using System.Text;

namespace TensorRG.Runs;

/// <summary>
/// Flushes a folder to the device. The .NET class library opens files only, and without this a rename may be undone by
/// a power cut. On Windows the file system journals renames itself, so nothing is done there.
/// </summary>
internal static class FolderFlush
{
    private const int ReadOnly = 0;
    private const int Einval = 22;

    public static void Flush(string folder)
    {
        if (OperatingSystem.IsWindows())
            return;
        int descriptor = Open(Encoding.UTF8.GetBytes(Path.GetFullPath(folder) + '\0'), ReadOnly);
        if (descriptor < 0)
            throw Failure("open", folder);
        try
        {
            // EINVAL: a file system that cannot flush folders and has nothing to lose by it.
            if (FSync(descriptor) != 0 && Marshal.GetLastPInvokeError() != Einval)
                throw Failure("flush", folder);
        }
        finally
        {
            _ = Close(descriptor);
        }
    }

    private static IOException Failure(string what, string folder) =>
        new($"Could not {what} the folder '{folder}': {Marshal.GetLastPInvokeErrorMessage()}");

    [DllImport("libc", EntryPoint = "open", SetLastError = true)]
    [DefaultDllImportSearchPaths(DllImportSearchPath.SafeDirectories)]
    private static extern int Open(byte[] path, int flags);

    [DllImport("libc", EntryPoint = "fsync", SetLastError = true)]
    [DefaultDllImportSearchPaths(DllImportSearchPath.SafeDirectories)]
    private static extern int FSync(int descriptor);

    [DllImport("libc", EntryPoint = "close", SetLastError = true)]
    [DefaultDllImportSearchPaths(DllImportSearchPath.SafeDirectories)]
    private static extern int Close(int descriptor);
}
