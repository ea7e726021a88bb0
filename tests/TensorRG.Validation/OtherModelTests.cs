namespace TensorRG.Validation;

/// <summary>
/// Models of central charge 4/5 and 1 at their critical points. Square ice and 4-state Potts have c = 1: the length that a bond dimension
/// resolves grows as chi^1.34 instead of chi^2.03, so the same bond dimension gives four digits where Ising gives eight.
/// </summary>
public sealed class OtherModelTests
{
    /// <summary>R. J. Baxter, J. Phys. C 6, L445 (1973); closed formula evaluated to 30 digits.</summary>
    [Theory]
    [InlineData("potts", 16, "potts3-logz-tc", 1.8e-5)]
    [InlineData("potts", 24, "potts3-logz-tc", 5.2e-6)]
    [InlineData("potts", 32, "potts3-logz-tc", 3e-6)]
    public void Three_state_Potts_at_Tc(string model, int bondDimension, string row, double bound)
    {
        double deviation = Computation.RelativeDeviation(
            Computation.Run("bond-weighted", bondDimension, 40, model, [("q", 3)], anywhere: true), PublishedValues.Of(row));
        Assert.True(deviation <= bound, $"{deviation:e2}");
    }

    /// <summary>E. H. Lieb, Phys. Rev. Lett. 18, 692 (1967): (3/2) ln(4/3); closed formula.</summary>
    [Theory]
    [InlineData(16, 2.2e-4)]
    [InlineData(24, 7.8e-5)]
    [InlineData(32, 5e-5)]
    public void Square_ice(int bondDimension, double bound)
    {
        double deviation = Computation.RelativeDeviation(
            Computation.Run("bond-weighted", bondDimension, 40, "six-vertex", anywhere: true), PublishedValues.Of("ice-square"));
        Assert.True(deviation <= bound, $"{deviation:e2}");
    }
}
