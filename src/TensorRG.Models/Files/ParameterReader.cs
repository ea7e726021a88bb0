using System.Collections.Immutable;
using System.Globalization;
using System.Numerics;
using TensorRG.Models.Files.Expressions;

namespace TensorRG.Models.Files;

/// <summary>Reads [parameters].</summary>
internal static class ParameterReader
{
    private const string Where = "[parameters]";
    private const double Largest = 1e6;

    /// <summary>The parameters, in the order of the file.</summary>
    /// <param name="node">The table, or null where there is none.</param>
    /// <param name="names">Takes their names.</param>
    /// <exception cref="ModelFileException">A declaration that is not right.</exception>
    public static ImmutableArray<FileParameter> Read(Node? node, NameRegistry names)
    {
        if (node is null)
            return [];
        TableReader table = TableReader.Of(node, Where);
        table.Limit();
        ImmutableArray<FileParameter> parameters = [.. table.Entries.Select(e => One(e, names))];
        CheckShorthands(parameters, node.Source);
        return parameters;
    }

    private static FileParameter One(NodeEntry entry, NameRegistry names)
    {
        names.AddParameter(entry.Key, entry.Start);
        TableReader table = entry.Value.Kind == NodeKind.Table ? new(entry.Value, $"parameter '{entry.Key}'") : Short(entry);
        table.Allow("default", "min", "max", "whole", "unit", "meaning", "complex", "shorthand");
        Node value = table.Required("default", "1");
        Complex start = TableReader.AsExpression(value, Scope.Empty, ExpressionType.Number, "'default'").Number([]);
        bool isComplex = table.Truth("complex");
        if (!isComplex && start.Imaginary != 0)
            throw value.Error($"The default of '{entry.Key}' is complex. Add complex = true, or give a real number.");
        string? shorthand = table.Text("shorthand");
        if (shorthand is not null)
            CheckShorthand(table, shorthand, isComplex);
        ParameterDefinition definition = Definition(entry, table, start.Real);
        return new(entry.Key, entry.Start, isComplex ? Parts(definition, value, start) : [Checked(definition, value, start.Real)], shorthand);
    }

    // T = 1.0 is short for T = { default = 1.0 }.
    private static TableReader Short(NodeEntry entry)
    {
        if (entry.Value.Kind is not (NodeKind.Number or NodeKind.Text))
            throw entry.Value.Error($"The parameter '{entry.Key}' must be a number or a table, but is {entry.Value.KindText}. Write {entry.Key} = 1, or {entry.Key} = {{ default = 1 }}.");
        Node table = new(entry.Value.Source, NodeKind.Table, entry.Value.Start);
        table.Add(new("default", entry.Value.Start, entry.Value));
        return new(table, $"parameter '{entry.Key}'");
    }

    private static ParameterDefinition Definition(NodeEntry entry, TableReader table, double start)
    {
        bool isTemperature = entry.Key == FileParameter.Temperature;
        ParameterDefinition temperature = ParameterDefinition.Temperature(start);
        ParameterDefinition made = new()
        {
            Name = isTemperature ? temperature.Name : entry.Key,
            Symbol = entry.Key,
            Meaning = Meaning(table) ?? (isTemperature ? temperature.Meaning : $"Parameter {entry.Key} of the model file"),
            Unit = table.Text("unit") ?? (isTemperature ? temperature.Unit : "none"),
            Default = start,
            Minimum = table.Number("min") ?? (isTemperature ? temperature.Minimum : -Largest),
            Maximum = table.Number("max") ?? (isTemperature ? temperature.Maximum : Largest),
            IsInteger = table.Truth("whole"),
        };
        Check(made, table, isTemperature);
        return made;
    }

    private static void Check(ParameterDefinition made, TableReader table, bool isTemperature)
    {
        if (made.Minimum > made.Maximum)
            throw (table.Find("min") ?? table.Find("max")!).Error($"The least value of '{made.Symbol}' is above the largest, {Text(made.Maximum)}. Exchange min and max.");
        if (isTemperature && made.Minimum <= 0)
            throw table.Find("min")!.Error("The temperature must stay above zero. Give a positive min, or leave it out.");
        foreach (string key in new[] { "whole", "complex" })
        {
            if (isTemperature && table.Truth(key))
                throw table.Find(key)!.Error($"The temperature T cannot be {key}. Remove the key.");
        }
        if (made.IsInteger && table.Truth("complex"))
            throw table.Find("whole")!.Error("A parameter cannot be both whole and complex. Remove one of the keys.");
        if (made.IsInteger && Math.Max(Math.Abs(made.Minimum), Math.Abs(made.Maximum)) > int.MaxValue)
            throw (table.Find("max") ?? table.Find("min")!).Error($"Whole parameters go from {-int.MaxValue} to {int.MaxValue}. Give smaller limits.");
    }

    private static string? Meaning(TableReader table) => table.Text("meaning")?.Trim().TrimEnd('.') is { Length: > 0 } text ? text : null;

    private static ImmutableArray<ParameterDefinition> Parts(ParameterDefinition whole, Node value, Complex start) =>
    [
        Checked(Part(whole, "re", "real part", start.Real), value, start.Real),
        Checked(Part(whole, "im", "imaginary part", start.Imaginary), value, start.Imaginary),
    ];

    private static ParameterDefinition Part(ParameterDefinition whole, string suffix, string words, double start) => whole with
    {
        Name = $"{whole.Name}.{suffix}",
        Symbol = $"{whole.Symbol}.{suffix}",
        Meaning = $"{whole.Meaning}, {words}",
        Default = start,
    };

    private static ParameterDefinition Checked(ParameterDefinition definition, Node value, double start) => definition.Allows(start)
        ? definition
        : throw value.Error($"The default of '{definition.Symbol}' is {Text(start)}, but must be {definition.RangeText}. Change it, or the keys min, max and whole.");

    private static void CheckShorthand(TableReader table, string shorthand, bool isComplex)
    {
        Node node = table.Find("shorthand")!;
        if (isComplex)
            throw node.Error("A complex parameter has no shorthand: its own name sets both parts. Remove the key.");
        if (!NameRegistry.IsName(shorthand))
            throw node.Error($"The shorthand {SourceText.Quote(shorthand)} is no name. Use ASCII letters, digits and underscores, a letter first.");
    }

    private static void CheckShorthands(ImmutableArray<FileParameter> parameters, SourceText source)
    {
        foreach (FileParameter parameter in parameters.Where(p => p.Shorthand is not null))
        {
            FileParameter? other = parameters.FirstOrDefault(p => p.Definitions.Any(d => d.IsCalled(parameter.Shorthand!)));
            if (other is not null)
                throw source.Error(parameter.Start, $"The shorthand '{parameter.Shorthand}' of '{parameter.Name}' is the name of a parameter. Choose another.");
        }
    }

    private static string Text(double value) => value.ToString(CultureInfo.InvariantCulture);
}
