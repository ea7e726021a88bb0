using System.Collections.Immutable;
using TensorRG.Models.Files.Expressions;

namespace TensorRG.Models.Files;

/// <summary>Reads terms: expressions of the variables of a cluster.</summary>
/// <param name="globals">Parameters and constants.</param>
/// <param name="variables">Names of the variables of a site; one without a name for an edge.</param>
/// <param name="keys">The keys that the lattice allows.</param>
internal sealed class TermReader(Globals globals, ImmutableArray<string> variables, ImmutableArray<ClusterKey> keys)
{
    private readonly Dictionary<string, Scope> scopes = keys.ToDictionary(k => k.Name, k => MakeScope(globals, variables, k));

    /// <summary>The keys.</summary>
    public ImmutableArray<ClusterKey> Keys => keys;

    /// <summary>The terms of a table.</summary>
    /// <param name="node">The table, or null where there is none.</param>
    /// <param name="where">The table in words.</param>
    /// <param name="type">What its terms yield.</param>
    /// <exception cref="ModelFileException">A term that is not right.</exception>
    public ImmutableArray<LocalTerm> Table(Node? node, string where, ExpressionType type)
    {
        if (node is null)
            return [];
        TableReader table = TableReader.Of(node, where);
        table.Allow([.. keys.Select(k => k.Name)]);
        return Terms(table, type);
    }

    /// <summary>The terms among the entries of a table that has other keys too.</summary>
    /// <param name="table">The table.</param>
    /// <param name="type">What its terms yield.</param>
    /// <exception cref="ModelFileException">A term that is not right.</exception>
    public ImmutableArray<LocalTerm> Terms(TableReader table, ExpressionType type)
        => [.. table.Entries.Select(e => (Key: keys.FirstOrDefault(k => k.Name == e.Key), e.Value)).Where(t => t.Key is not null).Select(t => Term(t.Key!, t.Value, type))];

    /// <summary>One term.</summary>
    /// <param name="key">Where.</param>
    /// <param name="value">Its value in the file.</param>
    /// <param name="type">What it yields.</param>
    /// <exception cref="ModelFileException">It is not right.</exception>
    public LocalTerm Term(ClusterKey key, Node value, ExpressionType type)
        => new(key, TableReader.AsExpression(value, scopes[key.Name], type, $"'{key.Name}'"));

    // The variables follow the parameters and constants, site after site.
    private static Scope MakeScope(Globals globals, ImmutableArray<string> variables, ClusterKey key)
    {
        List<KeyValuePair<string, int>> names = [];
        for (int site = 0; site < key.Legs.Length; site++)
        {
            for (int v = 0; v < variables.Length; v++)
            {
                int slot = globals.Count + (site * variables.Length) + v;
                names.Add(new(variables[v].Length == 0 ? key.Legs[site] : $"{variables[v]}_{key.Legs[site]}", slot));
                if (key.Legs.Length == 1 && variables[v].Length > 0)
                    names.Add(new(variables[v], slot));
            }
        }
        return globals.Scope.With(names, name => Hint(variables, key, name));
    }

    private static string? Hint(ImmutableArray<string> variables, ClusterKey key, string name)
    {
        int bar = name.IndexOf('_', StringComparison.Ordinal);
        string variable = bar < 0 ? name : name[..bar];
        if (variable.Length == 0 || !variables.Contains(variable))
            return null;
        string indexed = string.Join(", ", key.Legs.Select(l => $"{variable}_{l}"));
        return $"A term on '{key.Name}' knows the variable as {indexed}.";
    }
}
