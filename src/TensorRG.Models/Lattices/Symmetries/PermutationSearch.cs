namespace TensorRG.Models.Lattices.Symmetries;

/// <summary>Looks for permutations of the states that keep all tables, by trial with retreat; the effort is bounded and what was not found by then is not found.</summary>
internal sealed class PermutationSearch
{
    private const int MaxNodes = 20_000;
    private const long MaxComparisons = 20_000_000;

    private readonly int states;
    private readonly TableSymmetry tables;
    private readonly int[][] generators;
    private readonly bool inverts;
    private readonly int[] map;
    private readonly int[] source;
    private int nodes;
    private long comparisons;

    /// <summary>A search for permutations that commute with the generators or, with inverts, turn each into its inverse.</summary>
    public PermutationSearch(int states, TableSymmetry tables, int[][] generators, bool inverts)
    {
        this.states = states;
        this.tables = tables;
        this.generators = generators;
        this.inverts = inverts;
        map = new int[states];
        source = new int[states];
    }

    /// <summary>A permutation all of whose cycles have the length m, or 1 where fixed states are allowed, that passes the test; null if none is found.</summary>
    public int[]? Cyclic(int length, bool allowFixed, Func<int[], bool> test)
    {
        Start();
        return Cycle(-1, -1, 0, length, allowFixed, test) ? [.. map] : null;
    }

    private void Start()
    {
        Array.Fill(map, -1);
        Array.Fill(source, -1);
        nodes = 0;
        comparisons = tables.Comparisons + MaxComparisons;
    }

    // Prolongs the cycle that began at start and has come to last, or begins the next one.
    private bool Cycle(int start, int last, int count, int length, bool allowFixed, Func<int[], bool> test)
    {
        if (start < 0)
        {
            int next = Array.IndexOf(map, -1);
            if (next < 0)
                return test(map);
            if (Enumerable.Range(0, states).Count(s => tables.Alike(next, s)) >= length && Cycle(next, next, 1, length, allowFixed, test))
                return true;
            return allowFixed && Try(next, next, () => Cycle(-1, -1, 0, length, allowFixed, test));
        }
        if (count == length)
            return Try(last, start, () => Cycle(-1, -1, 0, length, allowFixed, test));
        foreach (int to in Candidates(last, start))
        {
            if (Try(last, to, () => Cycle(start, to, count + 1, length, allowFixed, test)))
                return true;
        }
        return false;
    }

    // The natural shift first: it finds the cyclic order of labels at once, and leaves an order that people know. In pairs, the mirror image first.
    private IEnumerable<int> Candidates(int last, int start)
    {
        int step = last == start ? 1 : last - Array.IndexOf(map, last);
        return Enumerable.Range(0, states)
            .Select(i => (last + ((i + 1) * step % states) + states) % states)
            .Concat(Enumerable.Range(0, states))
            .Distinct()
            .Where(s => s != start && map[s] < 0 && source[s] < 0);
    }

    private bool Try(int from, int to, Func<bool> next)
    {
        if (nodes >= MaxNodes || tables.Comparisons > comparisons || map[from] >= 0 || source[to] >= 0 || !tables.Alike(from, to))
            return false;
        nodes++;
        map[from] = to;
        source[to] = from;
        if (KeepsGroup(from) && tables.Keeps(map, from) && next())
            return true;
        map[from] = -1;
        source[to] = -1;
        return false;
    }

    // With p the permutation and g a generator: p g = g p, or p g = g^-1 p, that is g p g = p.
    private bool KeepsGroup(int state)
    {
        foreach (int[] g in generators)
        {
            int before = Array.IndexOf(g, state);
            if (!Pair(g, state) || !Pair(g, before))
                return false;
        }
        return true;
    }

    private bool Pair(int[] g, int state)
    {
        int here = map[state], there = map[g[state]];
        if (here < 0 || there < 0)
            return true;
        return inverts ? g[there] == here : there == g[here];
    }
}
