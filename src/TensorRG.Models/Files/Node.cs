namespace TensorRG.Models.Files;

/// <summary>A value of a model file, with its place.</summary>
/// <param name="source">The file.</param>
/// <param name="kind">Its kind.</param>
/// <param name="start">Offset of its first character.</param>
internal sealed class Node(SourceText source, NodeKind kind, int start)
{
    /// <summary>The file.</summary>
    public SourceText Source { get; } = source;

    /// <summary>Its kind.</summary>
    public NodeKind Kind { get; } = kind;

    /// <summary>Offset of its first character.</summary>
    public int Start { get; } = start;

    /// <summary>The value of a text; a number as written.</summary>
    public string Text { get; init; } = "";

    /// <summary>Where the characters of <see cref="Text"/> stand.</summary>
    public TextSpot Spot => new(Source, TextStart < 0 ? Start : TextStart, TextStart >= 0);

    /// <summary>Offset of the first character of a text; negative where escapes make offsets inside it unknown.</summary>
    public int TextStart { get; init; } = -1;

    /// <summary>The value of a number.</summary>
    public double Number { get; init; }

    /// <summary>The value of a truth value.</summary>
    public bool Truth { get; init; }

    /// <summary>The items of an array.</summary>
    public List<Node> Items { get; } = [];

    /// <summary>The entries of a table, in the order of the file.</summary>
    public List<NodeEntry> Entries { get; } = [];

    private Dictionary<string, NodeEntry> Index { get; } = [];

    /// <summary>True once a table may not be added to: it stands in braces, or its header was read.</summary>
    public bool IsClosed { get; set; }

    /// <summary>The kind in words.</summary>
    public string KindText => Kind switch
    {
        NodeKind.Table => "a table",
        NodeKind.Array => "a list",
        NodeKind.Text => "a text",
        NodeKind.Number => "a number",
        NodeKind.Truth => "true or false",
        _ => "a date",
    };

    /// <summary>The entry of that key, or null.</summary>
    /// <param name="key">The key.</param>
    public NodeEntry? Find(string key) => Index.GetValueOrDefault(key);

    /// <summary>Adds an entry with a new key.</summary>
    /// <param name="entry">The entry.</param>
    public void Add(NodeEntry entry)
    {
        Entries.Add(entry);
        Index.Add(entry.Key, entry);
    }

    /// <summary>An error at this value.</summary>
    /// <param name="message">What is wrong, and the remedy.</param>
    public ModelFileException Error(string message) => Source.Error(Start, message);
}
