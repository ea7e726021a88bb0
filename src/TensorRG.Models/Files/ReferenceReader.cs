using System.Collections.Immutable;
using TensorRG.Models.Files.Expressions;

namespace TensorRG.Models.Files;

/// <summary>Reads [critical] and [[reference]].</summary>
/// <param name="globals">Parameters and constants.</param>
internal sealed class ReferenceReader(Globals globals)
{
    private const string SourceExample = "\"A. Author, Journal 1, 1 (1970)\"";

    /// <summary>The critical temperature, or null.</summary>
    /// <param name="node">The table, or null where there is none.</param>
    /// <exception cref="ModelFileException">It is not right.</exception>
    public CriticalRule? Critical(Node? node)
    {
        if (node is null)
            return null;
        TableReader table = TableReader.Of(node, "[critical]");
        table.Allow("temperature", "when", "source");
        if (!globals.HasTemperature)
            throw node.Error("[critical] needs a temperature. Add T = 1 to [parameters].");
        CriticalRule rule = new(
            Value(table, "temperature", "\"2*J/ln(1+sqrt(2))\""),
            When(table),
            table.RequiredText("source", SourceExample));
        foreach (Expression? expression in new[] { rule.Temperature, rule.When })
        {
            if (expression is not null && globals.UsesTemperature(expression))
                throw expression.Spot.Error(0, "The critical temperature cannot depend on T. Express it by the other parameters.");
        }
        return rule;
    }

    /// <summary>The reference values.</summary>
    /// <param name="node">The list, or null where there is none.</param>
    /// <param name="observables">The observables of the file.</param>
    /// <exception cref="ModelFileException">One that is not right.</exception>
    public ImmutableArray<FileReference> References(Node? node, ImmutableArray<FileObservable> observables)
    {
        if (node is null)
            return [];
        if (node.Kind != NodeKind.Array)
            throw node.Error("'reference' must be a list of tables. Write the header [[reference]] with two brackets.");
        if (node.Items.Count > Limits.Entries)
            throw node.Error($"There are more than {Limits.Entries} references. Remove some.");
        string[] quantities = [.. QuantityNames.All.Concat(observables.Select(o => o.Name)).Distinct()];
        return [.. node.Items.Select(item => One(TableReader.Of(item, "[[reference]]"), quantities))];
    }

    private FileReference One(TableReader table, string[] quantities)
    {
        table.Allow("quantity", "value", "uncertainty", "when", "source");
        string quantity = table.RequiredText("quantity", "\"ln-z\"");
        if (!quantities.Contains(quantity))
            throw table.Find("quantity")!.Error($"There is no quantity {SourceText.Quote(quantity)}.{NameSuggestion.Text(quantity, quantities)} There are: {string.Join(", ", quantities)}.");
        double? uncertainty = table.Number("uncertainty");
        if (uncertainty < 0)
            throw table.Find("uncertainty")!.Error("The uncertainty is below zero. Give the absolute uncertainty, such as 1e-15.");
        return new(quantity, Value(table, "value", "\"1.5*ln(4/3)\""), uncertainty, When(table), table.RequiredText("source", SourceExample));
    }

    private Expression Value(TableReader table, string key, string example)
        => TableReader.AsExpression(table.Required(key, example), globals.Scope, ExpressionType.Number, $"'{key}'");

    private Expression? When(TableReader table)
        => table.Find("when") is { } node ? TableReader.AsExpression(node, globals.Scope, ExpressionType.Truth, "'when'") : null;
}
