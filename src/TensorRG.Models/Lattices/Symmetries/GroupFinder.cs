namespace TensorRG.Models.Lattices.Symmetries;

/// <summary>Finds a large commutative group of permutations of the states that keep all weights.</summary>
internal sealed class GroupFinder
{
    private const int MaxFactors = 4;

    // Above this the basis of characters costs more than it saves.
    private const int MaxElements = 1024;

    private readonly int states;
    private readonly TableSymmetry weights;
    private readonly List<int[]> generators = [];
    private readonly List<int> orders = [];

    private GroupFinder(int states, TableSymmetry weights)
    {
        this.states = states;
        this.weights = weights;
    }

    /// <summary>
    /// The group. Permutations that move all states in cycles of one length come first, the longest cycles before others. Where weights are
    /// real and no permutation inverts the group, only its elements of order two are kept: the tensor stays real.
    /// </summary>
    /// <param name="states">Number of states.</param>
    /// <param name="weights">The weights.</param>
    /// <param name="all">The weights and the observables: the inverting permutation keeps these too if it can.</param>
    /// <param name="isReal">True if all weights are real.</param>
    public static StateGroup Find(int states, TableSymmetry weights, TableSymmetry all, bool isReal)
    {
        var finder = new GroupFinder(states, weights);
        while (finder.generators.Count < MaxFactors && finder.FindNext())
        {
        }
        int[][] found = [.. finder.generators];
        int[] orders = [.. finder.orders];
        if (!isReal)
            return new StateGroup(states, found, orders, null);
        return Inverting(states, weights, all, found, orders) is { } inverting
            ? new StateGroup(states, found, orders, inverting)
            : Halves(states, found, orders);
    }

    private static int[]? Inverting(int states, TableSymmetry weights, TableSymmetry all, int[][] generators, int[] orders)
    {
        if (orders.All(static n => n == 2))
            return [.. Enumerable.Range(0, states)];
        foreach (TableSymmetry tables in new[] { all, weights })
        {
            if (new PermutationSearch(states, tables, generators, true).Cyclic(2, true, static _ => true) is { } found)
                return found;
        }
        return null;
    }

    private static StateGroup Halves(int states, int[][] generators, int[] orders)
    {
        int[] even = [.. Enumerable.Range(0, orders.Length).Where(i => orders[i] % 2 == 0)];
        int[][] halves = [.. even.Select(i => Power(generators[i], orders[i] / 2))];
        return new StateGroup(states, halves, [.. even.Select(static _ => 2)], [.. Enumerable.Range(0, states)]);
    }

    private bool FindNext()
    {
        if (generators.Count > 0 && Elements().Select(static p => p[0]).Distinct().Count() == states)
            return false;
        foreach ((int length, bool allowFixed) in Shapes())
        {
            if (orders.Aggregate(length, static (a, b) => a * b) > MaxElements)
                continue;
            if (new PermutationSearch(states, weights, [.. generators], false).Cyclic(length, allowFixed, p => IsNew(p, length)) is not { } found)
                continue;
            generators.Add(found);
            orders.Add(length);
            return true;
        }
        return false;
    }

    private IEnumerable<(int Length, bool AllowFixed)> Shapes()
    {
        for (int length = states; length >= 2; length--)
        {
            if (states % length == 0)
                yield return (length, false);
        }
        for (int length = states - 1; length >= 2; length--)
            yield return (length, true);
    }

    // No power but the whole cycle lies in the group so far: the product is direct.
    private bool IsNew(int[] permutation, int length)
    {
        int[][] known = [.. Elements()];
        for (int n = 1; n < length; n++)
        {
            int[] power = Power(permutation, n);
            if (known.Any(k => k.AsSpan().SequenceEqual(power)))
                return false;
        }
        return true;
    }

    private IEnumerable<int[]> Elements()
    {
        IEnumerable<int[]> elements = [[.. Enumerable.Range(0, states)]];
        for (int i = 0; i < generators.Count; i++)
        {
            int index = i;
            elements = [.. elements.SelectMany(e => Enumerable.Range(0, orders[index]).Select(n => Compose(Power(generators[index], n), e)))];
        }
        return elements;
    }

    private static int[] Compose(int[] first, int[] second) => [.. second.Select(s => first[s])];

    private static int[] Power(int[] permutation, int exponent)
    {
        int[] result = [.. Enumerable.Range(0, permutation.Length)];
        for (int i = 0; i < exponent; i++)
            result = Compose(permutation, result);
        return result;
    }
}
