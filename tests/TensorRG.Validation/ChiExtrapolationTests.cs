using TensorRG.CoarseGraining;
using TensorRG.Models;
using TensorRG.Physics;

namespace TensorRG.Validation;

/// <summary>The limit of a bond-dimension sequence against exact values (Onsager 1944, Baxter 1973, Lieb 1967).</summary>
public sealed class ChiExtrapolationTests
{
    [Theory]
    [InlineData("bond-weighted", "ising", 0)]
    [InlineData("bond-weighted", "ising", 2.0)]
    [InlineData("bond-weighted", "ising", 2.35)]
    [InlineData("bond-weighted", "potts", 0)]
    [InlineData("bond-weighted", "six-vertex", 0)]
    [InlineData("trg", "ising", 0)]
    [InlineData("trg", "ising", 2.5)]
    public void Its_bar_covers_and_it_does_not_lose_accuracy(string name, string model, double temperature)
    {
        (string, double)[] parameters = temperature > 0 ? [("temperature", temperature)] : [];
        ParameterSet set = Computation.Parameters(model, parameters);
        SchemeDefinition scheme = SchemeRegistry.Find(name)!;
        FlowSummary[] summaries = [.. new[] { 8, 12, 16, 20, 24 }.Select(chi => FlowSummary.Of(set, scheme, Computation.Run(name, chi, 40, model, parameters)))];
        ChiPoint[] points = [.. summaries.Select(static (s, i) => new ChiPoint(8 + (4 * i), s.LogZPerSite, s.Measure))];
        ChiExtrapolation limit = ChiExtrapolation.Of(points);
        double exact = summaries[0].Exact!.Value, error = Math.Abs(limit.Value.Value - exact);
        Assert.True(error <= limit.Value.Error, $"error {error:e2}, bar {limit.Value.Error:e2}: {limit.Verdict}");
        Assert.True(error <= Math.Abs(points[^1].Value.Value - exact) * 1.0001, $"error {error:e2}, last member {Math.Abs(points[^1].Value.Value - exact):e2}");
    }
}
