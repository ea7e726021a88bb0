using System.Collections.Immutable;
using TensorRG.Models.Lattices;

namespace TensorRG.Models.Tests.Lattices;

public sealed class NetworkFormTests
{
    public static TheoryData<string, NetworkForm> Cases()
    {
        var data = new TheoryData<string, NetworkForm>();
        foreach ((string name, NetworkForm[] forms) in new (string, NetworkForm[])[]
        {
            ("square", [NetworkForm.Bond, NetworkForm.Face, NetworkForm.Row]),
            ("square-potts", [NetworkForm.Bond, NetworkForm.Face, NetworkForm.Row]),
            ("square-faces", [NetworkForm.Face, NetworkForm.Row]),
            ("antidiagonal", [NetworkForm.Face, NetworkForm.Row]),
            ("hard-squares", [NetworkForm.Bond, NetworkForm.Face, NetworkForm.Row]),
            ("infinite-temperature", [NetworkForm.Bond, NetworkForm.Face, NetworkForm.Row]),
            ("triangular", [NetworkForm.Face, NetworkForm.Row]),
            ("honeycomb", [NetworkForm.Bond]),
            ("honeycomb-potts", [NetworkForm.Bond]),
            ("kagome", [NetworkForm.Triangles]),
            ("kagome-infinite-temperature", [NetworkForm.Triangles]),
            ("six-vertex", [NetworkForm.Vertex]),
            ("dimers", [NetworkForm.Vertex]),
            ("honeycomb-dimers", [NetworkForm.Vertex]),
            ("honeycomb-loops", [NetworkForm.Vertex]),
        })
        {
            foreach (NetworkForm form in forms)
                data.Add(name, form);
        }
        return data;
    }

    [Theory]
    [MemberData(nameof(Cases))]
    public void A_network_and_its_impurities_equal_the_sum_over_configurations(string name, NetworkForm form)
    {
        LatticeSystem system = Named(name);
        ImmutableArray<string> observables = system.OnEdges ? ["sum"] : ["energy", "m"];
        foreach ((int lx, int ly) in new[] { (1, 1), (2, 1), (1, 2), (2, 2), (3, 2) })
        {
            NetworkCheck.Torus(system, new NetworkOptions { Form = form, Observables = observables }, lx, ly);
            NetworkCheck.Torus(system, new NetworkOptions { Form = form, Graded = false }, lx, ly);
        }
    }

    [Theory]
    [InlineData("square", NetworkForm.Bond)]
    [InlineData("hard-squares", NetworkForm.Bond)]
    [InlineData("honeycomb", NetworkForm.Bond)]
    [InlineData("honeycomb-potts", NetworkForm.Bond)]
    [InlineData("square-faces", NetworkForm.Face)]
    [InlineData("square-faces", NetworkForm.Row)]
    [InlineData("antidiagonal", NetworkForm.Face)]
    [InlineData("antidiagonal", NetworkForm.Row)]
    [InlineData("triangular", NetworkForm.Face)]
    [InlineData("kagome", NetworkForm.Triangles)]
    public void Staggered_observables_and_fields_are_exact(string name, NetworkForm form)
    {
        LatticeSystem system = Named(name);
        var measured = new NetworkOptions { Form = form, Observables = ["staggered", "energy"] };
        NetworkCheck.Torus(system, measured, 1, 1);
        NetworkCheck.Torus(system, measured with { Fields = [("staggered", 0.3), ("m", -0.2)] }, 2, 1);
        NetworkCheck.Torus(system, measured with { Fields = [("staggered", 0.3)] }, 1, 2);
    }

    // Blocks of 2 x 2 vertices with 8 edges; two of them are sums over 2^16 configurations.
    [Theory]
    [InlineData("six-vertex", 1, 1)]
    [InlineData("six-vertex", 2, 1)]
    [InlineData("dimers", 1, 1)]
    [InlineData("dimers", 1, 2)]
    [InlineData("honeycomb-dimers", 2, 2)]
    [InlineData("honeycomb-loops", 2, 1)]
    public void Staggered_observables_and_fields_of_vertex_models_are_exact(string name, int lx, int ly)
    {
        LatticeSystem plain = Named(name), system = plain with { Observables = [.. plain.Observables, plain.Observables[0] with { Name = "staggered", IsStaggered = true }] };
        foreach ((string, double)[] fields in new (string, double)[][] { [], [("staggered", 0.3)] })
        {
            var options = new NetworkOptions { Observables = ["staggered", "sum"], Fields = [.. fields] };
            NetworkCheck.Compare(NetworkBuilder.Build(system, options), system, options, lx, ly);
        }
    }

