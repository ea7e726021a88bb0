using System.Collections.Immutable;
using System.Globalization;
using System.Numerics;
using TensorRG.Models.Lattices;

namespace TensorRG.Models.Tests.Lattices;

/// <summary>Systems by name, for tests.</summary>
internal static class Systems
{
    public static readonly double[] Spins = [1, -1];

    /// <summary>A system of sites with real tables f(i, j) and the observables "energy" (the given terms) and "m" (label values).</summary>
    public static LatticeSystem OfSites(LatticeKind lattice, IReadOnlyList<string> labels, double[] values, params (Cluster Cluster, Func<int[], double> Log)[] terms)
    {
        int q = labels.Count;
        ImmutableArray<ClusterTable> tables = [.. terms.Select(t => Table(t.Cluster, q, s => t.Log(s)))];
        return new LatticeSystem
        {
            Lattice = lattice,
            StateLabels = [.. labels],
            LogMeasure = [.. new double[q]],
            LogWeights = tables,
            Observables =
            [
                new("energy", "sum of the finite terms", "none", [.. tables.Select(static t => t with { Values = [.. t.Values.Select(static v => double.IsInfinity(v.Real) ? 0 : -v)] })]),
                new("m", "magnetisation", "none", [Table(Cluster.Site, q, s => values[s[0]])]) { IsOrderParameter = true },
                new("staggered", "staggered magnetisation", "none", [Table(Cluster.Site, q, s => values[s[0]])]) { IsStaggered = true },
            ],
        };
    }

    /// <summary>A spin model with couplings (in units of T) on clusters: the product of the spins.</summary>
    public static LatticeSystem Ising(LatticeKind lattice, params (Cluster Cluster, double K)[] couplings)
        => OfSites(lattice, ["1", "-1"], Spins, [.. couplings.Select(c => (c.Cluster, (Func<int[], double>)(s => c.K * s.Aggregate(1.0, static (p, x) => p * Spins[x]))))]);

    /// <summary>A q-state system with pair weights f(s, s') on the given bonds.</summary>
    public static LatticeSystem Pairs(LatticeKind lattice, int q, Func<int, int, double> log, params Cluster[] bonds)
        => OfSites(lattice, Labels(q), [.. Enumerable.Range(0, q).Select(static s => s == 0 ? 1.0 : 0.3 * s)], [.. bonds.Select(b => (b, (Func<int[], double>)(s => log(s[0], s[1]))))]);

    /// <summary>Vertex weights of variables on edges.</summary>
    public static LatticeSystem Edges(LatticeKind lattice, int q, Func<int[], double> weight)
        => new()
        {
            Lattice = lattice,
            OnEdges = true,
            StateLabels = [.. Labels(q)],
            LogMeasure = [.. new double[q]],
            LogWeights = [Table(Cluster.Vertex, q, s => Math.Log(weight(s)), lattice == LatticeKind.Honeycomb ? 3 : 4)],
            Observables = [new("sum", "states of the edges of a vertex", "none", [Table(Cluster.Vertex, q, static s => s[0] + (0.3 * s[1]) - (0.1 * s[2]), lattice == LatticeKind.Honeycomb ? 3 : 4)])],
        };

    public static string[] Labels(int q) => [.. Enumerable.Range(0, q).Select(static s => s.ToString(CultureInfo.InvariantCulture))];

    public static ClusterTable Table(Cluster cluster, int q, Func<int[], Complex> value, int arity = 0)
    {
        int n = arity > 0 ? arity : Arity(cluster);
        int count = (int)Math.Pow(q, n);
        return new ClusterTable(cluster, [.. Enumerable.Range(0, count).Select(k => value(Digits(k, q, n)))]);
    }

    public static int Arity(Cluster cluster) => cluster switch
    {
        Cluster.Site => 1,
        Cluster.UpTriangle or Cluster.DownTriangle => 3,
        Cluster.Face or Cluster.Vertex => 4,
        _ => 2,
    };

    private static int[] Digits(int number, int q, int n)
    {
        var digits = new int[n];
        for (int i = n - 1; i >= 0; i--, number /= q)
            digits[i] = number % q;
        return digits;
    }
}
