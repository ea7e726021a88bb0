using System.Numerics;
using TensorRG.Models.Lattices;
using TensorRG.Tensors;

namespace TensorRG.Models.Tests.Lattices;

/// <summary>
/// Sums over all configurations of a torus of cells, from the tables and the positions in <see cref="Cluster"/> alone. Weights are divided by
/// exp(LogScale) with LogScale an upper bound of the largest.
/// </summary>
internal sealed class TorusOracle
{
    private readonly LatticeSystem system;
    private readonly NetworkOptions options;
    private readonly int lx;
    private readonly int ly;
    private readonly int variables;

    public TorusOracle(LatticeSystem system, NetworkOptions options, int lx, int ly)
    {
        this.system = system;
        this.options = options;
        this.lx = lx;
        this.ly = ly;
        PerCell = system.OnEdges ? (system.Lattice == LatticeKind.Honeycomb ? 3 : 2) : system.SitesPerCell;
        variables = PerCell * lx * ly;
        Sum();
    }

    public double Configurations => Math.Pow(system.States, variables);

    public double LogScale { get; private set; }

    /// <summary>Z / exp(LogScale).</summary>
    public Complex Z { get; private set; }

    /// <summary>The sum of the absolute values of the weights, likewise.</summary>
    public double Scale { get; private set; }

    /// <summary>Sum over configurations of weight times O^n, n = 1 and 2, for each observable.</summary>
    public (Complex First, Complex Second)[] Moments { get; private set; } = [];

    /// <summary>The same with absolute values.</summary>
    public (double First, double Second)[] MomentScales { get; private set; } = [];

    private int PerCell { get; }

    private void Sum()
    {
        var weight = new Terms(this);
        foreach (ClusterTable table in system.LogWeights)
            weight.Add(table, 1, false);
        foreach ((string name, double strength) in options.Fields)
            weight.Add(system.Observables.Single(o => o.Name == name), strength);
        Terms[] observables = [.. options.Observables.Select(name =>
        {
            var terms = new Terms(this);
            terms.Add(system.Observables.Single(o => o.Name == name), 1);
            return terms;
        })];
        var states = new int[variables];
        int count = (int)Configurations;
        LogScale = double.NegativeInfinity;
        for (int k = 0; k < count; k++)
            LogScale = Math.Max(LogScale, LogWeight(weight, k, states).Real);
        Accumulate(weight, observables, count, states);
    }

    private void Accumulate(Terms weight, Terms[] observables, int count, int[] states)
    {
        var z = new ComplexSum();
        ComplexSum[] first = [.. observables.Select(static _ => new ComplexSum())], second = [.. observables.Select(static _ => new ComplexSum())];
        var scales = new (double First, double Second)[observables.Length];
        for (int k = 0; k < count; k++)
        {
            Complex log = LogWeight(weight, k, states);
            if (double.IsNegativeInfinity(log.Real))
                continue;
            double size = Math.Exp(log.Real - LogScale);
            var w = new Complex(size * Math.Cos(log.Imaginary), size * Math.Sin(log.Imaginary));
            z.Add(w);
            Scale += size;
            for (int i = 0; i < observables.Length; i++)
            {
                Complex o = observables[i].At(states);
                first[i].Add(w * o);
                second[i].Add(w * o * o);
                double bound = observables[i].Bound(states);
                scales[i] = (scales[i].First + (size * bound), scales[i].Second + (size * bound * bound));
            }
        }
        Z = z.Value;
        Moments = [.. first.Zip(second, static (a, b) => (a.Value, b.Value))];
        MomentScales = scales;
    }

    private Complex LogWeight(Terms weight, int number, int[] states)
    {
        double measure = 0;
        for (int i = 0; i < variables; i++, number /= system.States)
        {
            states[i] = number % system.States;
            measure += system.LogMeasure[states[i]];
        }
        return weight.At(states) + measure;
    }

    private int Site(int x, int y, int kind) => ((((((y % ly) + ly) % ly) * lx) + (((x % lx) + lx) % lx)) * PerCell) + kind;

    /// <summary>The clusters of a kind that belong to cell (x, y), and the sign of a staggered term there.</summary>
    private IEnumerable<(int[] Sites, int Sign)> Clusters(Cluster cluster, int x, int y)
    {
        int sign = (x + y) % 2 == 0 ? 1 : -1;
        int[][] sites = system.OnEdges ? Edges(x, y) : system.Lattice switch
        {
            LatticeKind.Square => [Square(cluster, x, y)],
            LatticeKind.Triangular => [Triangular(cluster, x, y)],
            LatticeKind.Honeycomb => Honeycomb(cluster, x, y),
            _ => Kagome(cluster, x, y),
        };
        return sites.Select((s, i) => (s, system.Lattice == LatticeKind.Honeycomb ? (i == 0 ? 1 : -1) : sign));
    }

    // Edge 0 of a square cell leaves (x, y) to the right, edge 1 downward. Honeycomb: edge j of a cell is the bond in direction j + 1 named by it.
    private int[][] Edges(int x, int y) => system.Lattice == LatticeKind.Square
        ? [[Site(x, y - 1, 1), Site(x - 1, y, 0), Site(x, y, 1), Site(x, y, 0)]]
        : [[Site(x, y, 0), Site(x - 1, y, 1), Site(x, y - 1, 2)], [Site(x, y, 0), Site(x, y, 1), Site(x, y, 2)]];

