namespace TensorRG.Models.Lattices.Symmetries;

/// <summary>
/// A commutative group of permutations of the states of a variable, a product of cyclic groups, and a permutation
/// that turns each of its elements into the inverse. Together with complex conjugation the latter makes the basis of characters one in which
/// an invariant real tensor is real.
/// </summary>
/// <param name="States">Number of states.</param>
/// <param name="Generators">Generators: element s is the state that s goes to.</param>
/// <param name="Orders">Orders of the generators.</param>
/// <param name="Inverting">The inverting permutation, or null where there is none.</param>
internal sealed record StateGroup(int States, int[][] Generators, int[] Orders, int[]? Inverting)
{
    /// <summary>The group of one element.</summary>
    public static StateGroup Trivial(int states) => new(states, [], [], [.. Enumerable.Range(0, states)]);

    /// <summary>True for the group of one element.</summary>
    public bool IsTrivial => Orders.Length == 0;

    /// <summary>The same group on tuples of variables, the first one slowest.</summary>
    public StateGroup OnTuples(int length)
    {
        int count = (int)Math.Pow(States, length);
        return new(count, [.. Generators.Select(g => Tuples(g, length))], Orders, Inverting is null ? null : Tuples(Inverting, length));
    }

    /// <summary>The images of a state under all elements; the exponents of the generators run row-major.</summary>
    public IEnumerable<(int[] Exponents, int State)> Images(int state)
    {
        int count = Orders.Aggregate(1, static (a, b) => a * b);
        for (int k = 0; k < count; k++)
        {
            int[] exponents = Split(k);
            yield return (exponents, Apply(exponents, state));
        }
    }

    /// <summary>All charges: the characters of the group.</summary>
    public IEnumerable<int[]> Charges() => Enumerable.Range(0, Orders.Aggregate(1, static (a, b) => a * b)).Select(Split);

    private int Apply(int[] exponents, int state)
    {
        for (int i = 0; i < exponents.Length; i++)
        {
            for (int t = 0; t < exponents[i]; t++)
                state = Generators[i][state];
        }
        return state;
    }

    private int[] Split(int number)
    {
        var exponents = new int[Orders.Length];
        for (int i = Orders.Length - 1; i >= 0; number /= Orders[i], i--)
            exponents[i] = number % Orders[i];
        return exponents;
    }

    private static int[] Tuples(int[] permutation, int length)
    {
        int[] result = [0];
        for (int i = 0; i < length; i++)
            result = [.. result.SelectMany(t => permutation.Select(s => (t * permutation.Length) + s))];
        return result;
    }
}
