using System.Collections.Immutable;
using System.Numerics;
using TensorRG.Models.Lattices;
using TensorRG.Models.Tests.Lattices;
using TensorRG.Models.Tests.Literature;

namespace TensorRG.Models.Tests;

/// <summary>
/// Every model of the catalogue at random parameters: its tables against a sum written from the published Hamiltonian, and every network that can be
/// made of it, with every observable put in, against sums over configurations.
/// </summary>
public class RegistryTests
{
    private const double Tolerance = 1e-12;

    private const double MaxConfigurations = 1 << 14;

    private const int Seeds = 3;

    // Length, height, and the most states of a variable where they are a parameter.
    private static readonly (int Lx, int Ly, int States)[] Tori = [(1, 1, 4), (2, 1, 3), (1, 2, 3), (2, 2, 3), (3, 2, 2), (2, 3, 2)];

    public static TheoryData<string, int> ModelsAndSeeds()
    {
        var data = new TheoryData<string, int>();
        foreach (string name in ModelCatalogue.Names)
        {
            for (int seed = 1; seed <= Seeds; seed++)
                data.Add(name, seed);
        }
        return data;
    }

    [Theory]
    [MemberData(nameof(ModelsAndSeeds))]
    public void Tables_agree_with_the_published_Hamiltonian(string name, int seed)
    {
        int compared = 0;
        foreach ((int lx, int ly, int states) in Tori)
        {
            ParameterSet p = RandomParameters.Draw(ModelCatalogue.Find(name), seed, states);
            LatticeSystem system = p.Model.System(p)!;
            LiteratureModel literature = Configurations.Of(p, lx, ly);
            Assert.Equal(literature.States, system.States);
            if (Math.Pow(literature.States, literature.Variables) > MaxConfigurations)
                continue;
            CompareTables(literature, system, lx, ly, Text(p));
            compared++;
        }
        Assert.InRange(compared, 3, Tori.Length);
    }

    [Theory]
    [MemberData(nameof(ModelsAndSeeds))]
    public void Networks_of_every_form_agree_with_the_sum_over_configurations(string name, int seed)
    {
        var compared = new Dictionary<NetworkForm, int>();
        foreach ((int lx, int ly, int states) in Tori)
        {
            ParameterSet p = RandomParameters.Draw(ModelCatalogue.Find(name), seed, states);
            LatticeSystem system = p.Model.System(p)!;
            foreach (NetworkForm form in Forms(system).Prepend(NetworkForm.Auto))
            {
                ModelNetwork built = NetworkBuilder.Build(system, new NetworkOptions { Form = form });
                if (!NetworkCheck.IsSmall(built, system, lx, ly))
                    continue;
                CompareNetworks(p, system, form, lx, ly);
                NetworkCheck.Torus(system, Plain(system, form), lx, ly);
                compared[form] = compared.GetValueOrDefault(form) + 1;
            }
        }
        Assert.Equal(Forms(ModelCatalogue.Find(name).System(ModelCatalogue.Find(name).CreateParameters())!).Count() + 1, compared.Count);
        Assert.All(compared, c => Assert.True(c.Value >= 2, $"{c.Key} was compared on {c.Value} torus"));
    }

    // A vertex stands for a block of 2 x 2 cells, on the honeycomb lattice for one cell.
    [Theory]
    [MemberData(nameof(ModelsAndSeeds))]
    public void Staggered_observables_agree_with_the_sum_over_configurations(string name, int seed)
    {
        ParameterSet p = RandomParameters.Draw(ModelCatalogue.Find(name), seed, 2);
        LatticeSystem system = p.Model.System(p)!;
        ImmutableArray<string> staggered = [.. system.Observables.Where(static o => o.IsStaggered).Select(static o => o.Name)];
        if (staggered.Length == 0)
            return;
        foreach (NetworkForm form in Forms(system))
        {
            var options = new NetworkOptions { Form = form, Observables = staggered };
            NetworkCheck.Compare(NetworkBuilder.Build(system, options), system, options, 1, 1);
            if (system.Lattice == LatticeKind.Honeycomb)
                NetworkCheck.Compare(NetworkBuilder.Build(system, options), system, options, 2, 1);
        }
    }

