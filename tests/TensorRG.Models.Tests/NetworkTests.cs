using System.Numerics;
using TensorRG.Models.Tests.Literature;

namespace TensorRG.Models.Tests;

/// <summary>Every model of the catalogue: the form of its network. The networks that are made by hand: accuracy, also where weights are tiny.</summary>
public class NetworkTests
{
    private const int Seeds = 6;

    public static TheoryData<string, int> ModelsAndSeeds() => WithSeeds(ModelCatalogue.Names);

    public static TheoryData<string, int> HandMadeAndSeeds() => WithSeeds(["ising", "potts", "clock", "six-vertex"]);

    [Theory]
    [MemberData(nameof(HandMadeAndSeeds))]
    public void Small_tori_agree_with_the_sum_over_configurations(string name, int seed)
    {
        Model model = ModelCatalogue.Find(name);
        foreach ((int lx, int ly, int q) in new[] { (1, 1, 6), (2, 2, 6), (3, 2, 5), (2, 3, 4), (3, 3, 3), (4, 2, 2) })
            CheckTorus(RandomParameters.Draw(model, seed, q), lx, ly);
    }

    [Theory]
    [InlineData("ising", 0.01, 1)]
    [InlineData("ising", 0.01, -1)]
    [InlineData("ising", 1e5, 1)]
    [InlineData("potts", 0.01, 1)]
    [InlineData("potts", 1e5, -1)]
    [InlineData("clock", 0.01, 1)]
    [InlineData("clock", 0.3, -1)]
    [InlineData("clock", 1e5, 1)]
    public void Cold_and_hot_tori_agree_too(string name, double temperature, double coupling)
    {
        Model model = ModelCatalogue.Find(name);
        CheckTorus(model.CreateParameters([new("T", temperature), new("J", coupling)]), 2, 2);
    }

    [Theory]
    [MemberData(nameof(HandMadeAndSeeds))]
    public void The_energy_is_the_derivative_of_ln_Z(string name, int seed)
    {
        Model model = ModelCatalogue.Find(name);
        if (!model.HasTemperature)
            return;
        ParameterSet p = RandomParameters.Draw(model, seed, 4);
        // U = T^2 d ln Z / dT by the five-point rule: error of order h^4, h = 1e-3.
        double t = p.Temperature, h = 1e-3 * t;
        double slope = ((8 * (LogZ(t + h) - LogZ(t - h))) - (LogZ(t + (2 * h)) - LogZ(t - (2 * h)))) / (12 * h);
        double energy = Configurations.Sum(p, 2, 2).Energy;
        Near.Scaled(energy, t * t * slope, t + Math.Abs(energy), 1e-9, $"{name} seed {seed}: energy");

        double LogZ(double at) => LogOfContraction(p.With("T", at), 2, 2);
    }

    [Theory]
    [MemberData(nameof(ModelsAndSeeds))]
    public void Elements_conserve_charge_and_are_scaled_to_one(string name, int seed)
    {
        Model model = ModelCatalogue.Find(name);
        // Face forms have as many states as the square of this.
        VertexNetwork network = model.Network(RandomParameters.Draw(model, seed, name is "potts" or "clock" ? 7 : 4));
        int v = network.VerticalBond.Length, h = network.HorizontalBond.Length;
        double largest = 0;
        foreach ((int u, int l, int d, int r) in Indices(v, h))
        {
            Complex element = network.Element(u, l, d, r);
            Assert.True(element == 0 || network.ConservesCharge(u, l, d, r), $"A[{u},{l},{d},{r}] = {element} breaks the symmetry");
            largest = Math.Max(largest, Complex.Abs(element));
        }
        Assert.InRange(largest, 0.5, 1.5);
        Assert.Equal(model.SitesPerVertex, network.SitesPerVertex);
    }

