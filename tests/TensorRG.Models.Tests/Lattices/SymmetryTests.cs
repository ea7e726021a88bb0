using System.Numerics;
using TensorRG.Models.Lattices;

namespace TensorRG.Models.Tests.Lattices;

public sealed class SymmetryTests
{
    [Fact]
    public void Ising_is_graded_by_the_flip() => Expect(Systems.Ising(LatticeKind.Square, (Cluster.Bond1, 0.4), (Cluster.Bond2, 0.4)), [2], "Z2: s -> -s");

    [Fact]
    public void A_field_breaks_the_flip()
    {
        LatticeSystem system = Systems.Ising(LatticeKind.Square, (Cluster.Bond1, 0.4), (Cluster.Bond2, 0.4));
        ModelNetwork built = NetworkBuilder.Build(system, new NetworkOptions { Fields = [("m", 0.1)] });
        Assert.Empty(built.Network.GroupOrders);
        Assert.Equal("none", built.Symmetry);
    }

    [Theory]
    [InlineData(LatticeKind.Square)]
    [InlineData(LatticeKind.Honeycomb)]
    [InlineData(LatticeKind.Triangular)]
    [InlineData(LatticeKind.Kagome)]
    public void Potts_is_graded_by_the_cyclic_shift_and_stays_real(LatticeKind lattice)
    {
        Cluster[] bonds = lattice == LatticeKind.Square ? [Cluster.Bond1, Cluster.Bond2] : [Cluster.Bond1, Cluster.Bond2, Cluster.Bond3];
        for (int q = 3; q <= 5; q++)
            Expect(Systems.Pairs(lattice, q, static (a, b) => a == b ? 1 : 0, bonds), [q], $"Z{q}: cyclic shift of the states");
    }

    [Theory]
    [InlineData(6)]
    [InlineData(16)]
    public void Clock_and_planar_spins_are_graded_by_the_cyclic_shift(int q)
        => Expect(Systems.Pairs(LatticeKind.Square, q, (a, b) => Math.Cos(2 * Math.PI * (a - b) / q), Cluster.Bond1, Cluster.Bond2), [q], $"Z{q}: cyclic shift of the states");

    [Fact]
    public void A_clock_with_scrambled_states_is_found_too()
    {
        int[] angle = [3, 0, 5, 1, 6, 2, 4];
        LatticeSystem system = Systems.Pairs(LatticeKind.Square, 7, (a, b) => Math.Cos(2 * Math.PI * (angle[a] - angle[b]) / 7), Cluster.Bond1, Cluster.Bond2);
        ModelNetwork built = NetworkBuilder.Build(system, new NetworkOptions());
        Assert.Equal([7], built.Network.GroupOrders.ToArray());
        Assert.True(built.Network.IsReal);
    }

    [Fact]
    public void A_chiral_clock_keeps_only_what_leaves_it_real()
    {
        LatticeSystem system = Systems.Pairs(LatticeKind.Square, 4, static (a, b) => Math.Cos((2 * Math.PI * (a - b) / 4) + 0.3), Cluster.Bond1, Cluster.Bond2);
        ModelNetwork built = NetworkBuilder.Build(system, new NetworkOptions { Observables = ["energy"] });
        Assert.Equal([2], built.Network.GroupOrders.ToArray());
        Assert.True(built.Network.IsReal);
        NetworkCheck.Compare(built, system, new NetworkOptions { Observables = ["energy"] }, 2, 2);
    }

    [Theory]
    [InlineData(0.3, 0.3, 4)]
    [InlineData(0.3, 0.5, 2)]
    public void Ashkin_Teller_has_four_elements(double first, double second, int largest)
    {
        LatticeSystem system = Systems.Pairs(LatticeKind.Square, 4, (a, b) => AshkinTeller(a, b, first, second), Cluster.Bond1, Cluster.Bond2);
        ModelNetwork built = NetworkBuilder.Build(system, new NetworkOptions());
        Assert.Equal(4, built.Network.GroupOrders.Aggregate(1, static (a, b) => a * b));
        Assert.Equal(largest, built.Network.GroupOrders.Max());
        Assert.True(built.Network.IsReal);
    }

    [Fact]
    public void Spin_one_is_graded_by_the_flip_that_keeps_zero()
    {
        double[] spins = [-1, 0, 1];
        LatticeSystem system = Systems.OfSites(
            LatticeKind.Square,
            ["-1", "0", "1"],
            spins,
            (Cluster.Site, s => -0.6 * spins[s[0]] * spins[s[0]]),
            (Cluster.Bond1, s => spins[s[0]] * spins[s[1]]),
            (Cluster.Bond2, s => spins[s[0]] * spins[s[1]]));
        Expect(system, [2], "Z2: s -> -s");
    }

