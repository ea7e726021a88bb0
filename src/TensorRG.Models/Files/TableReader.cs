using TensorRG.Models.Files.Expressions;

namespace TensorRG.Models.Files;

/// <summary>Reads the keys of one table with their types.</summary>
/// <param name="table">The table.</param>
/// <param name="where">The table in words, such as "[network]", for messages.</param>
internal sealed class TableReader(Node table, string where)
{
    /// <summary>The entries, in the order of the file.</summary>
    public IReadOnlyList<NodeEntry> Entries => table.Entries;

    /// <summary>The table.</summary>
    public Node Table => table;

    /// <summary>A reader of a value that must be a table.</summary>
    /// <param name="node">The value.</param>
    /// <param name="where">The table in words.</param>
    /// <exception cref="ModelFileException">It is no table.</exception>
    public static TableReader Of(Node node, string where) => node.Kind == NodeKind.Table
        ? new(node, where)
        : throw node.Error($"{where} must be a table, but is {node.KindText}. Write the header {where} and its keys below, or {{ key = value }}.");

    /// <summary>Refuses keys that have no meaning here.</summary>
    /// <param name="keys">The keys allowed.</param>
    /// <exception cref="ModelFileException">Another key.</exception>
    public void Allow(params IReadOnlyList<string> keys)
    {
        foreach (NodeEntry entry in table.Entries)
        {
            if (!keys.Contains(entry.Key))
                throw table.Source.Error(entry.Start, $"There is no key {SourceText.Quote(entry.Key)} in {where}.{NameSuggestion.Text(entry.Key, keys)} Allowed are: {string.Join(", ", keys)}.");
        }
    }

    /// <summary>Refuses more entries than anyone needs.</summary>
    /// <exception cref="ModelFileException">There are too many.</exception>
    public void Limit()
    {
        if (table.Entries.Count > Limits.Entries)
            throw table.Source.Error(table.Entries[Limits.Entries].Start, $"There are more than {Limits.Entries} entries in {where}. Remove some.");
    }

    /// <summary>The value of a key, or null.</summary>
    /// <param name="key">The key.</param>
    public Node? Find(string key) => table.Find(key)?.Value;

    /// <summary>The value of a key that must be there.</summary>
    /// <param name="key">The key.</param>
    /// <param name="example">A value.</param>
    /// <exception cref="ModelFileException">It is not there.</exception>
    public Node Required(string key, string example)
        => Find(key) ?? throw table.Error($"The key '{key}' is missing in {where}. Add it, such as {key} = {example}.");

    /// <summary>The value of a text, or null.</summary>
    /// <param name="key">The key.</param>
    /// <exception cref="ModelFileException">It is no text.</exception>
    public string? Text(string key) => Find(key) is { } node ? AsText(node, key) : null;

    /// <summary>The value of a text that must be there.</summary>
    /// <param name="key">The key.</param>
    /// <param name="example">A value.</param>
    /// <exception cref="ModelFileException">It is not there, empty or no text.</exception>
    public string RequiredText(string key, string example)
    {
        Node node = Required(key, example);
        string text = AsText(node, key);
        return text.Trim().Length > 0 ? text : throw node.Error($"'{key}' is empty. Write {key} = {example}.");
    }

    /// <summary>The value of a truth value; false where it is not there.</summary>
    /// <param name="key">The key.</param>
    /// <exception cref="ModelFileException">It is no truth value.</exception>
    public bool Truth(string key)
    {
        Node? node = Find(key);
        return node is not null && (node.Kind == NodeKind.Truth
            ? node.Truth
            : throw node.Error($"'{key}' must be true or false, but is {node.KindText}. Write {key} = true, without quotes."));
    }

    /// <summary>The value of a number, which may be written as an expression of numbers; null where it is not there.</summary>
    /// <param name="key">The key.</param>
    /// <exception cref="ModelFileException">It is no real number.</exception>
    public double? Number(string key) => Find(key) is { } node
        ? AsExpression(node, Scope.Empty, ExpressionType.Number, $"'{key}'").Real([], $"'{key}'")
        : null;

    /// <summary>A value as text.</summary>
    /// <param name="node">The value.</param>
    /// <param name="key">Its key.</param>
    /// <exception cref="ModelFileException">It is no text.</exception>
    public static string AsText(Node node, string key) => node.Kind == NodeKind.Text
        ? node.Text
        : throw node.Error($"'{key}' must be a text, but is {node.KindText}. Put it in quotes.");

    /// <summary>A value as an expression.</summary>
    /// <param name="node">The value.</param>
    /// <param name="scope">The names it may use.</param>
    /// <param name="type">The type it must have.</param>
    /// <param name="what">What it is, for messages.</param>
    /// <exception cref="ModelFileException">It is none, or not of that type.</exception>
    public static Expression AsExpression(Node node, Scope scope, ExpressionType type, string what) => (node.Kind, type) switch
    {
        (NodeKind.Text, _) => Expression.Parse(node.Text, node.Spot, scope, type),
        (NodeKind.Number, ExpressionType.Number) => Expression.Constant(node.Text, node.Spot, node.Number),
        (NodeKind.Truth, ExpressionType.Truth) => Expression.Constant(node.Text, node.Spot, node.Truth),
        _ => throw node.Error($"{what} must be {(type == ExpressionType.Number ? "a number or an expression" : "a condition")}, but is {node.KindText}. Write it in quotes, such as {(type == ExpressionType.Number ? "\"2*J\"" : "\"J > 0\"")}."),
    };
}
