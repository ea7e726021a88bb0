using TensorRG.CoarseGraining;
using TensorRG.Models;
using TensorRG.Physics;

namespace TensorRG.Validation;

/// <summary>
/// Coverage and sharpness of the error bar of a single run over exactly solved points (Onsager 1944, Baxter 1973, Lieb 1967). Common practice, no
/// source: a bar should cover 95 times in 100.
/// </summary>
public sealed class ErrorBarTests
{
    private static readonly double[] Temperatures = [1.6, 1.9, 2.1, 2.2, 2.25, 2.269185314213022, 2.29, 2.35, 2.5, 2.8, 3.2];

    [Theory]
    [InlineData("trg")]
    [InlineData("hotrg")]
    [InlineData("bond-weighted")]
    public void Bars_cover_and_are_not_much_too_wide(string name)
    {
        SchemeDefinition scheme = SchemeRegistry.Find(name)!;
        var sharpness = new List<double>();
        foreach (int bondDimension in (int[])[6, 8, 11, 14])
        {
            sharpness.AddRange(Temperatures.Select(t => Sharpness(scheme, bondDimension, "ising", [("temperature", t)])));
            sharpness.Add(Sharpness(scheme, bondDimension, "potts", [("q", 3)]));
            sharpness.Add(Sharpness(scheme, bondDimension, "six-vertex", []));
        }

        double covered = sharpness.Count(static s => s >= 1) / (double)sharpness.Count;
        double median = sharpness.Order().ElementAt(sharpness.Count / 2);
        Assert.True(covered >= 0.95, $"coverage {covered:p0}; too small: {string.Join(", ", sharpness.Where(static s => !(s >= 1)).Select(static s => s.ToString("g2")))}");
        Assert.True(median <= 10, $"median bar over error {median:g3}");
    }

    /// <summary>Bar over true error.</summary>
    private static double Sharpness(SchemeDefinition scheme, int bondDimension, string model, (string, double)[] parameters)
    {
        ParameterSet set = Computation.Parameters(model, parameters);
        FlowSummary summary = FlowSummary.Of(set, scheme, Computation.Run(scheme.Name, bondDimension, 36, model, parameters));
        return (summary.LogZPerSite.Error + summary.Exact!.Uncertainty) / Math.Abs(summary.LogZPerSite.Value - summary.Exact.Value);
    }
}
