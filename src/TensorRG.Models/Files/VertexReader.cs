using System.Collections.Immutable;
using TensorRG.Models.Files.Expressions;
using TensorRG.Models.Lattices;

namespace TensorRG.Models.Files;

/// <summary>Reads [vertex]: variables on the edges and the weights of a vertex.</summary>
/// <param name="table">The table.</param>
/// <param name="lattice">The lattice.</param>
/// <param name="globals">Parameters and constants.</param>
internal sealed class VertexReader(TableReader table, LatticeKind lattice, Globals globals)
{
    private readonly ClusterKey key = ClusterKey.Vertex(lattice);

    /// <summary>Refuses keys that are wrong or do not go together.</summary>
    /// <exception cref="ModelFileException">A key that is wrong.</exception>
    public void Check()
    {
        table.Allow("edge", "weight", "energy", "table");
        if (table.Find("table") is { } rows && table.Find("weight") is not null)
            throw rows.Error("[vertex] has both a weight and a table. Keep one of them.");
        if (table.Find("weight") is null && table.Find("energy") is null && table.Find("table") is null)
            throw table.Table.Error("[vertex] says nothing about the weights. Add weight, energy or table.");
    }

    /// <summary>The variable of an edge.</summary>
    /// <exception cref="ModelFileException">It is not there or not right.</exception>
    public SiteVariable Edge() => new VariableReader(globals.Scope).Read("edge", table.Required("edge", "[0, 1]"));

    /// <summary>The term of weight or energy, if there is one.</summary>
    /// <param name="name">weight or energy.</param>
    /// <param name="terms">Reads it.</param>
    /// <exception cref="ModelFileException">It is not right.</exception>
    public ImmutableArray<LocalTerm> Term(string name, TermReader terms)
        => table.Find(name) is { } node ? [terms.Term(key, node, ExpressionType.Number)] : [];

    /// <summary>The rows of the table; null where there is none.</summary>
    /// <exception cref="ModelFileException">A row that is not right.</exception>
    public ImmutableArray<VertexRow>? Rows()
    {
        if (table.Find("table") is not { } node)
            return null;
        if (node.Kind != NodeKind.Array || node.Items.Count == 0)
            throw node.Error($"The table of a vertex must be a list of rows. {Example()}");
        return node.Items.Count <= Limits.TableEntries
            ? [.. node.Items.Select(Row)]
            : throw node.Error($"The table has more than {Limits.TableEntries} rows. Use weight = \"...\" instead.");
    }

    private VertexRow Row(Node node)
    {
        if (node.Kind != NodeKind.Table)
            throw node.Error($"A row of the table must be a table in braces, but is {node.KindText}. {Example()}");
        TableReader row = new(node, "a row of the table");
        row.Allow([.. key.Legs, "weight"]);
        return new(node, [.. key.Legs.Select(leg => Value(row, leg))], Value(row, "weight"));
    }

    private Expression Value(TableReader row, string name)
        => TableReader.AsExpression(row.Required(name, "1"), globals.Scope, ExpressionType.Number, $"'{name}'");

    private string Example() => $"Write table = [{{ {string.Join(", ", key.Legs.Select(l => $"{l} = 0"))}, weight = 1 }}], with a row for each vertex that occurs.";
}
