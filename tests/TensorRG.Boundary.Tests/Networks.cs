using System.Numerics;
using TensorRG.Models;
using TensorRG.Physics;
using TensorRG.Tensors;
using TensorRG.Tensors.Kernels;

namespace TensorRG.Boundary.Tests;

/// <summary>Networks to test on, and shorthand.</summary>
internal static class Networks
{
    /// <summary>One thread's algebra.</summary>
    public static TensorAlgebra<T> Algebra<T>(int threads = 2)
        where T : unmanaged, INumberBase<T>
        => new(Backends.Create(Backends.Default, threads));

    /// <summary>A solver for one tolerance.</summary>
    public static BoundarySolver<T> Solver<T>(double tolerance, int chi = 64, int threads = 2, Action<BoundaryProgress>? report = null)
        where T : unmanaged, INumberBase<T>
        => new(Algebra<T>(threads), new BoundarySettings { BondDimension = chi, Tolerance = tolerance }, report);

    /// <summary>A model's site tensor, its logarithmic prefactor per vertex and the exact ln Z per site.</summary>
    public static (Tensor<double> Site, double Prefactor, double Exact) Of(string model, bool graded, params (string Name, double Value)[] parameters)
    {
        Model found = ModelCatalogue.Find(model);
        ParameterSet set = found.CreateParameters(parameters.Select(static p => KeyValuePair.Create(p.Name, p.Value)));
        VertexNetwork network = found.Network(set, graded);
        return (NetworkTensors.Build<double>(network).Site, network.LogPrefactor, found.Exact(Quantity.LogZPerSite, set)?.Value ?? double.NaN);
    }

    /// <summary>
    /// The ungraded Ising vertex in the basis of even and odd bond states: t^(n/2) for n odd legs, t = tanh(1/T); <paramref name="even"/> and
    /// <paramref name="odd"/> multiply the elements with n even and odd. A field h gives 1 and tanh(h/T); the spin itself 0 and 1.
    /// </summary>
    public static Tensor<T> Ising<T>(double temperature, T even, T odd)
        where T : unmanaged, INumberBase<T>
    {
        double t = Math.Tanh(1 / temperature);
        return FromElements(2, (u, l, d, r) => (((u + l + d + r) % 2) == 0 ? even : odd) * Scalar.FromReal<T>(Math.Pow(t, (u + l + d + r) / 2.0)));
    }

    /// <summary>An ungraded vertex.</summary>
    public static Tensor<T> FromElements<T>(int dimension, Func<int, int, int, int, T> element)
        where T : unmanaged, INumberBase<T>
    {
        Leg into = Leg.Plain(dimension, Arrow.In);
        return Tensor<T>.FromFunction([into, into, into.Dual, into.Dual], at => element(at.Span[0], at.Span[1], at.Span[2], at.Span[3]));
    }

    /// <summary>Positive random elements around 1, without any symmetry.</summary>
    public static Tensor<double> RandomPositive(int dimension, long seed)
    {
        var random = new RandomSequence(seed, dimension);
        return FromElements(dimension, (_, _, _, _) => 1 + (0.3 * random.NextUnit()));
    }
}