    private static LatticeSystem Named(string name) => name switch
    {
        "square" => Systems.Ising(LatticeKind.Square, (Cluster.Bond1, 0.4), (Cluster.Bond2, -0.7), (Cluster.Site, 0.1)),
        "square-potts" => Systems.Pairs(LatticeKind.Square, 3, static (a, b) => a == b ? 0.9 : 0, Cluster.Bond1, Cluster.Bond2),
        "square-faces" => Systems.Ising(LatticeKind.Square, (Cluster.Bond1, 0.4), (Cluster.Bond2, 0.5), (Cluster.Diagonal, -0.3), (Cluster.Antidiagonal, -0.2), (Cluster.Face, 0.2)),
        "antidiagonal" => Systems.Ising(LatticeKind.Square, (Cluster.Antidiagonal, 0.7)),
        "hard-squares" => Systems.OfSites(
            LatticeKind.Square,
            ["empty", "full"],
            [0, 1],
            (Cluster.Site, static s => 0.7 * s[0]),
            (Cluster.Bond1, static s => s[0] + s[1] == 2 ? double.NegativeInfinity : 0),
            (Cluster.Bond2, static s => s[0] + s[1] == 2 ? double.NegativeInfinity : 0)),
        "infinite-temperature" => FreeSpins(LatticeKind.Square, Cluster.Bond1, Cluster.Bond2),
        "triangular" => Systems.Ising(
            LatticeKind.Triangular,
            (Cluster.Site, 0.1),
            (Cluster.Bond1, -0.4),
            (Cluster.Bond2, -0.5),
            (Cluster.Bond3, -0.6),
            (Cluster.UpTriangle, 0.2),
            (Cluster.DownTriangle, 0.3)),
        "honeycomb" => Systems.Ising(LatticeKind.Honeycomb, (Cluster.Site, 0.2), (Cluster.Bond1, 0.4), (Cluster.Bond2, 0.5), (Cluster.Bond3, -0.6)),
        "honeycomb-potts" => Systems.Pairs(LatticeKind.Honeycomb, 3, static (a, b) => a == b ? 1.1 : 0, Cluster.Bond1, Cluster.Bond2, Cluster.Bond3),
        "kagome" => Systems.Ising(
            LatticeKind.Kagome,
            (Cluster.Site, 0.1),
            (Cluster.Bond1, -0.4),
            (Cluster.Bond2, -0.5),
            (Cluster.Bond3, -0.6),
            (Cluster.UpTriangle, 0.2),
            (Cluster.DownTriangle, 0.3)),
        "kagome-infinite-temperature" => FreeSpins(LatticeKind.Kagome, Cluster.Bond1, Cluster.UpTriangle),
        "six-vertex" => Systems.Edges(LatticeKind.Square, 2, SixVertex),
        "dimers" => Systems.Edges(LatticeKind.Square, 2, static s => s.Sum() == 1 ? (s[0] + s[2] == 1 ? 1.3 : 0.8) : 0),
        "honeycomb-dimers" => Systems.Edges(LatticeKind.Honeycomb, 2, static s => s.Sum() == 1 ? 1 + (0.2 * s[1]) : 0),
        "honeycomb-loops" => Systems.Edges(LatticeKind.Honeycomb, 2, static s => s.Sum() % 2 == 0 ? 1 - (0.2 * s.Sum()) + (0.1 * s[2]) : 0),
        _ => throw new ArgumentOutOfRangeException(nameof(name)),
    };

    private static double SixVertex(int[] s)
    {
        if (s[0] + s[1] != s[2] + s[3])
            return 0;
        return s[0] == s[1] ? 1.1 : s[0] == s[2] ? 0.7 : 1.4;
    }

    // No weight at all, but an energy to be measured: the impurity needs states of the bond that the weights do not.
    private static LatticeSystem FreeSpins(LatticeKind lattice, params Cluster[] clusters)
    {
        LatticeSystem coupled = Systems.Ising(lattice, [.. clusters.Select(static c => (c, 1.0))]);
        return coupled with { LogWeights = [] };
    }
}
