using System.Collections.Immutable;
using System.Numerics;
using TensorRG.Models.Files.Expressions;
using TensorRG.Models.Lattices;

namespace TensorRG.Models.Files;

/// <summary>Fills the tables of a model file at given parameters.</summary>
internal sealed class SystemBuilder
{
    private static readonly Complex Excluded = new(double.NegativeInfinity, 0);

    private readonly ModelContent content;
    private readonly Workspace work;
    private readonly StateSpace space;
    private readonly TableFiller filler;
    private readonly double temperature;
    private readonly SortedDictionary<Cluster, ClusterWeights> weights = [];

    private SystemBuilder(ModelContent content, ParameterSet parameters)
    {
        this.content = content;
        work = new(content.Globals, parameters, 4 * content.Variables.Length);
        space = StateSpace.Of(content.Variables, work);
        filler = new(work.Slots, content.Globals.Count, space.Values, content.Variables.Length);
        temperature = content.Globals.HasTemperature ? parameters.Temperature : 1;
    }

    /// <summary>The tables.</summary>
    /// <param name="content">The model file.</param>
    /// <param name="parameters">The parameters.</param>
    /// <exception cref="ModelFileException">An expression has no value, the tables do not fit memory, or no configuration is left.</exception>
    public static LatticeSystem Build(ModelContent content, ParameterSet parameters) => new SystemBuilder(content, parameters).Build();

    private LatticeSystem Build()
    {
        foreach (ClusterKey key in Terms().Select(t => t.Key).Concat(content.Rows is null ? [] : [ClusterKey.Vertex(content.Lattice)]))
        {
            foreach (Cluster cluster in key.Clusters.Where(c => !weights.ContainsKey(c)))
                weights.Add(cluster, Weights(cluster, key));
        }
        return new()
        {
            Lattice = content.Lattice,
            OnEdges = content.OnEdges,
            StateLabels = space.Labels,
            LogMeasure = space.LogMeasure,
            LogWeights = [.. weights.Select(w => new ClusterTable(w.Key, [.. w.Value.Log]))],
            Observables = [.. Energy(), .. content.Observables.Select(Observable), LogWeight()],
        };
    }

    private IEnumerable<LocalTerm> Terms() => content.Require.Concat(content.Weight).Concat(content.Energy);

    private ClusterWeights Weights(Cluster cluster, ClusterKey key)
    {
        Expression[] require = On(content.Require, cluster), weight = On(content.Weight, cluster), energy = On(content.Energy, cluster);
        VertexWeights? rows = content.Rows is null ? null : VertexWeights.Of(content.Rows.Value, work, space);
        Complex[] log = NewTable(key, Spot(cluster));
        Complex[]? energies = energy.Length > 0 ? new Complex[log.Length] : null;
        Complex[] slots = work.Slots;
        filler.Each(key.Legs.Length, n =>
        {
            Complex w = rows is null ? 1 : rows.At(n);
            log[n] = Array.TrueForAll(require, r => r.Truth(slots)) ? LogProduct(w, weight) : Excluded;
            if (energies is null || double.IsNegativeInfinity(log[n].Real))
                return;
            energies[n] = Sum(energy, slots);
            log[n] -= energies[n] / temperature;
        });
        return Checked(cluster, log, energies);
    }

    private ClusterWeights Checked(Cluster cluster, Complex[] log, Complex[]? energies) => Array.TrueForAll(log, z => double.IsNegativeInfinity(z.Real))
        ? throw Spot(cluster).Error(0, $"Every configuration of a {(cluster == Cluster.Site ? "site" : "cluster")} is excluded here: all weights are zero, so there is nothing to sum. Loosen the constraints or correct the weights.")
        : new(log, energies);

    private Complex[] NewTable(ClusterKey key, TextSpot spot)
    {
        double entries = Math.Pow(space.Labels.Length, key.Legs.Length);
        return entries <= Limits.TableEntries
            ? new Complex[(int)entries]
            : throw spot.Error(0, FormattableString.Invariant($"A term on '{key.Name}' needs {space.Labels.Length}^{key.Legs.Length} = {entries:G6} entries, but at most {Limits.TableEntries} fit. Use fewer states."));
    }

    // Logarithms add up, so that products of small factors do not underflow; the phase stays in (-pi, pi].
    private Complex LogProduct(Complex weight, Expression[] factors)
    {
        Complex sum = Complex.Zero;
        for (int f = -1; f < factors.Length; f++)
        {
            Complex w = f < 0 ? weight : factors[f].Number(work.Slots);
            if (w == 0)
                return Excluded;
            sum += ComplexMath.Log(w);
        }
        return new(sum.Real, sum.Imaginary > Math.PI || sum.Imaginary <= -Math.PI ? Math.IEEERemainder(sum.Imaginary, 2 * Math.PI) : sum.Imaginary);
    }

    private static Complex Sum(Expression[] terms, Complex[] slots)
    {
        Complex sum = terms[0].Number(slots);
        for (int i = 1; i < terms.Length; i++)
            sum += terms[i].Number(slots);
        return sum;
    }

    private Expression[] On(ImmutableArray<LocalTerm> terms, Cluster cluster)
    {
        Expression[] found = [.. terms.Where(t => t.Key.Clusters.Contains(cluster)).Select(t => t.Value)];
        foreach (Expression expression in found)
            work.Prepare(expression);
        return found;
    }

    private TextSpot Spot(Cluster cluster) => Terms().FirstOrDefault(t => t.Key.Clusters.Contains(cluster))?.Value.Spot
        ?? new(content.Root.Source, content.Root.Find("vertex")!.Value.Find("table")!.Start, true);

    private LocalObservable[] Energy()
    {
        ImmutableArray<ClusterTable> tables = [.. weights.Where(w => w.Value.Energy is not null).Select(w => new ClusterTable(w.Key, [.. w.Value.Energy!]))];
        return tables.Length == 0 ? [] : [new("energy", "Mean energy per site", "energy", tables)];
    }

    // Excluded configurations do not occur, so their logarithm counts as zero.
    private LocalObservable LogWeight()
    {
        ImmutableArray<ClusterTable> tables = [.. weights.Select(w => new ClusterTable(w.Key, [.. w.Value.Log.Select(z => double.IsNegativeInfinity(z.Real) ? Complex.Zero : z)]))];
        if (tables.Length == 0)
            tables = [new(Cluster.Site, [.. new Complex[space.Labels.Length]])];
        return new(ObservableReader.LogWeight, "Logarithm of the weight per site", "none", tables);
    }

    private LocalObservable Observable(FileObservable observable)
    {
        IEnumerable<Cluster> clusters = observable.Terms.SelectMany(t => t.Key.Clusters).Distinct().Order();
        return new(observable.Name, observable.Meaning, observable.Unit, [.. clusters.Select(c => new ClusterTable(c, [.. Values(observable, c)]))])
        {
            IsStaggered = observable.IsStaggered,
            IsOrderParameter = observable.IsOrder,
        };
    }

    private Complex[] Values(FileObservable observable, Cluster cluster)
    {
        ClusterKey key = observable.Terms.First(t => t.Key.Clusters.Contains(cluster)).Key;
        Expression[] terms = On(observable.Terms, cluster);
        Complex[] table = NewTable(key, terms[0].Spot);
        Complex[]? log = weights.GetValueOrDefault(cluster)?.Log;
        filler.Each(key.Legs.Length, n => table[n] = log is not null && double.IsNegativeInfinity(log[n].Real) ? Complex.Zero : Sum(terms, work.Slots));
        return table;
    }
}
