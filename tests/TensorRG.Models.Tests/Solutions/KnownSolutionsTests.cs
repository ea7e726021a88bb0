using TensorRG.Models.Solutions;

namespace TensorRG.Models.Tests.Solutions;

/// <summary>The registry, and what holds for every solution.</summary>
public class KnownSolutionsTests
{
    [Fact]
    public void Solutions_are_found_by_name()
    {
        Assert.Equal(KnownSolutions.All.Count, KnownSolutions.Names.Distinct().Count());
        Assert.All(KnownSolutions.All, s => Assert.Same(s, KnownSolutions.Find(s.Name.ToUpperInvariant())));
        Assert.Null(KnownSolutions.Find("no-such-solution"));
    }

    public static TheoryData<string> Names() => [.. KnownSolutions.Names];

    [Theory]
    [MemberData(nameof(Names))]
    public void What_is_declared_is_given_and_the_other_way_round(string name)
    {
        IKnownSolution solution = KnownSolutions.Find(name)!;
        string[] asked = [.. QuantityNames.All, .. solution.References.Select(r => r.Quantity), "no-such-quantity"];
        ParameterSet[] sets = [.. Samples(name)];
        foreach (string quantity in asked.Distinct())
        {
            ExactValue[] values = [.. sets.Select(s => solution.Exact(quantity, s)).OfType<ExactValue>()];
            Assert.True(solution.References.Any(r => r.Quantity == quantity) == (values.Length > 0), $"{name}: {quantity} is declared or given, not both");
            Assert.All(values, v => Assert.True(double.IsFinite(v.Value) && v.Uncertainty is >= 0 and < 1e-9 && v.Source.Length > 0 && v.Note.Length > 0, $"{name}: {quantity}"));
        }
    }

    // U = -T dlnZ/dln(1/T), C = dU/dT, S = ln Z + U/T, by differences.
    [Theory]
    [InlineData("ising-square", 1.3)]
    [InlineData("ising-square", 3.1)]
    [InlineData("ising-triangular", 0.4)]
    [InlineData("ising-triangular", 2.6)]
    [InlineData("ising-honeycomb", 0.7)]
    [InlineData("ising-honeycomb", 2.1)]
    [InlineData("ising-kagome", 0.6)]
    [InlineData("ising-kagome", 3.3)]
    [InlineData("potts-square", 0.9)]
    [InlineData("clock-square", 1.4)]
    [InlineData("ashkin-teller", 1.7)]
    public void Energy_entropy_and_specific_heat_follow_from_ln_Z(string name, double t)
    {
        IKnownSolution solution = KnownSolutions.Find(name)!;
        foreach (ParameterSet set in Samples(name).Select(s => s.With("T", t)).Where(s => solution.Exact("specific-heat", s) is not null))
        {
            const double H = 1e-3;
            double Get(string quantity, double factor = 1) => solution.Exact(quantity, set.With("T", t * factor))!.Value;
            double Slope(string quantity) => ((8 * (Get(quantity, 1 + H) - Get(quantity, 1 - H))) - (Get(quantity, 1 + (2 * H)) - Get(quantity, 1 - (2 * H)))) / (12 * H);
            Near.Check(t * Slope("ln-z"), Get("energy"), 2e-8, $"{name} energy");
            Near.Check(Slope("energy") / t, Get("specific-heat"), 2e-7, $"{name} specific heat");
            Near.Check(Get("ln-z") + (Get("energy") / t), Get("entropy"), 1e-13, $"{name} entropy");
        }
    }

    [Fact]
    public void Hand_made_networks_are_there()
    {
        foreach (string name in new[] { "ising-square", "potts-square", "clock-square", "six-vertex" })
            Assert.All(Samples(name), s => Assert.NotNull(KnownSolutions.Find(name)!.Network(s)));
    }

    private static IEnumerable<ParameterSet> Samples(string name) => name switch
    {
        "ising-square" => [Ask.Set(("T", 2), ("Jx", 1), ("Jy", 0.8), ("h", 0)), Ask.Set(("T", 2), ("Jx", 1), ("Jy", -1))],
        "ising-triangular" => [Triple("J", 1, 0.8, 0.3), Triple("J", 1, -0.6, 0.3), Triple("J", -1, -1, -1), Triple("J", 1, 0.8, -0.8)],
        "ising-honeycomb" => [Triple("J", 1, 0.8, 0.3), Triple("J", 1, -0.6, 0.3)],
        "ising-kagome" => [Ask.Set(("T", 2), ("J", 1)), Ask.Set(("T", 2), ("J", -1))],
        "potts-square" or "clock-square" => [.. from q in new[] { 2.0, 3, 4 } from t in new[] { 2, Critical(name, q) } select Ask.Set(("T", t), ("q", q), ("J", 1))],
        "ashkin-teller" => [.. from k in new[] { 0, 0.5 } from t in new[] { 2, Ask.Critical(name, ("T", 1), ("J", 1), ("K", k)).Temperature!.Value } select Ask.Set(("T", t), ("J", 1), ("K", k)), Ask.Set(("T", 2), ("J", 0), ("K", 1))],
        "six-vertex" => [Ask.Set(("a", 1), ("b", 1), ("c", 1))],
        "eight-vertex" => [Ask.Set(("a", 1), ("b", 1), ("c", 1), ("d", 0.3))],
        "dimers-square" => [Ask.Set(("x", 1), ("y", 2))],
        "dimers-honeycomb" => [Ask.Set(("x1", 1), ("x2", 1.4), ("x3", 0.7)), Ask.Set(("x1", 1), ("x2", 3), ("x3", 1))],
        "hard-hexagons" => [Ask.Set(("z", 1)), Ask.Set(("z", 20))],
        _ => throw new ArgumentException($"There are no samples for '{name}'."),
    };

    private static double Critical(string name, double q) => Ask.Critical(name, ("T", 1), ("q", q), ("J", 1)).Temperature!.Value;

    private static ParameterSet Triple(string letter, double one, double two, double three)
        => Ask.Set(("T", 2), (letter + "1", one), (letter + "2", two), (letter + "3", three));
}
