using System.Collections.Immutable;
using System.Globalization;
using System.Numerics;
using TensorRG.Models.Files.Expressions;

namespace TensorRG.Models.Files;

/// <summary>Reads what values a variable takes: a list, a range, occupation, angles, or a quadrature of an angle or a real field.</summary>
/// <param name="scope">Parameters and constants.</param>
internal sealed class VariableReader(Scope scope)
{
    private static readonly string[] Counts = ["angles", "circle", "field"];

    private const string Forms = "Write [-1, 1], \"0..q-1\", \"occupation\", { angles = \"q\" }, { circle = 48 } or { field = 24, width = 1 }";

    /// <summary>A variable.</summary>
    /// <param name="name">Its name.</param>
    /// <param name="node">Its value in the file.</param>
    /// <exception cref="ModelFileException">It is none of the forms.</exception>
    public SiteVariable Read(string name, Node node) => new(name, node, node.Kind switch
    {
        NodeKind.Array => List(node),
        NodeKind.Text when node.Text.Trim() == "occupation" => static _ => [new(0, "empty"), new(1, "occupied")],
        NodeKind.Text => Range(node),
        NodeKind.Table => Quadrature(name, node),
        _ => throw node.Error($"The values of '{name}' cannot be {node.KindText}. {Forms}."),
    });

    private Func<Workspace, ImmutableArray<StateValue>> List(Node node)
    {
        if (node.Items.Count is 0 or > Limits.States)
            throw node.Error($"The list of values has {node.Items.Count} items, but there must be 1 to {Limits.States}. {(node.Items.Count == 0 ? Forms : "Use fewer values")}.");
        ImmutableArray<Expression> items = [.. node.Items.Select(i => TableReader.AsExpression(i, scope, ExpressionType.Number, "A value of the list"))];
        return work => [.. items.Select(work.Number).Select(z => new StateValue(z, Label(z)))];
    }

    private Func<Workspace, ImmutableArray<StateValue>> Range(Node node)
    {
        int dots = node.Text.IndexOf("..", StringComparison.Ordinal);
        if (dots < 0)
            throw node.Error($"{SourceText.Quote(node.Text)} names no values. {Forms}.");
        Expression from = Expression.Parse(node.Text[..dots], node.Spot, scope, ExpressionType.Number);
        TextSpot rest = node.Spot with { Start = node.Spot.Start + (node.Spot.IsExact ? dots + 2 : 0) };
        Expression to = Expression.Parse(node.Text[(dots + 2)..], rest, scope, ExpressionType.Number);
        return work => Steps(node, work.Real(from, "The start of the range"), work.Real(to, "The end of the range"));
    }

    private static ImmutableArray<StateValue> Steps(Node node, double from, double to)
    {
        double steps = to - from;
        if (!(steps >= 0) || Math.Abs(steps - Math.Round(steps)) > 1e-9)
            throw node.Error(FormattableString.Invariant($"The range runs from {from} to {to}, which is no whole number of steps of 1 upward. Change the ends."));
        if (steps >= Limits.States)
            throw node.Error(FormattableString.Invariant($"The range has {steps + 1} values, but at most {Limits.States} fit. Make it shorter, or set the parameters in it lower."));
        return [.. Enumerable.Range(0, (int)Math.Round(steps) + 1).Select(k => new StateValue(from + k, Label(from + k)))];
    }

    private Func<Workspace, ImmutableArray<StateValue>> Quadrature(string name, Node node)
    {
        TableReader table = new(node, $"the values of '{name}'");
        table.Allow("angles", "circle", "field", "width");
        string[] given = [.. Counts.Where(k => table.Find(k) is not null)];
        if (given.Length != 1)
            throw node.Error($"The values of '{name}' need exactly one of the keys angles, circle and field. {Forms}.");
        Expression count = Number(table, given[0]);
        if (given[0] == "field")
            return Field(count, table.Find("width") is null ? null : Number(table, "width"));
        if (table.Find("width") is { } width)
            throw width.Error("'width' belongs to a field. Remove it, or write { field = 24, width = 1 }.");
        bool isIntegral = given[0] == "circle";
        return work => Angles(work.Whole(count, 1, Limits.States, $"'{given[0]}'"), isIntegral);
    }

    private Expression Number(TableReader table, string key) => TableReader.AsExpression(table.Find(key)!, scope, ExpressionType.Number, $"'{key}'");

    private static ImmutableArray<StateValue> Angles(int count, bool isIntegral)
    {
        double log = isIntegral ? Math.Log(2 * Math.PI / count) : 0;
        return [.. Enumerable.Range(0, count).Select(k => new StateValue(2 * Math.PI * k / count, Invariant($"2pi {k}/{count}"), log))];
    }

    private static Func<Workspace, ImmutableArray<StateValue>> Field(Expression count, Expression? width) => work =>
    {
        int n = work.Whole(count, 1, Limits.States, "'field'");
        double scale = width is null ? 1 : work.Real(width, "'width'");
        if (!(scale > 0))
            throw width!.Spot.Error(0, Invariant($"'width' is {scale}, but must be above zero. It is the length over which the weight of the field falls off."));
        return [.. GaussHermite.Rule(n).Select(p => new StateValue(scale * p.Node, Label(scale * p.Node), p.LogWeight + Math.Log(scale)))];
    };

    private static string Label(Complex z) => z.Imaginary == 0
        ? Invariant($"{z.Real:G6}")
        : Invariant($"{z.Real:G6}{(z.Imaginary < 0 ? "-" : "+")}{Math.Abs(z.Imaginary):G6}i");

    private static string Invariant(FormattableString text) => text.ToString(CultureInfo.InvariantCulture);
}
