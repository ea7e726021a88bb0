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
    /// <summary>The highest power of an observable.</summary>
    public const int HighestPower = 4;

    private readonly LatticeSystem system;
    private readonly NetworkOptions options;
    private readonly int lx;
    private readonly int ly;
    private readonly TorusGeometry geometry;
    private readonly int variables;

    public TorusOracle(LatticeSystem system, NetworkOptions options, int lx, int ly)
    {
        this.system = system;
        this.options = options;
        this.lx = lx;
        this.ly = ly;
        geometry = new TorusGeometry(system.Lattice, system.OnEdges, lx, ly);
        variables = geometry.Variables;
        Sum();
    }

    public double Configurations => Math.Pow(system.States, variables);

    public double LogScale { get; private set; }

    /// <summary>Z / exp(LogScale).</summary>
    public Complex Z { get; private set; }

    /// <summary>The sum of the absolute values of the weights, likewise.</summary>
    public double Scale { get; private set; }

    /// <summary>Sum over configurations of weight times O^n, n = 0 to 4, for each observable.</summary>
    public Complex[][] Moments { get; private set; } = [];

    /// <summary>The same with absolute values.</summary>
    public double[][] MomentScales { get; private set; } = [];

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
        ComplexSum[][] sums = [.. observables.Select(static _ => Powers(static _ => new ComplexSum()))];
        double[][] scales = [.. observables.Select(static _ => Powers(static _ => 0.0))];
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
                Add(sums[i], scales[i], w, observables[i].At(states), size, observables[i].Bound(states));
        }
        Z = z.Value;
        Moments = [.. sums.Select(static s => s.Select(static x => x.Value).ToArray())];
        MomentScales = scales;
    }

    private static T[] Powers<T>(Func<int, T> value) => [.. Enumerable.Range(0, HighestPower + 1).Select(value)];

    private static void Add(ComplexSum[] sums, double[] scales, Complex weight, Complex value, double size, double bound)
    {
        for (int n = 0; n <= HighestPower; n++, weight *= value, size *= bound)
        {
            sums[n].Add(weight);
            scales[n] += size;
        }
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
                foreach ((int[] sites, int sign) in torus.geometry.Clusters(table.Cluster, cell % torus.lx, cell / torus.lx))
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