    private int[] Square(Cluster cluster, int x, int y) => cluster switch
    {
        Cluster.Site => [Site(x, y, 0)],
        Cluster.Bond1 => [Site(x, y, 0), Site(x + 1, y, 0)],
        Cluster.Bond2 => [Site(x, y, 0), Site(x, y + 1, 0)],
        Cluster.Diagonal => [Site(x, y, 0), Site(x + 1, y + 1, 0)],
        Cluster.Antidiagonal => [Site(x + 1, y, 0), Site(x, y + 1, 0)],
        Cluster.Face => [Site(x, y, 0), Site(x + 1, y, 0), Site(x + 1, y + 1, 0), Site(x, y + 1, 0)],
        _ => throw new ArgumentOutOfRangeException(nameof(cluster)),
    };

    private int[] Triangular(Cluster cluster, int x, int y) => cluster switch
    {
        Cluster.Site => [Site(x, y, 0)],
        Cluster.Bond1 => [Site(x, y, 0), Site(x + 1, y, 0)],
        Cluster.Bond2 => [Site(x, y, 0), Site(x, y + 1, 0)],
        Cluster.Bond3 => [Site(x, y, 0), Site(x + 1, y + 1, 0)],
        Cluster.UpTriangle => [Site(x, y, 0), Site(x, y + 1, 0), Site(x + 1, y + 1, 0)],
        Cluster.DownTriangle => [Site(x, y, 0), Site(x + 1, y, 0), Site(x + 1, y + 1, 0)],
        _ => throw new ArgumentOutOfRangeException(nameof(cluster)),
    };

    private int[][] Honeycomb(Cluster cluster, int x, int y) => cluster switch
    {
        Cluster.Site => [[Site(x, y, 0)], [Site(x, y, 1)]],
        Cluster.Bond1 => [[Site(x, y, 0), Site(x, y, 1)]],
        Cluster.Bond2 => [[Site(x + 1, y, 0), Site(x, y, 1)]],
        Cluster.Bond3 => [[Site(x, y + 1, 0), Site(x, y, 1)]],
        _ => throw new ArgumentOutOfRangeException(nameof(cluster)),
    };

    private int[][] Kagome(Cluster cluster, int x, int y) => cluster switch
    {
        Cluster.Site => [[Site(x, y, 0)], [Site(x, y, 1)], [Site(x, y, 2)]],
        Cluster.Bond1 => [[Site(x, y, 0), Site(x, y, 1)], [Site(x, y, 1), Site(x + 1, y, 0)]],
        Cluster.Bond2 => [[Site(x, y, 0), Site(x, y, 2)], [Site(x, y, 2), Site(x, y + 1, 0)]],
        Cluster.Bond3 => [[Site(x, y, 1), Site(x, y, 2)], [Site(x - 1, y, 1), Site(x, y - 1, 2)]],
        Cluster.UpTriangle => [[Site(x, y, 0), Site(x, y, 1), Site(x, y, 2)]],
        Cluster.DownTriangle => [[Site(x, y, 0), Site(x - 1, y, 1), Site(x, y - 1, 2)]],
        _ => throw new ArgumentOutOfRangeException(nameof(cluster)),
    };

    /// <summary>A sum of terms over the whole torus.</summary>
    private sealed class Terms(TorusOracle torus)
    {
        private readonly List<(Complex[] Values, int[] Sites, double Factor)> terms = [];

        public void Add(LocalObservable observable, double factor)
        {
            foreach (ClusterTable table in observable.Terms)
                Add(table, factor, observable.IsStaggered);
        }

        public void Add(ClusterTable table, double factor, bool staggered)
        {
            for (int cell = 0; cell < torus.lx * torus.ly; cell++)
            {
                foreach ((int[] sites, int sign) in torus.Clusters(table.Cluster, cell % torus.lx, cell / torus.lx))
                    terms.Add(([.. table.Values], sites, staggered ? factor * sign : factor));
            }
        }

        public Complex At(int[] states)
        {
            double real = 0, imaginary = 0;
            foreach ((Complex[] values, int[] sites, double factor) in terms)
            {
                Complex value = values[Index(sites, states)];
                real += value.Real * factor;
                imaginary += value.Imaginary * factor;
            }
            return new Complex(real, imaginary);
        }

        public double Bound(int[] states) => terms.Sum(t => Math.Abs(t.Factor) * Complex.Abs(t.Values[Index(t.Sites, states)]));

        private int Index(int[] sites, int[] states)
        {
            int index = 0;
            foreach (int site in sites)
                index = (index * torus.system.States) + states[site];
            return index;
        }
    }

    private sealed class ComplexSum
    {
        private CompensatedSum real;
        private CompensatedSum imaginary;

        public Complex Value => new(real.Value, imaginary.Value);

        public void Add(Complex term)
        {
            real.Add(term.Real);
            imaginary.Add(term.Imaginary);
        }
    }
}
