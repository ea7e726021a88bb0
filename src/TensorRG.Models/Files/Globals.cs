using System.Collections.Immutable;
using TensorRG.Models.Files.Expressions;

namespace TensorRG.Models.Files;

/// <summary>Parameters and constants: the names that every expression may use. The slots hold the parameters first, then the constants.</summary>
internal sealed class Globals
{
    private Globals(ImmutableArray<FileParameter> parameters, ImmutableArray<FileConstant> constants, Scope scope)
        => (Parameters, Constants, Scope) = (parameters, constants, scope);

    /// <summary>The parameters.</summary>
    public ImmutableArray<FileParameter> Parameters { get; }

    /// <summary>The constants, in the order of the file.</summary>
    public ImmutableArray<FileConstant> Constants { get; }

    /// <summary>Their names.</summary>
    public Scope Scope { get; }

    /// <summary>Number of slots.</summary>
    public int Count => Parameters.Length + Constants.Length;

    /// <summary>True if there is a temperature.</summary>
    public bool HasTemperature => Parameters.Any(p => p.Name == FileParameter.Temperature);

    /// <summary>Reads [constants] on top of the parameters.</summary>
    /// <param name="parameters">The parameters.</param>
    /// <param name="node">The table, or null where there is none.</param>
    /// <param name="names">Takes the names of the constants.</param>
    /// <exception cref="ModelFileException">A constant that is not right, or a circle of them.</exception>
    public static Globals Read(ImmutableArray<FileParameter> parameters, Node? node, NameRegistry names)
    {
        TableReader? table = node is null ? null : TableReader.Of(node, "[constants]");
        table?.Limit();
        IReadOnlyList<NodeEntry> entries = table?.Entries ?? [];
        foreach (NodeEntry entry in entries)
            names.Add(entry.Key, entry.Start, "constant");
        Scope scope = new(parameters.Select(p => p.Name).Concat(entries.Select(e => e.Key)).Select((name, slot) => (name, slot)).ToDictionary());
        Globals globals = new(parameters, [.. entries.Select(e => Constant(e, scope))], scope);
        globals.CheckCircles(node);
        return globals;
    }

    /// <summary>True if an expression depends on the temperature, directly or through constants.</summary>
    /// <param name="expression">The expression.</param>
    public bool UsesTemperature(Expression expression)
    {
        int slot = Scope.Slots.GetValueOrDefault(FileParameter.Temperature, -1);
        HashSet<int> seen = [];
        Stack<int> open = new(expression.Slots);
        while (open.TryPop(out int next))
        {
            if (next == slot)
                return true;
            if (seen.Add(next) && next >= Parameters.Length && next < Count)
                PushAll(open, Constants[next - Parameters.Length].Value.Slots);
        }
        return false;
    }

    private static FileConstant Constant(NodeEntry entry, Scope scope)
        => new(entry.Key, entry.Start, TableReader.AsExpression(entry.Value, scope, ExpressionType.Number, $"The constant '{entry.Key}'"));

    private static void PushAll(Stack<int> stack, IEnumerable<int> slots)
    {
        foreach (int slot in slots)
            stack.Push(slot);
    }

    private void CheckCircles(Node? node)
    {
        HashSet<int> done = [];
        for (int i = 0; i < Constants.Length; i++)
            Visit(i, [], done, node);
    }

    // Depth-first; the path holds the constants that wait for this one.
    private void Visit(int index, List<int> path, HashSet<int> done, Node? node)
    {
        int earlier = path.IndexOf(index);
        if (earlier >= 0)
        {
            string circle = string.Join(" -> ", path.Skip(earlier).Append(index).Select(i => Constants[i].Name));
            throw node!.Source.Error(Constants[index].Start, $"The constants {circle} go in a circle. Give one of them without the others.");
        }
        if (done.Contains(index))
            return;
        path.Add(index);
        foreach (int slot in Constants[index].Value.Slots.Where(s => s >= Parameters.Length).Order())
            Visit(slot - Parameters.Length, path, done, node);
        path.RemoveAt(path.Count - 1);
        done.Add(index);
    }
}
