using Tomlyn;
using Tomlyn.Parsing;
using Tomlyn.Syntax;

namespace TensorRG.Models.Files;

/// <summary>Reads the TOML of a model file into nodes that know their place.</summary>
internal sealed class NodeReader
{
    private readonly SourceText source;
    private readonly Node root;

    private NodeReader(SourceText source)
    {
        this.source = source;
        root = new(source, NodeKind.Table, 0);
    }

    /// <summary>The table of the whole file.</summary>
    /// <param name="source">The file.</param>
    /// <exception cref="ModelFileException">A syntax error, or a key twice.</exception>
    public static Node Read(SourceText source) => new NodeReader(source).Document(Parse(source));

    private static DocumentSyntax Parse(SourceText source)
    {
        DocumentSyntax document;
        try
        {
            document = SyntaxParser.Parse(source.Text, source.Path, validate: false);
        }
        catch (TomlException)
        {
            throw source.Error(0, "Lists or tables are nested too deeply. No key needs more than three levels: remove brackets.");
        }
        DiagnosticMessage? first = document.Diagnostics.Where(d => d.Kind == DiagnosticMessageKind.Error).MinBy(d => d.Span.Start.Offset);
        return first is null ? document : throw source.Error(first.Span.Start.Offset, SyntaxMessages.Translate(first.Message));
    }

    private Node Document(DocumentSyntax document)
    {
        foreach (KeyValueSyntax pair in document.KeyValues)
            Add(root, pair);
        foreach (TableSyntaxBase table in document.Tables)
        {
            Node target = table is TableArraySyntax ? NewItem(table) : Header(table);
            foreach (KeyValueSyntax pair in table.Items)
                Add(target, pair);
        }
        return root;
    }

    private Node Header(TableSyntaxBase table)
    {
        List<(string Key, int Start)> path = Path(table.Name!);
        Node node = Descend(root, path);
        if (node.IsClosed)
            throw source.Error(path[^1].Start, $"The table [{path[^1].Key}] stands in the file twice, first in line {source.Line(node.Start)}. Put its keys under one header.");
        node.IsClosed = true;
        return node;
    }

    // [[name]]: a new table at the end of the list of that name.
    private Node NewItem(TableSyntaxBase table)
    {
        List<(string Key, int Start)> path = Path(table.Name!);
        Node parent = Descend(root, path[..^1]);
        (string key, int start) = path[^1];
        if (parent.Find(key) is not { } entry)
        {
            entry = new(key, start, new(source, NodeKind.Array, start));
            parent.Add(entry);
        }
        if (entry.Value.Kind != NodeKind.Array || entry.Value.IsClosed)
            throw Twice(key, start, entry);
        Node item = new(source, NodeKind.Table, start) { IsClosed = true };
        entry.Value.Items.Add(item);
        return item;
    }

    private Node Descend(Node from, List<(string Key, int Start)> path)
    {
        foreach ((string key, int start) in path)
        {
            if (from.Find(key) is not { } entry)
            {
                entry = new(key, start, new(source, NodeKind.Table, start));
                from.Add(entry);
            }
            if (entry.Value.Kind != NodeKind.Table)
                throw Twice(key, start, entry);
            from = entry.Value;
        }
        return from;
    }

    private void Add(Node table, KeyValueSyntax pair)
    {
        List<(string Key, int Start)> path = Path(pair.Key!);
        Node target = Descend(table, path[..^1]);
        (string key, int start) = path[^1];
        if (target.Find(key) is { } earlier)
            throw Twice(key, start, earlier);
        target.Add(new(key, start, Value(pair.Value!)));
    }

    private ModelFileException Twice(string key, int start, NodeEntry earlier)
        => source.Error(start, $"The key {SourceText.Quote(key)} stands here twice, first in line {source.Line(earlier.Start)}. Keep one of them.");

    private List<(string Key, int Start)> Path(KeySyntax key)
    {
        if (key.DotKeys.ChildrenCount > 8)
            throw source.Error(key.Span.Start.Offset, "The key has too many dots. No key needs more than three parts: shorten it.");
        return [Part(key.Key!), .. key.DotKeys.Select(d => Part(d.Key!))];
    }

    private static (string Key, int Start) Part(BareKeyOrStringValueSyntax part) => part switch
    {
        StringValueSyntax text => (text.Value ?? "", text.Span.Start.Offset),
        BareKeySyntax bare => (bare.Key?.Text ?? "", bare.Span.Start.Offset),
        _ => ("", part.Span.Start.Offset),
    };

    private Node Value(ValueSyntax value)
    {
        int start = value.Span.Start.Offset;
        return value switch
        {
            StringValueSyntax text => Text(text, start),
            IntegerValueSyntax whole => new(source, NodeKind.Number, start) { Number = whole.Value, Text = Raw(value) },
            FloatValueSyntax number => Float(number, start),
            BooleanValueSyntax truth => new(source, NodeKind.Truth, start) { Truth = truth.Value, Text = Raw(value) },
            ArraySyntax list => List(list, start),
            InlineTableSyntax table => Inline(table, start),
            _ => new(source, NodeKind.Date, start),
        };
    }

    private Node Float(FloatValueSyntax number, int start)
    {
        Node node = new(source, NodeKind.Number, start) { Number = number.Value, Text = Raw(number) };
        return double.IsFinite(number.Value)
            ? node
            : throw node.Error($"The number {SourceText.Quote(node.Text)} is {(double.IsNaN(number.Value) ? "not a number" : "infinite")}. Give a finite one, up to 1.7e308.");
    }

    private Node Text(StringValueSyntax text, int start)
    {
        string value = text.Value ?? "", all = source.Text;
        bool isLong = string.CompareOrdinal(all, start, "\"\"\"", 0, 3) == 0 || string.CompareOrdinal(all, start, "'''", 0, 3) == 0;
        int first = start + (isLong ? 3 : 1);
        if (isLong && first < all.Length && all[first] == '\r')
            first++;
        if (isLong && first < all.Length && all[first] == '\n')
            first++;
        bool isPlain = string.CompareOrdinal(all, first, value, 0, value.Length) == 0;
        return new(source, NodeKind.Text, start) { Text = value, TextStart = isPlain ? first : -1 };
    }

    private Node List(ArraySyntax list, int start)
    {
        Node node = new(source, NodeKind.Array, start) { IsClosed = true };
        foreach (ArrayItemSyntax item in list.Items)
            node.Items.Add(Value(item.Value!));
        return node;
    }

    private Node Inline(InlineTableSyntax table, int start)
    {
        Node node = new(source, NodeKind.Table, start);
        foreach (InlineTableItemSyntax item in table.Items)
            Add(node, item.KeyValue!);
        node.IsClosed = true;
        return node;
    }

    private string Raw(ValueSyntax value)
        => source.Text[value.Span.Start.Offset..Math.Min(source.Text.Length, value.Span.End.Offset + 1)];
}