    [Fact]
    public void A_real_field_on_nodes_is_graded_by_its_sign()
    {
        double[] nodes = [-2.3, -1.1, -0.4, 0.4, 1.1, 2.3];
        LatticeSystem system = Systems.OfSites(
            LatticeKind.Square,
            [.. nodes.Select(static x => x.ToString(System.Globalization.CultureInfo.InvariantCulture))],
            nodes,
            (Cluster.Site, s => -Math.Pow(nodes[s[0]], 4)),
            (Cluster.Bond1, s => nodes[s[0]] * nodes[s[1]]),
            (Cluster.Bond2, s => nodes[s[0]] * nodes[s[1]]));
        Expect(system, [2], "Z2: s -> -s");
    }

    [Fact]
    public void Vacancies_leave_the_shift_of_the_other_states()
    {
        LatticeSystem system = Systems.Pairs(LatticeKind.Square, 4, static (a, b) => a == b && a > 0 ? 1 : a == b ? 0.2 : 0, Cluster.Bond1, Cluster.Bond2);
        Expect(system, [3], "Z3: 1 -> 2 -> 3 -> 1");
    }

    [Fact]
    public void Six_vertex_conserves_the_lines()
    {
        LatticeSystem system = Systems.Edges(LatticeKind.Square, 2, static s => s[0] + s[1] == s[2] + s[3] ? (s[0] == s[1] ? 1.0 : s[0] == s[2] ? 0.8 : 1.3) : 0);
        ModelNetwork built = NetworkBuilder.Build(system, new NetworkOptions());
        Assert.Equal([0], built.Network.GroupOrders.ToArray());
        Assert.Equal([0, 1], built.Network.VerticalBond.Select(static s => s.Charge[0]).ToArray());
        Assert.Equal([0, 1], built.Network.HorizontalBond.Select(static s => s.Charge[0]).ToArray());
        Assert.StartsWith("U(1)", built.Symmetry, StringComparison.Ordinal);
    }

    [Fact]
    public void Eight_vertex_conserves_parity()
    {
        LatticeSystem system = Systems.Edges(LatticeKind.Square, 2, static s => s.Sum() % 2 == 0 ? 1 + (0.1 * s[0]) + (0.3 * s[1] * s[2]) : 0);
        Assert.Equal([2], NetworkBuilder.Build(system, new NetworkOptions()).Network.GroupOrders.ToArray());
    }

    [Fact]
    public void Dimers_on_the_honeycomb_lattice_conserve_lines_and_on_the_square_lattice_of_one_vertex_nothing()
    {
        Assert.Equal([0], NetworkBuilder.Build(Systems.Edges(LatticeKind.Honeycomb, 2, static s => s.Sum() == 1 ? 1 : 0), new NetworkOptions()).Network.GroupOrders.ToArray());
        Assert.Empty(NetworkBuilder.Build(Systems.Edges(LatticeKind.Square, 2, static s => s.Sum() == 1 ? 1 : 0), new NetworkOptions()).Network.GroupOrders);
    }

    [Theory]
    [InlineData(NetworkForm.Bond)]
    [InlineData(NetworkForm.Face)]
    [InlineData(NetworkForm.Row)]
    public void Hard_squares_have_none(NetworkForm form)
    {
        static double Exclude(int[] s) => s[0] + s[1] == 2 ? double.NegativeInfinity : 0;
        LatticeSystem system = Systems.OfSites(LatticeKind.Square, ["empty", "full"], [0, 1], (Cluster.Bond1, Exclude), (Cluster.Bond2, Exclude));
        Assert.Empty(NetworkBuilder.Build(system, new NetworkOptions { Form = form }).Network.GroupOrders);
    }

    [Fact]
    public void The_triangular_antiferromagnet_near_zero_temperature_counts_its_ground_states()
    {
        const double K = -100;
        LatticeSystem system = Systems.Ising(LatticeKind.Triangular, (Cluster.Bond1, K), (Cluster.Bond2, K), (Cluster.Bond3, K));
        ModelNetwork built = NetworkBuilder.Build(system, new NetworkOptions { Form = NetworkForm.Face, Graded = false });
        AssertWhole(built.Network);
        NetworkCheck.Compare(built, system, new NetworkOptions(), 2, 2);
        NetworkCheck.Compare(built, system, new NetworkOptions(), 2, 4);
    }

