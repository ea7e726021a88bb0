using System.Collections.Immutable;
using System.Numerics;
using TensorRG.Models.Lattices;

namespace TensorRG.Models.Tests.Lattices;

/// <summary>A random system: lattice, terms, excluded configurations, complex weights, fields; in some the cyclic shift or the mirror image of the states is a symmetry.</summary>
internal sealed class RandomSystem
{
    private readonly Random random;
    private readonly int states;
    private readonly int[][] symmetry;

    public RandomSystem(int seed)
    {
        // The seed says everything: the message of a failure names it.
#pragma warning disable CA5394 // Random numbers for tests need no secrecy.
        random = new Random(seed);
        var lattice = (LatticeKind)random.Next(4);
        bool onEdges = lattice is LatticeKind.Square or LatticeKind.Honeycomb && random.Next(4) == 0;
        states = lattice == LatticeKind.Kagome || onEdges ? random.Next(2, 4) : random.Next(2, 5);
        symmetry = Symmetry(random.Next(4));
        bool complex = random.Next(4) == 0, excludes = random.Next(4) == 0, staggered = random.Next(5) == 0 && states == 2;
        Cluster[] clusters = Clusters(lattice, onEdges);
        Cluster[] used = random.Next(2) == 0 ? clusters : [.. clusters.Where(static c => c is Cluster.Site or Cluster.Bond1 or Cluster.Bond2 or Cluster.Vertex)];
        ImmutableArray<ClusterTable> weights = [.. used.Where(_ => random.Next(5) > 0).Select(c => Table(c, Arity(c, lattice), complex, excludes))];
        System = new LatticeSystem
        {
            Lattice = lattice,
            OnEdges = onEdges,
            StateLabels = [.. Systems.Labels(states)],
            LogMeasure = [.. Table(Cluster.Site, 1, false, false).Values.Select(static v => v.Real)],
            LogWeights = weights,
            Observables =
            [
                new("first", "random", "none", [Table(used[^1], Arity(used[^1], lattice), false, false)]),
                new("second", "random", "none", [Table(used[0], Arity(used[0], lattice), false, false)]) { IsStaggered = staggered },
            ],
        };
        Options = new NetworkOptions
        {
            Observables = ["first", "second"],
            Fields = random.Next(3) == 0 ? [("second", 0.4)] : [],
        };
    }

    public LatticeSystem System { get; }

    public NetworkOptions Options { get; }

    /// <summary>The network, or null where the form does not fit the terms or no configuration is allowed.</summary>
    public ModelNetwork? Build(NetworkForm form, bool graded)
    {
        try
        {
            return NetworkBuilder.Build(System, Options with { Form = form, Graded = graded });
        }
        catch (ModelException e) when (form != NetworkForm.Auto || e.Message.Contains("excluded", StringComparison.Ordinal) || e.Message.Contains("vanish", StringComparison.Ordinal))
        {
            return null;
        }
    }

    private static Cluster[] Clusters(LatticeKind lattice, bool onEdges)
    {
        if (onEdges)
            return [Cluster.Vertex];
        return lattice switch
        {
            LatticeKind.Square => [Cluster.Site, Cluster.Bond1, Cluster.Bond2, Cluster.Diagonal, Cluster.Antidiagonal, Cluster.Face],
            LatticeKind.Honeycomb => [Cluster.Site, Cluster.Bond1, Cluster.Bond2, Cluster.Bond3],
            _ => [Cluster.Site, Cluster.Bond1, Cluster.Bond2, Cluster.Bond3, Cluster.UpTriangle, Cluster.DownTriangle],
        };
    }

    private static int Arity(Cluster cluster, LatticeKind lattice)
        => cluster == Cluster.Vertex && lattice == LatticeKind.Honeycomb ? 3 : Systems.Arity(cluster);

    private int[][] Symmetry(int kind)
    {
        int q = states;
        int[] same = [.. Enumerable.Range(0, q)];
        int[][] shifts = [.. same.Select(n => same.Select(s => (s + n) % q).ToArray())];
        int[] mirror = [.. same.Select(s => q - 1 - s)];
        return kind switch
        {
            0 => [same],
            1 => [same, mirror],
            2 => shifts,
            _ => [.. shifts, .. shifts.Select(p => p.Select(s => q - 1 - s).ToArray())],
        };
    }

    // Every orbit of configurations gets one random value.
    private ClusterTable Table(Cluster cluster, int arity, bool complex, bool excludes)
    {
        var drawn = new Dictionary<string, Complex>();
        return Systems.Table(cluster, states, s =>
        {
            string orbit = symmetry.Select(p => string.Concat(s.Select(x => (char)('a' + p[x])))).Min(StringComparer.Ordinal)!;
            if (!drawn.TryGetValue(orbit, out Complex value))
                drawn.Add(orbit, value = Draw(complex, excludes));
            return value;
        }, arity);
    }

    private Complex Draw(bool complex, bool excludes)
    {
        double imaginary = complex ? random.NextDouble() * 2 : 0;
        return new Complex(excludes && random.Next(6) == 0 ? double.NegativeInfinity : (2 * random.NextDouble()) - 1, imaginary);
    }
#pragma warning restore CA5394
}
