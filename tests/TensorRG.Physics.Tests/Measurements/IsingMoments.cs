using TensorRG.CoarseGraining;
using TensorRG.CoarseGraining.Moments;
using TensorRG.Models;
using TensorRG.Models.Solutions;
using TensorRG.Tensors;
using TensorRG.Tensors.Decompositions;
using TensorRG.Tensors.Kernels;

namespace TensorRG.Physics.Tests.Measurements;

/// <summary>Moments of the magnetisation (observable 0) and the energy (observable 1) of the square Ising model, from the catalogue's network.</summary>
internal static class IsingMoments
{
    /// <summary>The records of one flow.</summary>
    public static IReadOnlyList<MomentRecord> Run(double temperature, int bondDimension, int steps)
    {
        Model ising = ModelCatalogue.Find("ising");
        InitialNetwork<double> network = NetworkTensors.Build<double>(ising.Network(ising.CreateParameters([KeyValuePair.Create("temperature", temperature)])));
        double t = Math.Tanh(1 / temperature);
        Tensor<double>[] spin = [.. Enumerable.Range(1, 4).Select(n => Vertex(network.Site.Legs, n % 2, (u, l, d, r) => Root(t, u) * Root(t, l) * Root(t, d) * Root(t, r)))];
        Tensor<double>[] energy = [.. Enumerable.Range(1, 2).Select(n => Vertex(network.Site.Legs, 0, (u, l, d, r) => Root(t, u) * Root(t, l) * Energy(t, d, r, n)))];
        var flow = new MomentFlow<double>(new TensorAlgebra<double>(Backends.Create(Backends.Default, 2)), new CutRule(bondDimension), network, [spin, energy]);
        while (flow.Step < steps)
            flow.Advance();
        return flow.Records;
    }

    /// <summary>Mean and variance of the energy per site: first and second derivative of ln Z per site by 1/T, by central differences of B. Kaufman's sum.</summary>
    public static (double Mean, double Variance) Exact(int columns, int rows, double temperature)
    {
        double h = 1e-3, b = 1 / temperature;
        double Value(int k) => Kaufman.LogZPerSite(columns, rows, 1 / (b + (k * h)));
        double first = ((8 * (Value(1) - Value(-1))) - (Value(2) - Value(-2))) / (12 * h);
        double second = ((16 * (Value(1) + Value(-1))) - (Value(2) + Value(-2)) - (30 * Value(0))) / (12 * h * h);
        return (-first, second);
    }

    /// <summary>In units of the even eigenvalue of a bond's weight, s s' exchanges 1 and t: powers of -(s s_right + s s_below) on the two legs, over the roots at the far ends.</summary>
    private static double Energy(double t, int d, int r, int power)
    {
        double down = Bond(t, d, 1) / Root(t, d), right = Bond(t, r, 1) / Root(t, r);
        return power == 1 ? -((down * Root(t, r)) + (Root(t, d) * right)) : 2 * ((Root(t, d) * Root(t, r)) + (down * right));
    }

    private static double Root(double t, int state) => Math.Sqrt(Bond(t, state, 0));

    private static double Bond(double t, int state, int power) => (state + power) % 2 == 0 ? 1 : t;

    private static Tensor<double> Vertex(IReadOnlyList<Leg> legs, int parity, Func<int, int, int, int, double> element)
        => Tensor<double>.FromFunction(legs, p => element(p.Span[0], p.Span[1], p.Span[2], p.Span[3]), new Charge(parity));
}
