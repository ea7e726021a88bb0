using TensorRG.Models.Solutions;
using TensorRG.Models.Tests.Literature;

namespace TensorRG.Models.Tests;

/// <summary>Finite Ising tori.</summary>
public class KaufmanTests
{
    private static double Critical => IsingSolution.CriticalTemperature(1, 1).Value;

    [Theory]
    [InlineData(1, 1)]
    [InlineData(1, 2)]
    [InlineData(2, 1)]
    [InlineData(2, 2)]
    [InlineData(3, 2)]
    [InlineData(2, 3)]
    [InlineData(3, 3)]
    [InlineData(4, 3)]
    [InlineData(5, 2)]
    [InlineData(4, 4)]
    public void Small_tori_agree_with_the_sum_over_configurations(int lx, int ly)
    {
        foreach (double t in new[] { 0.02, 0.5, 1.7, Critical, 2.5, 40.0 })
        {
            foreach ((double jx, double jy) in new[] { (1.0, 1.0), (1.3, 0.4), (0.0, 1.0), (1.0, 0.0), (0.0, 0.0), (-0.8, 1.0), (1.0, -0.7), (-1.0, -1.0) })
            {
                if ((jx < 0 && lx % 2 == 1) || (jy < 0 && ly % 2 == 1))
                    continue;
                ParameterSet p = ModelCatalogue.Find("ising").CreateParameters([new("T", t), new("Jx", jx), new("Jy", jy)]);
                double expected = Configurations.Sum(p, lx, ly).LogZ / (lx * ly);
                Near.Check(expected, Kaufman.LogZPerSite(lx, ly, t, jx, jy), 2e-15, FormattableString.Invariant($"{lx}x{ly} T={t} Jx={jx} Jy={jy}"));
            }
        }
    }

    // B. Kaufman, Phys. Rev. 76, 1232 (1949): rows of reference-values.json.
    [Theory]
    [InlineData(8)]
    [InlineData(16)]
    [InlineData(32)]
    [InlineData(64)]
    [InlineData(256)]
    [InlineData(1024)]
    public void Large_tori_agree_with_the_table(int length)
        => Near.Check(ReferenceValues.Get($"ising-torus-{length}"), Kaufman.LogZPerSite(length, length, Critical), 2e-15, $"L = {length}");

    [Fact]
    public void The_four_by_four_torus_is_a_whole_number()
        => Near.Scaled(ReferenceValues.Get("ising-torus-4x4"), Math.Exp(16 * Kaufman.LogZPerSite(4, 4, Critical)), 5509120, 1e-14, "Z");

    [Theory]
    [InlineData(1.0)]
    [InlineData(3.5)]
    public void Off_criticality_large_tori_reach_the_infinite_lattice(double t)
    {
        int length = 256;
        double degeneracy = t < Critical ? Math.Log(2) / (length * (double)length) : 0;
        Near.Check(IsingSolution.At(t, 1, 1).LogZPerSite + degeneracy, Kaufman.LogZPerSite(length, length, t), 2e-15, "ln Z");
    }

    [Theory]
    [InlineData(12, 7, 2.1)]
    [InlineData(30, 31, Math.PI)]
    public void Rows_and_columns_may_be_exchanged(int lx, int ly, double t)
        => Near.Check(Kaufman.LogZPerSite(lx, ly, t, 1.2, 0.8), Kaufman.LogZPerSite(ly, lx, t, 0.8, 1.2), 2e-15, "exchange");

    [Fact]
    public void Frustrated_and_empty_tori_are_refused()
    {
        Assert.Contains("even length", Assert.Throws<ModelException>(() => Kaufman.LogZPerSite(3, 4, 1, -1, 1)).Message, StringComparison.Ordinal);
        Assert.Throws<ArgumentOutOfRangeException>(() => Kaufman.LogZPerSite(0, 4, 1));
        Assert.Throws<ArgumentOutOfRangeException>(() => Kaufman.LogZPerSite(4, 4, double.NaN));
    }
}
