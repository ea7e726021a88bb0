using System.Numerics;
using TensorRG.CoarseGraining.Moments;
using TensorRG.Tensors;

namespace TensorRG.CoarseGraining.Tests.Moments;

/// <summary>What a flow of moments promises with truncation and on tori of any size.</summary>
public sealed class MomentFlowTests
{
    private const double Coupling = 0.5;

    [Fact]
    public void The_bits_do_not_depend_on_the_number_of_threads()
    {
        MomentRecord[][] runs = [.. ((int[])[1, 2, 3]).Select(threads => MomentCase.Run(
            Sites.Ising(Coupling), [MomentCase.Spin(Coupling, true), MomentCase.Energy(Coupling, true)], 10, 9, threads).Records.ToArray())];
        foreach (MomentRecord[] run in runs[1..])
            Assert.Equal(runs[0].SelectMany(Bits), run.SelectMany(Bits));
    }

    [Fact]
    public void Grading_changes_nothing_but_the_work()
    {
        MomentRecord[] runs = [.. ((bool[])[true, false]).Select(graded => MomentCase.Run(
            Sites.Ising(0.4, graded), [MomentCase.Spin(0.4, graded), MomentCase.Energy(0.4, graded)], 10, 8).Records[^1])];
        for (int o = 0; o < 2; o++)
        {
            foreach ((Complex x, Complex y) in runs[0].Moments[o].Zip(runs[1].Moments[o]))
                SchemeCase.Near(x, y, 1, 1e-11, $"observable {o}");
        }
    }

    /// <summary>O = 2 per site leaves nothing to follow: its moments are powers of 2, and the flow is HOTRG to the bit.</summary>
    [Fact]
    public void A_constant_has_no_fluctuations_and_leaves_the_flow_of_the_scheme()
    {
        Tensor<double> site = new RandomSite(5).Positive<double>(SiteKind.Parity);
        Tensor<double>[] constant = [.. ((double[])[2, 4, 8, 16]).Select(c => TensorAlgebra<double>.Scale(site, c))];
        MomentFlow<double> flow = MomentCase.Run(site, [constant], 6, 10);
        Flow<double> plain = SchemeCase.Flow("hotrg", site, new SchemeSettings(new(6))).Run(10);
        foreach ((MomentRecord moments, StepRecord step) in flow.Records.Zip(plain.Records))
        {
            Assert.Equal(step.LogZTorusPerSite, moments.LogZTorusPerSite);
            Assert.Equal(step.DiscardedWeight, moments.DiscardedWeight);
            for (int n = 1; n <= 4; n++)
                SchemeCase.Near(Math.Pow(2, n), moments.Moments[0][n - 1].Real, 1e-13, $"power {n}");
            Assert.All(moments.CentralMoments[0], static m => Assert.True(m.Magnitude < 1e-15));
        }
    }

    /// <summary>
    /// A trillion sites at T = 2: &lt;M^2&gt; / N^2 and &lt;M^4&gt; / N^4 are powers of the spontaneous magnetisation (1 - sinh(2K)^-4)^(1/8) (C. N. Yang, Phys. Rev.
    /// 85, 808 (1952)), and the variance of the energy, 12 decimal places below its square, is T^2 times the specific heat (L. Onsager, Phys. Rev. 65, 117 (1944); 0.7248744
    /// from the derivative of its closed form).
    /// </summary>
    [Fact]
    public void Sums_over_a_trillion_sites_keep_their_digits()
    {
        MomentRecord last = MomentCase.Run(Sites.Ising(Coupling), [MomentCase.Spin(Coupling, true), MomentCase.Energy(Coupling, true)], 12, 40).Records[^1];
        Assert.Equal(Math.Pow(2, 40), last.Sites);
        double m = Math.Pow(1 - Math.Pow(Math.Sinh(2 * Coupling), -4), 0.125);
        SchemeCase.Near(m * m, last.Moments[0][1].Real, 1e-4, "m^2");
        SchemeCase.Near(Math.Pow(m, 4), last.Moments[0][3].Real, 2e-4, "m^4");
        SchemeCase.Near(0.7248744 * 4, last.CentralMoments[1][1].Real * last.Sites, 5e-3, "energy variance");
        double gauss = last.CentralMoments[1][3].Real / Math.Pow(last.CentralMoments[1][1].Real, 2);
        SchemeCase.Near(3, gauss, 1e-6, "fourth over squared second moment of many independent parts");
    }

    /// <summary>No dimer covers a single vertex: Z = 0 has no moments, larger tori do.</summary>
    [Fact]
    public void A_torus_with_Z_of_zero_has_no_moments_and_does_not_stop_the_flow()
    {
        Leg two = Leg.Plain(2, Arrow.In);
        Tensor<double> dimers = Tensor<double>.FromFunction([two, two, two.Dual, two.Dual], static p => p.Span[0] + p.Span[1] + p.Span[2] + p.Span[3] == 1 ? 1 : 0);
        Tensor<double> horizontal = Tensor<double>.FromFunction(dimers.Legs, p => p.Span[3] == 1 ? dimers.At(p.Span) : 0);
        MomentFlow<double> flow = MomentCase.Run(dimers, [[horizontal, horizontal]], 300, 4);
        Assert.True(double.IsNaN(flow.Records[0].Moments[0][0].Real));
        Assert.Equal(double.NegativeInfinity, flow.Records[0].LogZTorusPerSite);

        // Half of the 16 / 2 dimers of a 4 x 4 torus lie flat.
        SchemeCase.Near(0.25, flow.Records[4].Moments[0][0].Real, 1e-13, "flat dimers per site");
    }

    [Fact]
    public void Insertions_that_do_not_fit_are_refused()
    {
        Tensor<double> site = Sites.Ising(Coupling);
        Tensor<double>[] spin = MomentCase.Spin(Coupling, graded: true);
        Refused(site, [], "1 to 4");
        Refused(site, [.. spin, spin[0]], "1 to 4");
        Refused(site, MomentCase.Spin(Coupling, graded: false), "legs");
        Refused(site, [spin[0], spin[0]], "2 times the flux");
    }

    private static void Refused(Tensor<double> site, Tensor<double>[] insertions, string message)
        => Assert.Contains(message, Assert.Throws<ArgumentException>(() => MomentCase.Run(site, [insertions], 4, 0)).Message, StringComparison.Ordinal);

    private static IEnumerable<long> Bits(MomentRecord record)
        => ((double[])[record.LogZTorusPerSite, record.TorusPhase, record.DiscardedWeight,
            .. record.Moments.Concat(record.CentralMoments).SelectMany(static m => m).SelectMany(static z => (double[])[z.Real, z.Imaginary])])
            .Select(BitConverter.DoubleToInt64Bits);
}
