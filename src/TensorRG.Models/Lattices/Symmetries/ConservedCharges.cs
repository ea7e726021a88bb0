using System.Collections.Immutable;
using System.Numerics;

namespace TensorRG.Models.Lattices.Symmetries;

/// <summary>
/// Charges x_v, x_h of the states of the legs with x_v(u) + x_h(l) = x_v(d) + x_h(r) wherever the tensor does not vanish: all of them, by
/// integer linear algebra. The first state of each bond that occurs has charge zero, since a constant shift says nothing.
/// </summary>
/// <param name="Orders">Order of each factor, 0 for U(1).</param>
/// <param name="Vertical">Charges of the states of u and d.</param>
/// <param name="Horizontal">Charges of the states of l and r.</param>
internal sealed record ConservedCharges(ImmutableArray<int> Orders, int[][] Vertical, int[][] Horizontal)
{
    private const int MaxFactors = 4;

    /// <summary>Finds them from the legs of all elements that do not vanish.</summary>
    public static ConservedCharges Find(int vertical, int horizontal, IEnumerable<(int U, int L, int D, int R)> pattern)
    {
        int size = vertical + horizontal;
        var quotient = new IntegerQuotient(size);
        var occurs = new bool[size];
        foreach ((int u, int l, int d, int r) in pattern)
        {
            var row = new int[size];
            row[u]++;
            row[vertical + l]++;
            row[d]--;
            row[vertical + r]--;
            quotient.Add(row);
            occurs[u] = occurs[vertical + l] = occurs[d] = occurs[vertical + r] = true;
        }
        foreach (int i in Enumerable.Range(0, size).Where(i => !occurs[i]).Append(Array.IndexOf(occurs, true)).Append(Array.IndexOf(occurs, true, vertical)))
        {
            if (i < 0)
                continue;
            var row = new int[size];
            row[i] = 1;
            quotient.Add(row);
        }
        return Charges(quotient.Factors(), vertical, size);
    }

    private static ConservedCharges Charges(List<(BigInteger Order, BigInteger[] Charges)> factors, int vertical, int size)
    {
        var orders = new List<int>();
        var kept = new List<int[]>();
        foreach ((BigInteger order, BigInteger[] charges) in factors)
        {
            if (kept.Count < MaxFactors && order < 1 << 20)
                Keep((int)order, charges);
        }
        int[][] all = [.. Enumerable.Range(0, size).Select(i => kept.Select(k => k[i]).ToArray())];
        return new ConservedCharges([.. orders], all[..vertical], all[vertical..]);

        void Keep(int order, BigInteger[] charges)
        {
            BigInteger[] reduced = order == 0 ? charges : [.. charges.Select(c => ((c % order) + order) % order)];
            if (reduced.Any(static c => BigInteger.Abs(c) > 1 << 20))
                return;
            int sign = order == 0 && reduced.First(static c => !c.IsZero) < 0 ? -1 : 1;
            orders.Add(order);
            kept.Add([.. reduced.Select(c => sign * (int)c)]);
        }
    }
}
