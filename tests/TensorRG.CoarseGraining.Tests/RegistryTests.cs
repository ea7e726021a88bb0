using System.Text.RegularExpressions;
using TensorRG.Tensors.Decompositions;

namespace TensorRG.CoarseGraining.Tests;

/// <summary>What every scheme declares about itself.</summary>
public sealed partial class RegistryTests
{
    [Fact]
    public void Names_are_unique_and_found()
    {
        string[] names = [.. SchemeRegistry.All.Select(static s => s.Name)];
        Assert.NotEmpty(names);
        Assert.Equal(names.Length, names.Distinct(StringComparer.OrdinalIgnoreCase).Count());
        Assert.All(SchemeRegistry.All, static s => Assert.Same(s, SchemeRegistry.Find(s.Name)));
        Assert.Null(SchemeRegistry.Find("no such scheme"));
        Assert.Contains(SchemeRegistry.Default, SchemeRegistry.All);
    }

    [Fact]
    public void Every_scheme_says_what_it_does_where_it_comes_from_and_what_it_costs()
        => Assert.All(SchemeRegistry.All, static s =>
        {
            Assert.Matches("^[a-z][a-z0-9-]*$", s.Name);
            Assert.False(string.IsNullOrWhiteSpace(s.Summary));
            Assert.DoesNotContain('\n', s.Summary);
            Assert.Matches(YearInBrackets(), s.Source);
            Assert.InRange(s.CostExponent, 4, 12);
            Assert.Contains(s.TruncationLaw.Power, new double[] { 1, 2 });
            Assert.InRange(s.TruncationLaw.Factor, 0.01, 100);
            Assert.InRange(s.TruncationLaw.AmplitudeFactor, 0, 1);
        });

    [Theory]
    [MemberData(nameof(SchemeCase.Schemes), MemberType = typeof(SchemeCase))]
    public void Exactly_the_declared_schemes_read_the_bond_exponent(string name)
    {
        double At(double exponent) => SchemeCase.Flow(name, Sites.Ising(0.42), new SchemeSettings(new CutRule(4)) { BondExponent = exponent })
            .Run(8).Records[^1].LogZTorusPerSite;
        Assert.Equal(SchemeRegistry.Find(name)!.UsesBondExponent, At(-0.5) != At(0.25));
    }

    /// <summary>D = sum over steps n >= 1 of w_n^Power / 2^(n-1).</summary>
    [Theory]
    [InlineData(1, (0.5 / 1) + (0.25 / 2) + (0.125 / 4))]
    [InlineData(2, (0.25 / 1) + (0.0625 / 2) + (0.015625 / 4))]
    public void The_measure_sums_the_discarded_weights_per_vertex(double power, double expected)
    {
        StepRecord first = SchemeCase.Flow(SchemeRegistry.Default.Name, Sites.Ising(0.3), new SchemeSettings(new CutRule(4))).Records[0];
        StepRecord[] records = [.. Enumerable.Range(0, 4).Select(n => first with { Step = n, DiscardedWeight = Math.Pow(2, -n) })];
        SchemeCase.Near(expected, new TruncationLaw(power, 1, 0).Measure(records), 1e-15, "D");
        Assert.Equal(0, new TruncationLaw(power, 1, 1).Bar([first]));
        double amplitudes = Math.Sqrt(0.5) + (0.5 / 2) + (Math.Sqrt(0.125) / 4);
        SchemeCase.Near((3 * expected) + (7 * amplitudes), new TruncationLaw(power, 3, 7).Bar(records), 1e-15, "bar");
    }

    [GeneratedRegex(@"\((19|20)\d\d\)")]
    private static partial Regex YearInBrackets();
}
