using System.Numerics;

namespace TensorRG.Models.Lattices.Forms;

/// <summary>What is asked of a system, summed up by cluster: the weights, the weights that alternate in sign, and the observables.</summary>
internal sealed class VertexTerms
{
    private readonly bool _inBlocks;

    /// <summary>Sums up the terms.</summary>
    /// <exception cref="ModelException">A name is unknown, a table has the wrong size, or a number is not allowed.</exception>
    public VertexTerms(LatticeSystem system, NetworkOptions options)
    {
        System = system;
        Check(system);
        foreach (ClusterTable table in system.LogWeights)
            Weights.Add(table.Cluster, table.Values, 1);
        Complex[] measure = [.. system.LogMeasure.Select(static m => new Complex(m, 0))];
        if (measure.Any(static m => m.Real != 0))
            Weights.Add(Cluster.Site, measure, 1);
        foreach ((string name, double strength) in options.Fields)
            AddField(Find(name), strength);
        Observables = [.. options.Observables.Select(Find)];
        _inBlocks = options.InBlocks;
        IsReal = Weights.All.Concat(Alternating.All).All(static t => t.All(IsRealLog));
    }

    /// <summary>The system.</summary>
    public LatticeSystem System { get; }

    /// <summary>Logarithms of the weights.</summary>
    public TermTables Weights { get; } = new();

    /// <summary>Logarithms of the weights that carry the alternating sign.</summary>
    public TermTables Alternating { get; } = new();

    /// <summary>Observables that need an impurity.</summary>
    public LocalObservable[] Observables { get; }

    /// <summary>True if every weight is real.</summary>
    public bool IsReal { get; }

    /// <summary>True if a vertex must stand for a block of 2 x 2 cells.</summary>
    public bool NeedsBlock => System.Lattice != LatticeKind.Honeycomb && (_inBlocks || Alternating.Clusters.Count > 0 || Observables.Any(static o => o.IsStaggered));

    /// <summary>The signs of vertices that differ in weight.</summary>
    public int[] Signs => System.Lattice != LatticeKind.Honeycomb && Alternating.Clusters.Count > 0 ? [1, -1] : [1];

    /// <summary>All clusters that the form must hold.</summary>
    public IReadOnlyCollection<Cluster> Used
        => [.. Weights.Clusters.Concat(Alternating.Clusters).Concat(Observables.SelectMany(static o => o.Terms.Select(static t => t.Cluster))).Distinct().Order()];

    /// <summary>True if exp of it is real: the imaginary part is a multiple of pi.</summary>
    private static bool IsRealLog(Complex log)
    {
        if (log.Imaginary == 0 || double.IsNegativeInfinity(log.Real))
            return true;
        double turns = log.Imaginary / Math.PI;
        return Math.Abs(turns - Math.Round(turns)) <= 1e-15 * Math.Max(1, Math.Abs(turns));
    }

    private static void Check(LatticeSystem system)
    {
        if (system.States < 1 || system.LogMeasure.Length != system.States)
            throw new ModelException($"The measure has {system.LogMeasure.Length} values for {system.States} states; give one for each state.");
        foreach (ClusterTable table in system.LogWeights.Concat(system.Observables.SelectMany(static o => o.Terms)))
        {
            if (system.OnEdges != (table.Cluster == Cluster.Vertex))
                throw new ModelException("Variables on edges go with terms on Vertex alone, variables on sites with any others; move the term or the variables.");
            if (table.Values.Length != (long)Math.Pow(system.States, Arity(system, table.Cluster)))
                throw new ModelException($"A table on {table.Cluster} has {table.Values.Length} values; give one for each configuration of its variables.");
        }
        if (system.LogWeights.Any(static t => t.Values.Any(static v => double.IsNaN(v.Real) || double.IsPositiveInfinity(v.Real) || !double.IsFinite(v.Imaginary))))
            throw new ModelException("A logarithm of a weight is infinite or not a number; only minus infinity, an excluded configuration, is allowed.");
    }

    private static int Arity(LatticeSystem system, Cluster cluster) => cluster switch
    {
        Cluster.Site => 1,
        Cluster.UpTriangle or Cluster.DownTriangle => 3,
        Cluster.Face => 4,
        Cluster.Vertex => system.Lattice == LatticeKind.Honeycomb ? 3 : 4,
        _ => 2,
    };

    private void AddField(LocalObservable observable, double strength)
    {
        if (!double.IsFinite(strength))
            throw new ModelException($"The field on '{observable.Name}' is not a finite number; give one.");
        if (strength != 0)
            (observable.IsStaggered ? Alternating : Weights).Add(observable, strength);
    }

    private LocalObservable Find(string name)
    {
        LocalObservable found = System.Observables.FirstOrDefault(o => o.Name == name)
            ?? throw new ModelException($"There is no observable '{name}'; there are: {string.Join(", ", System.Observables.Select(static o => o.Name))}.");
        bool pairs = found.IsStaggered && System.Lattice == LatticeKind.Honeycomb && found.Terms.Any(static t => t.Cluster is not (Cluster.Site or Cluster.Vertex));
        if (pairs)
            throw new ModelException($"On the honeycomb lattice only terms on single sites alternate in sign; '{name}' has others.");
        return found;
    }
}
