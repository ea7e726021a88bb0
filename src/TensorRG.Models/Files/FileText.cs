using System.Buffers;
using System.Text;

namespace TensorRG.Models.Files;

/// <summary>Reads the text of a model file and refuses what is none.</summary>
internal static class FileText
{
    // Tab and line ends are text.
    private static readonly SearchValues<char> Controls = SearchValues.Create([.. Enumerable.Range(0, 32).Where(c => c is not ('\t' or '\n' or '\r')).Select(c => (char)c), '\u007F']);

    private const string Convert = "Save it as UTF-8 text.";

    /// <summary>The text of a file.</summary>
    /// <param name="path">Its path.</param>
    /// <exception cref="ModelFileException">No such file, no permission, too large, or no UTF-8 text.</exception>
    public static SourceText Load(string path)
    {
        if (path.Length == 0 || path.Contains('\0', StringComparison.Ordinal))
            throw Whole(path, "This is no path of a file. Give the path of a model file.");
        if (Directory.Exists(path))
            throw Whole(path, "This is a folder. Give the path of a model file in it.");
        return Decode(path, Bytes(path));
    }

    /// <summary>The text, checked.</summary>
    /// <param name="text">The text.</param>
    /// <param name="path">Path for messages.</param>
    /// <exception cref="ModelFileException">Too large, empty, or with control characters.</exception>
    public static SourceText Check(string text, string path)
    {
        if (text.Length > Limits.FileBytes)
            throw TooLarge(path);
        SourceText source = new(path, text.StartsWith('\uFEFF') ? text[1..] : text);
        int control = source.Text.AsSpan().IndexOfAny(Controls);
        if (control >= 0)
            throw source.Error(control, source.Text[control] == '\0'
                ? $"A NUL character stands in the file: it is no UTF-8 text, perhaps UTF-16. {Convert}"
                : $"A control character (code {(int)source.Text[control]}) stands in the file. Remove it.");
        if (string.IsNullOrWhiteSpace(source.Text))
            throw Whole(path, "The file is empty. A model file needs at least name, lattice and a table [site] or [vertex].");
        return source;
    }

    private static byte[] Bytes(string path)
    {
        try
        {
            using FileStream stream = File.OpenRead(path);
            byte[] bytes = new byte[Limits.FileBytes + 1];
            int count = stream.ReadAtLeast(bytes, bytes.Length, throwOnEndOfStream: false);
            return count <= Limits.FileBytes ? bytes[..count] : throw TooLarge(path);
        }
        catch (Exception e) when (e is FileNotFoundException or DirectoryNotFoundException)
        {
            throw Whole(path, "There is no such file. Check the path, or list the built-in models and name one of them.");
        }
        catch (Exception e) when (e is UnauthorizedAccessException or IOException or NotSupportedException)
        {
            throw Whole(path, "The file cannot be read. Check its permissions, and that the disk is in order.");
        }
    }

    private static SourceText Decode(string path, byte[] bytes)
    {
        if (bytes is [0xFF, 0xFE, ..] or [0xFE, 0xFF, ..] or [0, 0, 0xFE, 0xFF, ..])
            throw new ModelFileException(path, 1, 1, $"The file is encoded in UTF-16 or UTF-32. {Convert}");
        int bad = FirstInvalid(bytes);
        string text = Encoding.UTF8.GetString(bytes, 0, bad < 0 ? bytes.Length : bad);
        return bad < 0
            ? Check(text, path)
            : throw new SourceText(path, text).Error(text.Length, $"The byte 0x{bytes[bad]:X2} here is no UTF-8. {Convert}");
    }

    private static int FirstInvalid(ReadOnlySpan<byte> bytes)
    {
        for (int at = 0; at < bytes.Length;)
        {
            if (Rune.DecodeFromUtf8(bytes[at..], out _, out int length) != OperationStatus.Done)
                return at;
            at += length;
        }
        return -1;
    }

    private static ModelFileException TooLarge(string path)
        => Whole(path, $"The file is larger than {Limits.FileBytes / 1024 / 1024} MB. Give the path of a model file; those are a few kB.");

    private static ModelFileException Whole(string path, string message) => new(path, 0, 0, message);
}
