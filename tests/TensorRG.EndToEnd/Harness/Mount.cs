using System.Diagnostics;

namespace TensorRG.EndToEnd.Harness;

/// <summary>A mounted file system, unmounted at the end. Where mounting is not allowed the test is skipped and says so.</summary>
internal sealed class Mount : IDisposable
{
    private Mount(string path)
    {
        Path = path;
    }

    public string Path { get; }

    /// <summary>A small file system in memory.</summary>
    public static Mount Tmpfs(string path, string size)
    {
        Directory.CreateDirectory(path);
        Skip.IfNot(OperatingSystem.IsLinux() && Environment.IsPrivilegedProcess, "Mounting needs Linux and root.");
        Skip.IfNot(Run("mount", "-t", "tmpfs", "-o", $"size={size}", "tmpfs", path), "This machine does not let root mount a tmpfs.");
        return new Mount(path);
    }

    /// <summary>A read-only view of a folder in its own place; files that are open stay writable.</summary>
    public static Mount ReadOnlyView(string path)
    {
        Skip.IfNot(OperatingSystem.IsLinux() && Environment.IsPrivilegedProcess, "Mounting needs Linux and root.");
        Skip.IfNot(Run("mount", "--bind", path, path), "This machine does not let root mount a folder.");
        Mount mount = new(path);
        if (!Run("mount", "-o", "remount,bind,ro", path))
        {
            mount.Dispose();
            Skip.If(true, "This machine does not let root make a mount read-only.");
        }

        return mount;
    }

    public void Remount(string option) => Assert.True(Run("mount", "-o", $"remount,{option}", Path), $"remount,{option} failed.");

    public void Dispose() => Run("umount", Path);

    private static bool Run(string command, params string[] args)
    {
        using Process process = Process.Start(new ProcessStartInfo(command, args) { RedirectStandardError = true })!;
        process.StandardError.ReadToEnd();
        process.WaitForExit();
        return process.ExitCode == 0;
    }
}
