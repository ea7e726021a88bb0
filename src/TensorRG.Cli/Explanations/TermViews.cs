using System.Collections.Immutable;
using System.Numerics;
using TensorRG.Models.Lattices;

namespace TensorRG.Cli.Explanations;

/// <summary>The tables of a model as a person reads them: energies where there are any, weights elsewhere; equal ones once.</summary>
internal static class TermViews
{
    // Logarithms of weights and energies are sums of the same terms in another order.
    private const double RoundOff = 1e-12;

    public static ImmutableArray<TermView> Of(LatticeSystem system, double temperature)
    {
        LocalObservable? energy = system.Observables.FirstOrDefault(static o => o.Name == "energy");
        var tables = new List<(Cluster Cluster, TermKind Kind, ImmutableArray<Complex?> Values)>();
        foreach (ClusterTable log in system.LogWeights)
        {
            ClusterTable? own = energy?.Terms.FirstOrDefault(t => t.Cluster == log.Cluster);
            if (own is null)
            {
                tables.Add((log.Cluster, TermKind.Weight, [.. log.Values.Select(static z => IsExcluded(z) ? (Complex?)null : Exp(z))]));
                continue;
            }

            tables.Add((log.Cluster, TermKind.Energy, [.. own.Values.Zip(log.Values, static (e, z) => IsExcluded(z) ? (Complex?)null : e)]));
            ImmutableArray<Complex?> factors = [.. own.Values.Zip(log.Values, (e, z) => IsExcluded(z) ? null : Factor(z, e / temperature))];
            if (factors.Any(static f => f is { } x && x != 1))
                tables.Add((log.Cluster, TermKind.Factor, factors));
        }

        return [.. tables.GroupBy(static t => t, new SameTable()).Select(g => View(system, [.. g.Select(static t => t.Cluster)], g.Key.Kind, g.Key.Values))];
    }

    private static TermView View(LatticeSystem system, Cluster[] clusters, TermKind kind, ImmutableArray<Complex?> values)
        => new(ClusterWords.Of(system.Lattice, clusters), kind, ClusterWords.Places(system.Lattice, clusters[0]), values);

    private static bool IsExcluded(Complex log) => double.IsNegativeInfinity(log.Real);

    private static Complex? Factor(Complex log, Complex reduced)
        => Complex.Abs(log + reduced) <= RoundOff * Math.Max(1, Complex.Abs(reduced)) ? 1 : Exp(log + reduced);

    // exp of a logarithm that is right to the last digits; the imaginary part of a real weight is round-off.
    private static Complex Exp(Complex log)
    {
        Complex value = Complex.Exp(log);
        return Math.Abs(value.Imaginary) <= RoundOff * Math.Abs(value.Real) ? value.Real : value;
    }

    private sealed class SameTable : IEqualityComparer<(Cluster Cluster, TermKind Kind, ImmutableArray<Complex?> Values)>
    {
        public bool Equals((Cluster Cluster, TermKind Kind, ImmutableArray<Complex?> Values) x, (Cluster Cluster, TermKind Kind, ImmutableArray<Complex?> Values) y)
            => x.Kind == y.Kind && (x.Cluster == Cluster.Site) == (y.Cluster == Cluster.Site) && x.Values.AsSpan().SequenceEqual(y.Values.AsSpan());

        public int GetHashCode((Cluster Cluster, TermKind Kind, ImmutableArray<Complex?> Values) table) => HashCode.Combine(table.Kind, table.Values.Length);
    }
}