    private static NetworkOptions Plain(LatticeSystem system, NetworkForm form)
        => new() { Form = form, Observables = [.. system.Observables.Where(static o => !o.IsStaggered).Select(static o => o.Name)] };

    private static void CompareTables(LiteratureModel literature, LatticeSystem system, int lx, int ly, string what)
    {
        var sum = new ConfigurationSum(literature);
        Assert.Equal(sum.Scale > 0, IsAllowed(system, lx, ly));
        if (sum.Scale == 0)
            return;
        var oracle = new TorusOracle(system, new NetworkOptions { Observables = [.. system.Observables.Select(static o => o.Name)] }, lx, ly);
        double factor = Math.Exp(oracle.LogScale - sum.LogScale);
        Near(sum.Z, factor * oracle.Z, sum.Scale, $"Z of {what}, {lx} x {ly}");
        Assert.All(system.Observables, o => Assert.Contains(o.Name, sum.Names));
        for (int i = 0; i < system.Observables.Length; i++)
        {
            (Complex value, double scale) = sum.Of(system.Observables[i].Name);
            Near(value, factor * oracle.Moments[i][1], Math.Max(scale, sum.Scale), $"{system.Observables[i].Name} of {what}, {lx} x {ly}");
        }
    }

    private static void CompareNetworks(ParameterSet p, LatticeSystem system, NetworkForm form, int lx, int ly)
    {
        if (!IsAllowed(system, lx, ly))
            return;
        var oracle = new TorusOracle(system, new NetworkOptions(), lx, ly);
        foreach (bool graded in new[] { true, false })
        {
            VertexNetwork network = p.Model.Network(p, graded, form);
            var torus = new ComplexTorus(network, lx, ly);
            double factor = Math.Exp((lx * ly * network.LogPrefactor) - oracle.LogScale);
            Near(oracle.Z, factor * torus.Contract((_, _) => torus.Vertex), oracle.Scale, $"{form} network of {Text(p)}, graded {graded}, {lx} x {ly}");
            Assert.True(graded || network.GroupOrders.IsEmpty);
        }
    }

    // One site of the square lattice on a torus of its own has no dimer.
    private static bool IsAllowed(LatticeSystem system, int lx, int ly) => double.IsFinite(new TorusOracle(system, new NetworkOptions(), lx, ly).LogScale);

    // The forms that hold the terms of a system, from NetworkForm's own words.
    private static IEnumerable<NetworkForm> Forms(LatticeSystem system) => (system.OnEdges, system.Lattice) switch
    {
        (true, _) => [NetworkForm.Vertex],
        (_, LatticeKind.Kagome) => [NetworkForm.Triangles],
        (_, LatticeKind.Honeycomb) => [NetworkForm.Bond],
        (_, LatticeKind.Triangular) => [NetworkForm.Face, NetworkForm.Row],
        _ when system.LogWeights.Any(static t => t.Cluster is Cluster.Diagonal or Cluster.Antidiagonal or Cluster.Face) => [NetworkForm.Face, NetworkForm.Row],
        _ => [NetworkForm.Bond, NetworkForm.Face, NetworkForm.Row],
    };

    private static string Text(ParameterSet p) => $"{p.Model.Name} at {string.Join(", ", p.Values.Select(static v => FormattableString.Invariant($"{v.Key}={v.Value:R}")))}";

    private static void Near(Complex expected, Complex actual, double scale, string what)
        => Assert.True(Complex.Abs(expected - actual) <= Tolerance * scale, $"{what}: {expected} expected, {actual} found, off by {Complex.Abs(expected - actual) / scale:E2}.");
}
