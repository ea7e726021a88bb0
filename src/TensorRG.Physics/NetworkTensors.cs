using System.Collections.Immutable;
using System.Numerics;
using TensorRG.CoarseGraining;
using TensorRG.Models;
using TensorRG.Tensors;

namespace TensorRG.Physics;

/// <summary>Turns a model's vertex network into graded tensors.</summary>
public static class NetworkTensors
{
    /// <summary>The network that a flow starts from. Bond states are sorted by charge; within a charge they keep their order.</summary>
    /// <typeparam name="T">Element type; a real type only for a real network.</typeparam>
    /// <param name="network">The model's network.</param>
    /// <exception cref="InvalidOperationException">A real tensor is asked of a complex network.</exception>
    public static InitialNetwork<T> Build<T>(VertexNetwork network)
        where T : unmanaged, INumberBase<T>
    {
        ArgumentNullException.ThrowIfNull(network);
        var group = new AbelianGroup([.. network.GroupOrders]);
        (Leg up, int[] vertical) = Bond(group, network.VerticalBond);
        (Leg left, int[] horizontal) = Bond(group, network.HorizontalBond);
        Tensor<T> site = Tensor<T>.FromFunction(
            [up, left, up.Dual, left.Dual],
            position =>
            {
                ReadOnlySpan<int> p = position.Span;
                return Element<T>(network, vertical[p[0]], horizontal[p[1]], vertical[p[2]], horizontal[p[3]]);
            });
        return new InitialNetwork<T>(site, network.SitesPerVertex, network.LogPrefactor);
    }

    private static T Element<T>(VertexNetwork network, int u, int l, int d, int r)
        where T : unmanaged, INumberBase<T>
        => typeof(T) == typeof(double)
            ? Scalar.FromReal<T>(network.RealElement(u, l, d, r))
            : (T)(object)network.Element(u, l, d, r);

    private static (Leg Leg, int[] Order) Bond(AbelianGroup group, ImmutableArray<BondState> states)
    {
        Charge[] charges = [.. states.Select(s => ToCharge(s.Charge))];
        int[] order = [.. Enumerable.Range(0, charges.Length).OrderBy(i => charges[i])];
        IEnumerable<Sector> sectors = charges.GroupBy(static q => q).Select(static g => new Sector(g.Key, g.Count()));
        return (new Leg(group, Arrow.In, sectors), order);
    }

    private static Charge ToCharge(ImmutableArray<int> components)
    {
        int At(int i) => i < components.Length ? components[i] : 0;
        return new Charge(At(0), At(1), At(2), At(3));
    }
}
