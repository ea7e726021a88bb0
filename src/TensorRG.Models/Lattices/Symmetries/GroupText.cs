using System.Globalization;

namespace TensorRG.Models.Lattices.Symmetries;

/// <summary>Says what a group does to the states.</summary>
internal static class GroupText
{
    private const int MaxShown = 12;

    /// <summary>A sentence fragment such as "Z2: up &lt;-&gt; down", one for each factor; "none" for the trivial group.</summary>
    public static string Of(StateGroup group, IReadOnlyList<string> labels)
        => group.IsTrivial
            ? "none"
            : string.Join("; ", group.Generators.Zip(group.Orders, (g, n) => FormattableString.Invariant($"Z{n}: {Action(g, n, labels)}")));

    private static string Action(int[] permutation, int order, IReadOnlyList<string> labels)
    {
        if (order == 2 && IsSignChange(permutation, labels))
            return "s -> -s";
        if (order > 2 && permutation.Select((to, from) => to == (from + 1) % permutation.Length).All(static x => x))
            return "cyclic shift of the states";
        if (permutation.Length > MaxShown)
            return FormattableString.Invariant($"{permutation.Length} states in cycles of {order}");
        return string.Join(", ", Cycles(permutation).Select(c => Cycle(c, labels)));
    }

    private static bool IsSignChange(int[] permutation, IReadOnlyList<string> labels)
    {
        double?[] values = [.. labels.Select(static l => double.TryParse(l, NumberStyles.Float, CultureInfo.InvariantCulture, out double x) ? x : (double?)null)];
        return permutation.Select((to, from) => values[from] is { } a && values[to] is { } b && Math.Abs(a + b) < 1e-9 * Math.Max(1, Math.Abs(a))).All(static x => x);
    }

    private static IEnumerable<int[]> Cycles(int[] permutation)
    {
        var seen = new bool[permutation.Length];
        for (int s = 0; s < permutation.Length; s++)
        {
            var cycle = new List<int>();
            for (int t = s; !seen[t]; t = permutation[t])
            {
                seen[t] = true;
                cycle.Add(t);
            }
            if (cycle.Count > 1)
                yield return [.. cycle];
        }
    }

    private static string Cycle(int[] cycle, IReadOnlyList<string> labels)
        => cycle.Length == 2
            ? $"{labels[cycle[0]]} <-> {labels[cycle[1]]}"
            : string.Join(" -> ", cycle.Append(cycle[0]).Select(s => labels[s]));
}
