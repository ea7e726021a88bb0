using System.Text;

namespace TensorRG.Models.Files;

/// <summary>The text of a model file, which turns offsets into lines and columns.</summary>
/// <param name="path">Path, as the person gave it.</param>
/// <param name="text">The text.</param>
internal sealed class SourceText(string path, string text)
{
    /// <summary>Path, as the person gave it.</summary>
    public string Path { get; } = path;

    /// <summary>The text.</summary>
    public string Text { get; } = text;

    /// <summary>Line of an offset, from 1.</summary>
    public int Line(int offset) => 1 + Text.AsSpan(0, Clamp(offset)).Count('\n');

    /// <summary>An error at an offset.</summary>
    /// <param name="offset">Offset in <see cref="Text"/>.</param>
    /// <param name="message">What is wrong, and the remedy.</param>
    public ModelFileException Error(int offset, string message) => new(Path, Line(offset), Column(offset), message);

    /// <summary>A name or value from the file as it may stand in a message: in quotes, short, without control characters.</summary>
    public static string Quote(string value)
    {
        StringBuilder text = new("'");
        foreach (char c in value.Length > 60 ? value.AsSpan(0, 57) : value)
            text.Append(char.IsControl(c) || char.IsSurrogate(c) ? '?' : c);
        return text.Append(value.Length > 60 ? "...'" : "'").ToString();
    }

    // Characters since the start of the line; a surrogate pair is one character.
    private int Column(int offset)
    {
        int end = Clamp(offset);
        int start = end == 0 ? 0 : Text.LastIndexOf('\n', end - 1) + 1;
        int column = 1;
        for (int i = start; i < end; i++)
            column += char.IsLowSurrogate(Text[i]) ? 0 : 1;
        return column;
    }

    private int Clamp(int offset) => Math.Clamp(offset, 0, Text.Length);
}
