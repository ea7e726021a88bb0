using System.Collections.Immutable;
using System.Numerics;
using TensorRG.CoarseGraining;
using TensorRG.Models;
using TensorRG.Tensors;

namespace TensorRG.Physics.Tests;

/// <summary>The tensors of every catalogue model hold exactly the elements of its network.</summary>
public sealed class NetworkTensorsTests
{
    public static TheoryData<string, bool> ModelsAndGradings()
    {
        var data = new TheoryData<string, bool>();
        foreach (Model model in ModelCatalogue.All)
        {
            data.Add(model.Name, true);
            data.Add(model.Name, false);
        }

        return data;
    }

    [Theory]
    [MemberData(nameof(ModelsAndGradings))]
    public void Every_element_is_in_its_place(string name, bool graded)
    {
        Model model = ModelCatalogue.Find(name);
        VertexNetwork network = model.Network(Small(model), graded);
        InitialNetwork<Complex> initial = NetworkTensors.Build<Complex>(network);
        Assert.Equal(network.SitesPerVertex, initial.SitesPerTensor);
        Assert.Equal(network.LogPrefactor, initial.LogPrefactor);
        Assert.Equal(graded ? network.GroupOrders.ToArray() : [], initial.Site.Legs[0].Group.Orders.ToArray());
        CheckElements(network, initial.Site);
        if (network.IsReal)
            CheckElements(network, NetworkTensors.Build<double>(network).Site);
    }

    [Fact]
    public void A_real_tensor_of_a_complex_network_is_refused()
    {
        VertexNetwork network = VertexNetwork.OfComplex([], [new BondState("0", [])], [new BondState("0", [])], static (_, _, _, _) => Complex.ImaginaryOne, 1, 0);
        Assert.Throws<InvalidOperationException>(() => NetworkTensors.Build<double>(network));
        Assert.Equal(Complex.ImaginaryOne, NetworkTensors.Build<Complex>(network).Site.At(0, 0, 0, 0));
    }

    /// <summary>Bond states are listed in any order; the leg sorts them by charge and keeps the order within a charge.</summary>
    [Fact]
    public void Unsorted_bond_states_are_sorted_by_charge()
    {
        ImmutableArray<BondState> vertical = [new("a", [1, 0]), new("b", [0, -1]), new("c", [1, 0]), new("d", [0, -1])];
        ImmutableArray<BondState> horizontal = [new("x", [1, 2]), new("y", [0, 0])];
        VertexNetwork network = VertexNetwork.Real([2, 0], vertical, horizontal, static (u, l, d, r) => (1000 * u) + (100 * l) + (10 * d) + r + 1, 1, 0);
        Tensor<double> site = NetworkTensors.Build<double>(network).Site;
        Assert.Equal("in (0,-1):2 (1,0):2", site.Legs[0].ToString());
        Assert.Equal("out (0,0):1 (1,2):1", site.Legs[3].ToString());
        CheckElements(network, site);
    }

    // The defaults, but few nodes of an integral: 24 make 24^4 elements.
    private static ParameterSet Small(Model model)
        => model.CreateParameters(model.Parameters.Any(static p => p.Name == "nodes") ? [KeyValuePair.Create("nodes", 5.0)] : []);

    private static void CheckElements<T>(VertexNetwork network, Tensor<T> site)
        where T : unmanaged, INumberBase<T>
    {
        int[] v = Order(network.VerticalBond), h = Order(network.HorizontalBond);
        Assert.Equal(new[] { v.Length, h.Length, v.Length, h.Length }, site.Legs.Select(static leg => leg.Dimension));
        Assert.Equal(new[] { Arrow.In, Arrow.In, Arrow.Out, Arrow.Out }, site.Legs.Select(static leg => leg.Arrow));
        for (int i = 0; i < v.Length * h.Length * v.Length * h.Length; i++)
        {
            (int u, int l, int d, int r) = (i / (h.Length * v.Length * h.Length), i / (v.Length * h.Length) % h.Length, i / h.Length % v.Length, i % h.Length);
            Complex expected = network.ConservesCharge(v[u], h[l], v[d], h[r]) ? network.Element(v[u], h[l], v[d], h[r]) : 0;
            Assert.Equal(expected, Scalar.ToComplex(site.At(u, l, d, r)));
        }
    }

    /// <summary>States by charge, lexicographically; equal charges in the order given.</summary>
    private static int[] Order(ImmutableArray<BondState> bond)
        => [.. Enumerable.Range(0, bond.Length).OrderBy(i => bond[i].Charge.ToArray(), Comparer<int[]>.Create(static (a, b) => a.AsSpan().SequenceCompareTo(b)))];
}
