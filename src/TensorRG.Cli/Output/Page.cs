using System.Text;

namespace TensorRG.Cli.Output;

/// <summary>Text laid out for a fixed width: paragraphs, labelled facts, tables whose last column wraps.</summary>
internal sealed class Page
{
    /// <summary>Columns of a line.</summary>
    public const int Width = 100;

    private const int LabelWidth = 14;
    private const int Indent = 2;
    private const int Gap = 2;
    private const int LeastLast = 20;

    private readonly StringBuilder _text = new();

    /// <summary>A line as it is.</summary>
    public void Line(string text = "") => _text.Append(text.TrimEnd()).Append('\n');

    /// <summary>Running text; its own line ends count as spaces, empty lines part paragraphs.</summary>
    public void Paragraphs(string text)
    {
        foreach (string paragraph in text.Split("\n\n", StringSplitOptions.RemoveEmptyEntries))
            Put("", 0, paragraph);
    }

    /// <summary>An indented line whose continuations are indented further.</summary>
    public void Item(string text) => Put("  ", 2 * Indent, text, Indent);

    /// <summary>A label and what it says; an empty label goes on with the fact before.</summary>
    public void Fact(string label, string text) => Put(label, LabelWidth, text);

    /// <summary>Rows below headings.</summary>
    public void Table(string[] headings, IEnumerable<string[]> rows)
    {
        string[][] all = [headings, .. rows];
        int last = headings.Length - 1;
        int[] widths = [.. Enumerable.Range(0, last).Select(c => all.Max(r => r[c].Length) + Gap)];
        foreach (string[] row in all)
        {
            string start = new string(' ', Indent) + string.Concat(Enumerable.Range(0, last).Select(c => row[c].PadRight(widths[c])));
            Put(start, Math.Min(Indent + widths.Sum(), Width - LeastLast), row[last]);
        }
    }

    /// <inheritdoc/>
    public override string ToString() => _text.ToString();

    private void Put(string start, int indent, string text, int? first = null)
    {
        string line = start.PadRight(first ?? indent);
        bool isEmpty = true;
        foreach (string word in text.Split((char[])[' ', '\n', '\r'], StringSplitOptions.RemoveEmptyEntries))
        {
            if (!isEmpty && line.Length + 1 + word.Length > Width)
            {
                Line(line);
                (line, isEmpty) = (new string(' ', indent), true);
            }

            line += (isEmpty ? "" : " ") + word;
            isEmpty = false;
        }

        Line(line);
    }
}
