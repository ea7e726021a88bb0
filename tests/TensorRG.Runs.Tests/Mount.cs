using System.Diagnostics;

namespace TensorRG.Runs.Tests;

/// <summary>A mounted file system, unmounted at the end.</summary>
internal sealed class Mount : IDisposable
{
    private Mount(string path)
    {
        Path = path;
    }

    public string Path { get; }

    /// <summary>A small file system in memory; skips the test where that is not allowed.</summary>
    public static Mount Tmpfs(string path, string size)
    {
        Directory.CreateDirectory(path);
        Skip.IfNot(OperatingSystem.IsLinux() && Environment.IsPrivilegedProcess, "Mounting needs Linux and root.");
        Skip.IfNot(Run("mount", "-t", "tmpfs", "-o", $"size={size}", "tmpfs", path), "This machine does not let root mount a tmpfs.");
        return new Mount(path);
    }

    public void Remount(string option) => Assert.True(Run("mount", "-o", $"remount,{option}", Path));

    /// <summary>A read-only view of a folder in its own place; files that are open stay writable.</summary>
    public static Mount ReadOnlyBind(string path)
    {
        Assert.True(Run("mount", "--bind", path, path));
        Assert.True(Run("mount", "-o", "remount,bind,ro", path));
        return new Mount(path);
    }

    public void Dispose() => Run("umount", Path);

    private static bool Run(string command, params string[] args)
    {
        using Process process = Process.Start(new ProcessStartInfo(command, args) { RedirectStandardError = true })!;
        process.StandardError.ReadToEnd();
        process.WaitForExit();
        return process.ExitCode == 0;
    }
}
