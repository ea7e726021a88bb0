using System.Numerics;

namespace TensorRG.Models.Lattices.Symmetries;

/// <summary>Checks, assignment by assignment, whether a permutation of the states leaves a set of tables as they are.</summary>
internal sealed class TableSymmetry
{
    private const double Tolerance = 1e-13;

    private readonly int states;
    private readonly List<(Complex[] Values, int Arity, double Allowed)> tables = [];
    private readonly string[] marks;

    /// <summary>Tables over variables of the given number of states, each row-major with q^n values.</summary>
    public TableSymmetry(int states, IEnumerable<Complex[]> tables)
    {
        this.states = states;
        foreach (Complex[] values in tables)
        {
            int arity = 0;
            for (long size = 1; size < values.Length; size *= states)
                arity++;
            double largest = values.Where(static v => double.IsFinite(v.Real)).Select(static v => Complex.Abs(v)).DefaultIfEmpty(0).Max();
            this.tables.Add((values, arity, Tolerance * Math.Max(1, largest)));
        }
        marks = [.. Enumerable.Range(0, states).Select(Mark)];
    }

    /// <summary>Comparisons made so far: the measure of effort.</summary>
    public long Comparisons { get; private set; }

    /// <summary>True if two states see the same values, in whatever order: only then can one go to the other.</summary>
    public bool Alike(int a, int b) => marks[a] == marks[b];

    /// <summary>True if all table entries that involve the state and otherwise only assigned states keep their value.</summary>
    /// <param name="map">Image of each state, -1 where not yet assigned.</param>
    /// <param name="state">An assigned state.</param>
    public bool Keeps(int[] map, int state)
    {
        int[] assigned = [.. Enumerable.Range(0, states).Where(s => map[s] >= 0)];
        return tables.All(t => Keeps(t, map, assigned, state, 0, 0, 0, false));
    }

    // Walks through all index tuples of assigned states that contain the state at least once.
    private bool Keeps((Complex[] Values, int Arity, double Allowed) table, int[] map, int[] assigned, int state, int depth, int from, int to, bool contains)
    {
        if (depth == table.Arity)
        {
            Comparisons++;
            return !contains || Same(table.Values[from], table.Values[to], table.Allowed);
        }
        if (depth == table.Arity - 1 && !contains)
            return Keeps(table, map, assigned, state, depth + 1, (from * states) + state, (to * states) + map[state], true);
        foreach (int s in assigned)
        {
            if (!Keeps(table, map, assigned, state, depth + 1, (from * states) + s, (to * states) + map[s], contains || s == state))
                return false;
        }
        return true;
    }

    private static bool Same(Complex a, Complex b, double allowed)
        => double.IsInfinity(a.Real) || double.IsInfinity(b.Real)
            ? double.IsInfinity(a.Real) && double.IsInfinity(b.Real)
            : Complex.Abs(a - b) <= allowed;

    // The sorted values of the slice of each table with the state at each place, rounded well above the tolerance (adding zero makes minus zero zero).
    private string Mark(int state)
    {
        var parts = new List<string>();
        foreach ((Complex[] values, int arity, double allowed) in tables)
        {
            double unit = 1e4 * allowed;
            for (int place = 0; place < arity; place++)
            {
                int stride = (int)Math.Pow(states, arity - 1 - place);
                parts.AddRange(values.Where((_, i) => i / stride % states == state).Select(v => Rounded(v, unit)).Order(StringComparer.Ordinal));
            }
        }
        return string.Join('|', parts);
    }

    private static string Rounded(Complex value, double unit)
        => double.IsInfinity(value.Real) ? "x" : FormattableString.Invariant($"{Math.Round(value.Real / unit) + 0.0:R};{Math.Round(value.Imaginary / unit) + 0.0:R}");
}