    [Theory]
    [MemberData(nameof(ModelsAndSeeds))]
    public void Dropping_the_charges_changes_nothing_else(string name, int seed)
    {
        Model model = ModelCatalogue.Find(name);
        ParameterSet p = RandomParameters.Draw(model, seed, name is "potts" or "clock" ? 5 : 3);
        VertexNetwork graded = model.Network(p), ungraded = model.Network(p, graded: false);
        Assert.Empty(ungraded.GroupOrders);
        Assert.All(ungraded.VerticalBond.Concat(ungraded.HorizontalBond), s => Assert.Empty(s.Charge));
        Assert.Equal(graded.LogPrefactor, ungraded.LogPrefactor);
        Assert.Equal(graded.VerticalBond.Select(s => s.Label), ungraded.VerticalBond.Select(s => s.Label));
        foreach ((int u, int l, int d, int r) in Indices(graded.VerticalBond.Length, graded.HorizontalBond.Length))
            Assert.Equal(graded.Element(u, l, d, r), ungraded.Element(u, l, d, r));
    }

    [Fact]
    public void Groups_are_as_declared()
    {
        Assert.Equal([2], Network("ising").GroupOrders.ToArray());
        Assert.Empty(Network("ising", ("h", 0.1)).GroupOrders);
        Assert.Equal([5], Network("potts", ("q", 5)).GroupOrders.ToArray());
        Assert.Equal([64], Network("clock", ("q", 64)).GroupOrders.ToArray());
        Assert.Equal([0], Network("six-vertex").GroupOrders.ToArray());
    }

    [Theory]
    [InlineData("ising", 1e-9, 1e6)]
    [InlineData("ising", 1e-9, -1e6)]
    [InlineData("ising", 1e9, 1e-6)]
    [InlineData("ising", 1, 0)]
    [InlineData("potts", 1e-9, 1e6)]
    [InlineData("potts", 1e-9, -1e6)]
    [InlineData("potts", 1e9, 1e-300)]
    [InlineData("clock", 1e-9, 1e6)]
    [InlineData("clock", 1e-9, -1e6)]
    [InlineData("clock", 1e9, 1e-300)]
    [InlineData("clock", 1, 0)]
    public void Extremes_stay_finite(string name, double temperature, double coupling)
    {
        double[] states = name == "ising" ? [2] : [2, 3, 6, 7];
        foreach (double q in states)
        {
            List<(string Name, double Value)> given = [("T", temperature), ("J", coupling)];
            if (name != "ising")
                given.Add(("q", q));
            VertexNetwork network = Network(name, [.. given]);
            Assert.True(double.IsFinite(network.LogPrefactor));
            Assert.All(Indices(network.VerticalBond.Length, network.HorizontalBond.Length), i => Assert.InRange(network.RealElement(i.U, i.L, i.D, i.R), -1.000001, 1.000001));
            Assert.Equal(1, network.RealElement(0, 0, 0, 0));
        }
    }

    // A[0,k,0,k] = lambda_k / lambda_0 -> (K/2)^k / k! as K -> 0 (leading term of the Bessel function I_k): tiny, positive,
    // and not lost in the rounding of lambda_0.
    [Fact]
    public void Hot_clock_weights_keep_their_relative_accuracy()
    {
        VertexNetwork network = Network("clock", ("q", 12), ("T", 1e6));
        double expected = 1;
        for (int k = 1; k <= 5; k++)
        {
            expected *= 0.5e-6 / k;
            Near.Scaled(expected, network.RealElement(0, k, 0, k), expected, 1e-11, $"k = {k}");
            Near.Scaled(expected, network.RealElement(0, 12 - k, 0, 12 - k), expected, 1e-11, $"k = {12 - k}");
        }
    }

