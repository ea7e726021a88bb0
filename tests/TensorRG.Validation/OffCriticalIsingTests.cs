namespace TensorRG.Validation;

/// <summary>Square Ising away from Tc against Onsager's solution (Phys. Rev. 65, 117 (1944); closed formula evaluated to 30 digits).</summary>
public sealed class OffCriticalIsingTests
{
    [Theory]
    [InlineData(1.5, "ising-square-logz-T1.5", 1e-12)]
    [InlineData(2.0, "ising-square-logz-T2.0", 1e-10)]
    [InlineData(2.5, "ising-square-logz-T2.5", 3e-10)]
    public void Bond_weighted_at_32_reaches_its_bound(double temperature, string row, double bound)
    {
        double deviation = Computation.RelativeDeviation(
            Computation.Run("bond-weighted", 32, 44, parameters: [("temperature", temperature)]), PublishedValues.Of(row));
        Assert.True(deviation <= bound, $"{deviation:e2}");
    }

    /// <summary>
    /// The degeneracy ratio settles at the number of phases within 22 doublings of the lattice scale (common practice, no source: the way
    /// from the atom to the everyday object).
    /// </summary>
    [Theory]
    [InlineData("trg", 0.9, 2)]
    [InlineData("trg", 1.1, 1)]
    [InlineData("hotrg", 0.9, 2)]
    [InlineData("hotrg", 1.1, 1)]
    [InlineData("bond-weighted", 0.9, 2)]
    [InlineData("bond-weighted", 1.1, 1)]
    public void The_degeneracy_ratio_counts_the_phases(string scheme, double reduced, int phases)
    {
        double temperature = reduced * PublishedValues.Of("ising-square-tc");
        Physics.PhaseReading reading = Physics.PhaseReading.Of(Computation.Run(scheme, 12, 44, parameters: [("temperature", temperature)]));
        Assert.Equal(phases, reading.Phases);
        Assert.True(reading.SettledAt <= Math.Pow(2, 22));
    }

    [Theory]
    [InlineData(3, 0.9, 3)]
    [InlineData(3, 1.1, 1)]
    [InlineData(4, 0.9, 4)]
    [InlineData(5, 0.9, 5)]
    [InlineData(5, 1.1, 1)]
    public void Potts_orders_in_q_phases(int states, double reduced, int phases)
    {
        double temperature = reduced * PublishedValues.Of($"potts{states}-tc");
        Physics.PhaseReading reading = Physics.PhaseReading.Of(
            Computation.Run("bond-weighted", 20, 44, "potts", [("q", states), ("temperature", temperature)]));
        Assert.Equal(phases, reading.Phases);
    }
}
