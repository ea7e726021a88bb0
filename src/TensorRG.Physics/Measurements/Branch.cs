using System.Collections.Immutable;
using System.Numerics;
using TensorRG.Models;
using TensorRG.Models.Lattices;

namespace TensorRG.Physics.Measurements;

/// <summary>One network that a measurement needs, and the observables that are read from it.</summary>
/// <param name="Model">The network with an impurity for each observable.</param>
/// <param name="Names">The observables, in the order of the impurities.</param>
/// <param name="IsOrdered">True if a field on the first observable chooses the state; false for the symmetric state.</param>
/// <param name="Variances">Indices of the observables whose variance is asked for.</param>
internal sealed record Branch(ModelNetwork Model, ImmutableArray<string> Names, bool IsOrdered, ImmutableArray<int> Variances)
{
    /// <summary>Size of an element that is round-off, relative to the largest of the vertex.</summary>
    private const double Negligible = 1e-13;

    /// <summary>True if neither the network nor an impurity has complex elements.</summary>
    public bool IsReal => Model.Network.IsReal && !Model.Impurities.Any(i => Any(Model.Network, (u, l, d, r) => Math.Abs(i.Element(1, u, l, d, r).Imaginary) > Negligible));

    /// <summary>True if an impurity has elements that break the conservation of charge.</summary>
    /// <param name="network">The network.</param>
    /// <param name="impurity">The impurity.</param>
    public static bool Breaks(VertexNetwork network, Impurity impurity)
        => !network.GroupOrders.IsEmpty
        && Any(network, (u, l, d, r) => !network.ConservesCharge(u, l, d, r) && Complex.Abs(impurity.Element(1, u, l, d, r)) > Negligible);

    private static bool Any(VertexNetwork network, Func<int, int, int, int, bool> test)
    {
        int v = network.VerticalBond.Length, h = network.HorizontalBond.Length;
        return Enumerable.Range(0, v * h).Any(ul => Enumerable.Range(0, v * h).Any(dr => test(ul / h, ul % h, dr / h, dr % h)));
    }
}