    // In the basis of the flip every element is a sum or difference of equal weights 0 or 1: their ratios are whole numbers.
    private static void AssertWhole(VertexNetwork n)
    {
        double[] sizes = [.. Enumerable.Range(0, 256).Select(i => Math.Abs(n.RealElement(i / 64, i / 16 % 4, i / 4 % 4, i % 4))).Where(static x => x > 0).Order()];
        double smallest = sizes.First(static x => x > 1e-9);
        Assert.All(sizes.Where(static x => x > 1e-9), x => Assert.Equal(Math.Round(x / smallest), x / smallest, 1e-9));
        Assert.All(sizes.Where(static x => x <= 1e-9), static x => Assert.True(x < 1e-15));
    }

    [Fact]
    public void Very_low_temperatures_and_strong_couplings_do_not_overflow()
    {
        LatticeSystem system = Systems.Ising(LatticeKind.Square, (Cluster.Bond1, -1e6), (Cluster.Bond2, -1e6), (Cluster.Site, 1e3));
        ModelNetwork built = NetworkBuilder.Build(system, new NetworkOptions());
        NetworkCheck.Compare(built, system, new NetworkOptions(), 2, 2);
        Assert.True(double.IsFinite(built.Network.LogPrefactor));
    }

    [Fact]
    public void Choices_are_explained()
    {
        Assert.Equal(NetworkForm.Bond, NetworkBuilder.Build(Systems.Ising(LatticeKind.Square, (Cluster.Bond1, 1)), new NetworkOptions()).Form);
        Assert.Equal(NetworkForm.Face, NetworkBuilder.Build(Systems.Ising(LatticeKind.Square, (Cluster.Diagonal, 1)), new NetworkOptions()).Form);
        Assert.Equal(NetworkForm.Row, NetworkBuilder.Build(Systems.Pairs(LatticeKind.Square, 11, static (a, b) => a * b % 3, Cluster.Diagonal), new NetworkOptions { Graded = false }).Form);
        Assert.Equal(NetworkForm.Triangles, NetworkBuilder.Build(Systems.Ising(LatticeKind.Kagome, (Cluster.Bond1, 1)), new NetworkOptions()).Form);
    }

    [Fact]
    public void What_cannot_be_built_is_refused_with_a_remedy()
    {
        LatticeSystem diagonal = Systems.Ising(LatticeKind.Square, (Cluster.Diagonal, 1));
        Assert.Contains("'auto'", Refused(diagonal, new NetworkOptions { Form = NetworkForm.Bond }), StringComparison.Ordinal);
        Assert.Contains("'auto'", Refused(diagonal, new NetworkOptions { Form = NetworkForm.Triangles }), StringComparison.Ordinal);
        Assert.Contains("energy", Refused(diagonal, new NetworkOptions { Observables = ["enrgy"] }), StringComparison.Ordinal);
        LatticeSystem none = Systems.Pairs(LatticeKind.Square, 2, static (_, _) => double.NegativeInfinity, Cluster.Bond1);
        Assert.Contains("excluded", Refused(none, new NetworkOptions()), StringComparison.Ordinal);
        LatticeSystem noLine = Systems.Edges(LatticeKind.Square, 2, static s => s[0] == 0 && s[2] == 1 ? 1 : 0);
        Assert.Contains("vanish", Refused(noLine, new NetworkOptions()), StringComparison.Ordinal);
        LatticeSystem many = Systems.Pairs(LatticeKind.Square, 120, static (a, b) => Math.Cos(a * b), Cluster.Diagonal);
        Assert.Contains("fewer states", Refused(many, new NetworkOptions { Form = NetworkForm.Face }), StringComparison.Ordinal);
    }

    private static string Refused(LatticeSystem system, NetworkOptions options)
        => Assert.Throws<ModelException>(() => NetworkBuilder.Build(system, options)).Message;

    private static double AshkinTeller(int a, int b, double first, double second)
    {
        double s = (a & 1) == (b & 1) ? 1 : -1, t = (a & 2) == (b & 2) ? 1 : -1;
        return (first * s) + (second * t) + (0.2 * s * t);
    }

    private static void Expect(LatticeSystem system, int[] orders, string text)
    {
        ModelNetwork built = NetworkBuilder.Build(system, new NetworkOptions());
        Assert.Equal(orders, built.Network.GroupOrders);
        Assert.Equal(text, built.Symmetry);
        Assert.True(built.Network.IsReal);
        AssertConserved(built.Network);
    }

    private static void AssertConserved(VertexNetwork network)
    {
        int v = network.VerticalBond.Length, h = network.HorizontalBond.Length;
        for (int i = 0; i < v * h * v * h; i++)
        {
            (int u, int l, int d, int r) = (i / (h * v * h), i / (v * h) % h, i / h % v, i % h);
            if (!network.ConservesCharge(u, l, d, r))
                Assert.Equal(Complex.Zero, network.Element(u, l, d, r));
        }
    }
}
