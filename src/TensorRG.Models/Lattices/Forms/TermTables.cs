using System.Collections.Immutable;
using System.Numerics;

namespace TensorRG.Models.Lattices.Forms;

/// <summary>A sum of terms, one table a cluster.</summary>
internal sealed class TermTables
{
    private readonly Dictionary<Cluster, Complex[]> tables = [];

    /// <summary>The clusters that have a table.</summary>
    public IReadOnlyCollection<Cluster> Clusters => tables.Keys;

    /// <summary>All tables.</summary>
    public IEnumerable<Complex[]> All => tables.OrderBy(static p => p.Key).Select(static p => p.Value);

    /// <summary>The table of a cluster, or null.</summary>
    public Complex[]? this[Cluster cluster] => tables.GetValueOrDefault(cluster);

    /// <summary>Adds factor times the values to the table of a cluster.</summary>
    public void Add(Cluster cluster, IReadOnlyList<Complex> values, double factor)
    {
        if (!tables.TryGetValue(cluster, out Complex[]? sum))
            tables.Add(cluster, sum = new Complex[values.Count]);
        if (sum.Length != values.Count)
            throw new ModelException($"Two tables on {cluster} have {sum.Length} and {values.Count} values; give one value for each configuration.");
        for (int i = 0; i < sum.Length; i++)
            sum[i] = new Complex(sum[i].Real + (factor * values[i].Real), sum[i].Imaginary + (factor * values[i].Imaginary));
    }

    /// <summary>Adds factor times all terms of an observable.</summary>
    public void Add(LocalObservable observable, double factor)
    {
        foreach (ClusterTable term in observable.Terms)
            Add(term.Cluster, term.Values, factor);
    }
}
