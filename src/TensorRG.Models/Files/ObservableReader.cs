using System.Collections.Immutable;
using TensorRG.Models.Files.Expressions;
using TensorRG.Models.Lattices;

namespace TensorRG.Models.Files;

/// <summary>Reads [observables].</summary>
/// <param name="terms">Reads their terms.</param>
/// <param name="lattice">The lattice.</param>
internal sealed class ObservableReader(TermReader terms, LatticeKind lattice)
{
    /// <summary>The name of the observable that only the entropy needs.</summary>
    public const string LogWeight = "log-weight";

    private static readonly string[] Reserved = ["energy", "ln-z", "free-energy", "entropy", "specific-heat", "susceptibility", "latent-heat", LogWeight];

    /// <summary>The observables, in the order of the file.</summary>
    /// <param name="node">The table, or null where there is none.</param>
    /// <exception cref="ModelFileException">One that is not right.</exception>
    public ImmutableArray<FileObservable> Read(Node? node)
    {
        if (node is null)
            return [];
        TableReader table = TableReader.Of(node, "[observables]");
        table.Limit();
        return [.. table.Entries.Select(One)];
    }

    private FileObservable One(NodeEntry entry)
    {
        if (!ContentReader.IsHyphenated(entry.Key))
            throw entry.Value.Source.Error(entry.Start, $"The observable {SourceText.Quote(entry.Key)} has no valid name. Use up to {Limits.NameLength} lower case letters, digits and hyphens, a letter first.");
        if (Reserved.Contains(entry.Key))
            throw entry.Value.Source.Error(entry.Start, $"The observable '{entry.Key}' has a reserved name. Choose another{(entry.Key == "energy" ? "; the energy is there by itself where there is [energy]" : "")}.");
        if (entry.Value.Kind != NodeKind.Table)
            return Made(entry.Key, [terms.Term(terms.Keys[0], entry.Value, ExpressionType.Number)], null);
        TableReader table = new(entry.Value, $"observable '{entry.Key}'");
        table.Allow([.. terms.Keys.Select(k => k.Name), "staggered", "order", "meaning", "unit"]);
        ImmutableArray<LocalTerm> found = terms.Terms(table, ExpressionType.Number);
        if (found.Length == 0)
            throw entry.Value.Error($"The observable '{entry.Key}' has no term. Add one of: {string.Join(", ", terms.Keys.Select(k => k.Name))}.");
        CheckStaggered(entry, table, found);
        return Made(entry.Key, found, table);
    }

    private static FileObservable Made(string name, ImmutableArray<LocalTerm> terms, TableReader? table) => new(
        name,
        table?.Text("meaning")?.Trim() is { Length: > 0 } meaning ? meaning : $"Mean of {name} per site",
        table?.Text("unit")?.Trim() is { Length: > 0 } unit ? unit : "none",
        terms,
        table?.Truth("staggered") ?? false,
        table?.Truth("order") ?? false);

    private void CheckStaggered(NodeEntry entry, TableReader table, ImmutableArray<LocalTerm> found)
    {
        if (lattice == LatticeKind.Honeycomb && table.Truth("staggered") && found.Any(t => t.Key.Name != "site"))
            throw entry.Value.Error($"On the honeycomb lattice only terms on sites can be staggered, but '{entry.Key}' has others. Remove them, or the key staggered.");
    }
}
