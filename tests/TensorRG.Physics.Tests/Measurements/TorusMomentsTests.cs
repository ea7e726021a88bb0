using System.Collections.Immutable;
using System.Numerics;
using TensorRG.CoarseGraining.Moments;
using TensorRG.Physics.Measurements;

namespace TensorRG.Physics.Tests.Measurements;

public sealed class TorusMomentsTests
{
    private static readonly double CriticalTemperature = 2 / Math.Log(1 + Math.Sqrt(2));

    /// <summary>Energy and its variance on square tori of 8, 16 and 32 columns at, below and above the critical temperature (B. Kaufman, Phys. Rev. 76, 1232 (1949)).</summary>
    [Theory]
    [InlineData(2.0)]
    [InlineData(2.269185314213022)]
    [InlineData(2.5)]
    public void Bars_cover_Kaufmans_energies_and_mean_something(double temperature)
    {
        var moments = new TorusMoments(IsingMoments.Run(temperature, 8, 10), IsingMoments.Run(temperature, 12, 10));
        foreach (int step in (int[])[6, 8, 10])
        {
            int length = 1 << (step / 2);
            (double mean, double variance) = IsingMoments.Exact(length, length, temperature);
            Covered(mean, moments.Moment(step, 1, 1), 0.02, $"energy at L = {length}");
            Covered(variance, moments.Fluctuation(step, 1), 0.3, $"energy variance at L = {length}");
        }
    }

    /// <summary>
    /// U4 = 0.610690 of the infinite critical torus (G. Kamieniarz, H. W. J. Bloete, J. Phys. A 26, 201 (1993), from memory). What the finite size of 64 x 64 sites adds is part of the deviation.
    /// </summary>
    [Fact]
    public void The_Binder_ratio_of_the_critical_torus_is_universal()
    {
        var moments = new TorusMoments(IsingMoments.Run(CriticalTemperature, 11, 12), IsingMoments.Run(CriticalTemperature, 16, 12));
        Covered(0.610690, moments.Binder(12, 0), 0.01, "U4");
    }

    /// <summary>m = (1 - sinh(2/T)^-4)^(1/8) (C. N. Yang, Phys. Rev. 85, 808 (1952)): &lt;M^2&gt; / N^2 of a torus far larger than the correlation length is its square, and U4 = 2/3.</summary>
    [Fact]
    public void Large_ordered_tori_show_the_spontaneous_magnetisation()
    {
        var moments = new TorusMoments(IsingMoments.Run(2, 8, 24), IsingMoments.Run(2, 12, 24));
        double m = Math.Pow(1 - Math.Pow(Math.Sinh(1), -4), 0.125);
        Covered(m * m, moments.Moment(24, 0, 2), 1e-3, "m^2");
        SyntheticFlow.Near(2 / 3.0, moments.Binder(24, 0).Value, 1e-6); // Fluctuations take something of the order of 1 / N off.
        SyntheticFlow.Near(0, moments.Moment(24, 0, 1).Value, 0);
    }

    [Fact]
    public void The_bar_is_twice_the_largest_change_of_three_tori_and_round_off()
    {
        MomentRecord[] coarse = [.. ((double[])[0.5, 0.8, 0.60, 0.40]).Select(Record)], fine = [.. ((double[])[0.9, 0.9, 0.63, 0.41]).Select(Record)];
        var moments = new TorusMoments(fine, coarse, fine);
        Estimate last = moments.Moment(3, 0, 1);
        Assert.Equal(0.41, last.Value);
        SyntheticFlow.Near(0.2, last.Parts.Single(static p => p.Name == "truncation").Value, 1e-15);
        Assert.InRange(last.Error - 0.2, 0, 1e-13);
        SyntheticFlow.Near(0.8, moments.Moment(2, 0, 1).Parts[0].Value, 1e-15);
        SyntheticFlow.Near(1 - (0.41 / (3 * 0.41 * 0.41)), moments.Binder(3, 0).Value, 1e-15);
        SyntheticFlow.Near(8 * 0.41, moments.Fluctuation(3, 0).Value, 1e-15);
    }

    [Fact]
    public void One_flow_or_flows_of_different_tori_are_refused()
    {
        MomentRecord record = Record(1, 0);
        Assert.Throws<ArgumentException>(() => new TorusMoments([[record]]));
        Assert.Throws<ArgumentException>(() => new TorusMoments([record], [record with { Sites = 2 }]));
        Assert.Throws<ArgumentException>(() => new TorusMoments([record], [record with { Moments = [] }]));
    }

    /// <summary>A record all of whose moments are one number.</summary>
    private static MomentRecord Record(double value, int step)
    {
        ImmutableArray<ImmutableArray<Complex>> moments = [[value, value, value, value]];
        return new MomentRecord
        {
            Step = step,
            Sites = 1 << step,
            AspectRatio = 1,
            BondDimension = 8,
            LogZTorusPerSite = 0,
            TorusPhase = 0,
            Moments = moments,
            CentralMoments = moments,
            DiscardedWeight = 0,
        };
    }

    private static void Covered(double exact, Estimate estimate, double relative, string what)
    {
        string found = FormattableString.Invariant($"{what}: {estimate.Value:R} +- {estimate.Error:0.0e+00}, exact {exact:R}");
        Assert.True(Math.Abs(estimate.Value - exact) <= estimate.Error, found);
        Assert.True(estimate.Error <= relative * Math.Abs(exact), "bar too wide to mean anything: " + found);
    }
}