    // A cold antiferromagnet of odd q chooses between two equally good angles: lambda_k / lambda_0 -> cos(pi k (q - 1) / q).
    [Theory]
    [InlineData(3)]
    [InlineData(7)]
    [InlineData(11)]
    [InlineData(19)]
    public void Cold_clock_weights_keep_equal_angles_equal(int q)
    {
        VertexNetwork network = Network("clock", ("q", q), ("T", 1e-9), ("J", -1e6));
        for (int k = 0; k < q; k++)
            Near.Check(Math.Cos(Math.PI * k * (q - 1) / q), network.RealElement(0, k, 0, k), 1e-13, $"k = {k}");
    }

    // The Bessel sum and the plain sum over angles meet at |K| = q^2.
    [Theory]
    [InlineData(3, 9)]
    [InlineData(6, 36)]
    [InlineData(6, -36)]
    [InlineData(20, 400)]
    [InlineData(5, -1)]
    public void The_two_ways_to_the_clock_weights_agree_where_they_meet(int q, double k)
    {
        VertexNetwork below = Network("clock", ("q", q), ("T", 1), ("J", k * (1 - 1e-15)));
        VertexNetwork above = Network("clock", ("q", q), ("T", 1), ("J", k * (1 + 1e-15)));
        Near.Check(below.LogPrefactor, above.LogPrefactor, 4e-15, "ln lambda_0");
        for (int n = 0; n < q; n++)
            Near.Check(below.RealElement(0, n, 0, n), above.RealElement(0, n, 0, n), 4e-15, $"lambda_{n}");
    }

    [Fact]
    public void Complex_elements_cannot_be_read_as_real_ones()
    {
        VertexNetwork network = VertexNetwork.OfComplex([], [new("0", [])], [new("0", [])], (_, _, _, _) => Complex.ImaginaryOne, 1, 0);
        Assert.False(network.IsReal);
        Assert.Equal(1, network.Element(0, 0, 0, 0).Imaginary);
        Assert.Throws<InvalidOperationException>(() => network.RealElement(0, 0, 0, 0));
    }

    [Theory]
    [InlineData(2, 2)]
    [InlineData(2, -1)]
    public void A_charge_outside_its_group_is_refused(int order, int charge)
        => Assert.Throws<ArgumentException>(() => VertexNetwork.Real([order], [new("x", [charge])], [new("y", [0])], (_, _, _, _) => 1, 1, 0));

    private static TheoryData<string, int> WithSeeds(IEnumerable<string> names)
    {
        var data = new TheoryData<string, int>();
        foreach (string name in names)
        {
            for (int seed = 1; seed <= Seeds; seed++)
                data.Add(name, seed);
        }
        return data;
    }

    private static VertexNetwork Network(string name, params (string Name, double Value)[] given)
    {
        Model model = ModelCatalogue.Find(name);
        return model.Network(model.CreateParameters([.. given.Select(g => KeyValuePair.Create(g.Name, g.Value))]));
    }

    private static double LogOfContraction(ParameterSet p, int lx, int ly)
    {
        VertexNetwork network = p.Model.Network(p);
        return (lx * ly * network.LogPrefactor) + Math.Log(TorusContraction.Contract(network, lx, ly).Value);
    }

    private static void CheckTorus(ParameterSet p, int lx, int ly)
    {
        VertexNetwork network = p.Model.Network(p);
        (double value, double scale) = TorusContraction.Contract(network, lx, ly);
        double logZ = Configurations.Sum(p, lx, ly).LogZ;
        double expected = Math.Exp(logZ - (lx * ly * network.LogPrefactor));
        string values = string.Join(", ", p.Values.Select(v => FormattableString.Invariant($"{v.Key}={v.Value:R}")));
        Near.Scaled(expected, value, scale, 1e-12, $"{p.Model.Name} {lx}x{ly} at {values}");
    }

    private static IEnumerable<(int U, int L, int D, int R)> Indices(int v, int h)
        => from u in Enumerable.Range(0, v)
           from l in Enumerable.Range(0, h)
           from d in Enumerable.Range(0, v)
           from r in Enumerable.Range(0, h)
           select (u, l, d, r);
}
