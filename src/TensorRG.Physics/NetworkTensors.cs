using System.Collections.Immutable;
using System.Numerics;
using TensorRG.CoarseGraining;
using TensorRG.Models;
using TensorRG.Models.Lattices;
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
        if (typeof(T) == typeof(double) && !network.IsReal)
            throw new InvalidOperationException("The elements of this network are complex: build complex tensors.");
        return new InitialNetwork<T>(Fill<T>(network, network.Element), network.SitesPerVertex, network.LogPrefactor);
    }

    /// <summary>
    /// An impurity on the legs of the vertex tensor, in the same order of states: each configuration's weight times o^power.
    /// Elements that break the conservation of charge are left out; they vanish in a symmetric state.
    /// </summary>
    /// <typeparam name="T">Element type, that of the vertex tensor.</typeparam>
    /// <param name="network">The network that the impurity belongs to.</param>
    /// <param name="impurity">The impurity.</param>
    /// <param name="power">Power of the observable, 1 to 4.</param>
    public static Tensor<T> Insertion<T>(VertexNetwork network, Impurity impurity, int power)
        where T : unmanaged, INumberBase<T>
    {
        ArgumentNullException.ThrowIfNull(network);
        ArgumentNullException.ThrowIfNull(impurity);
        return Fill<T>(network, (u, l, d, r) => impurity.Element(power, u, l, d, r));
    }

    private static Tensor<T> Fill<T>(VertexNetwork network, Func<int, int, int, int, Complex> element)
        where T : unmanaged, INumberBase<T>
    {
        var group = new AbelianGroup([.. network.GroupOrders]);
        (Leg up, int[] vertical) = Bond(group, network.VerticalBond);
        (Leg left, int[] horizontal) = Bond(group, network.HorizontalBond);
        return Tensor<T>.FromFunction(
            [up, left, up.Dual, left.Dual],
            position =>
            {
                ReadOnlySpan<int> p = position.Span;
                Complex value = element(vertical[p[0]], horizontal[p[1]], vertical[p[2]], horizontal[p[3]]);
                return typeof(T) == typeof(double) ? Scalar.FromReal<T>(value.Real) : (T)(object)value;
            });
    }

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
