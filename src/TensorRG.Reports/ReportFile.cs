using System.Text;

namespace TensorRG.Reports;

/// <summary>Writes report files whole or not at all: aside first, flushed to disk, then renamed over the old one.</summary>
public static class ReportFile
{
    private static readonly UTF8Encoding s_utf8 = new(encoderShouldEmitUTF8Identifier: false);

    /// <summary>Writes UTF-8 text without a byte-order mark.</summary>
    /// <param name="path">Target file; missing folders are created.</param>
    /// <param name="text">Contents.</param>
    /// <exception cref="IOException">The folder cannot be created, or the disk is full.</exception>
    /// <exception cref="UnauthorizedAccessException">The folder or file is read-only.</exception>
    public static void WriteText(string path, string text) => WriteBytes(path, s_utf8.GetBytes(text));

    /// <summary>Writes bytes.</summary>
    /// <param name="path">Target file; missing folders are created.</param>
    /// <param name="bytes">Contents.</param>
    /// <exception cref="IOException">The folder cannot be created, or the disk is full.</exception>
    /// <exception cref="UnauthorizedAccessException">The folder or file is read-only.</exception>
    public static void WriteBytes(string path, ReadOnlySpan<byte> bytes)
    {
        var target = Path.GetFullPath(path);
        Directory.CreateDirectory(Path.GetDirectoryName(target)!);
        var aside = $"{target}.{Environment.ProcessId}.tmp";
        try
        {
            WriteAndFlush(aside, bytes);
            File.Move(aside, target, overwrite: true);
        }
        catch
        {
            File.Delete(aside);
            throw;
        }
    }

    private static void WriteAndFlush(string path, ReadOnlySpan<byte> bytes)
    {
        using var stream = new FileStream(path, FileMode.Create, FileAccess.Write);
        stream.Write(bytes);
        stream.Flush(flushToDisk: true);
    }
}
