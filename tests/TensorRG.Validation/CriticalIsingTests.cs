using TensorRG.CoarseGraining;

namespace TensorRG.Validation;

/// <summary>
/// ln Z per site of the square Ising model exactly at Tc, ln 2 / 2 + 2 G / pi (L. Onsager, Phys. Rev. 65, 117 (1944); closed formula evaluated
/// to 30 digits). The expected deviations are those of a plain implementation of the published schemes with full
/// decompositions, which scripts/numpy_reference.py repeats.
/// </summary>
public sealed class CriticalIsingTests
{
    private static readonly double Exact = PublishedValues.Of("ising-square-logz-tc");

    [Theory]
    [InlineData("trg", 8, 6.91e-5)]
    [InlineData("trg", 16, 4.63e-6)]
    [InlineData("trg", 24, 1.11e-6)]
    [InlineData("trg", 32, 5.27e-7)]
    [InlineData("hotrg", 8, 1.36e-5)]
    [InlineData("hotrg", 16, 5.62e-7)]
    [InlineData("bond-weighted", 8, 1.06e-5)]
    [InlineData("bond-weighted", 16, 3.30e-7)]
    [InlineData("bond-weighted", 24, 5.60e-8)]
    [InlineData("bond-weighted", 32, 1.407e-8)]
    public void Cut_anywhere_reaches_the_accuracy_of_the_published_scheme(string scheme, int bondDimension, double expected)
    {
        double deviation = Computation.RelativeDeviation(Computation.Run(scheme, bondDimension, 50, anywhere: true), Exact);
        Assert.True(Math.Abs(deviation - expected) <= 0.01 * expected, $"{deviation:e3} instead of {expected:e3}");
    }

    [Theory]
    [InlineData("trg", 16, 2 * 4.9e-6)]
    [InlineData("hotrg", 16, 2 * 6e-7)]
    [InlineData("bond-weighted", 32, 2 * 1.5e-8)]
    public void The_default_cut_is_no_worse_than_twice_that(string scheme, int bondDimension, double bound)
        => Assert.True(Computation.RelativeDeviation(Computation.Run(scheme, bondDimension, 50), Exact) <= bound);

    [Theory]
    [InlineData(true, 8e-10)]
    [InlineData(false, 1.6e-9)]
    public void Bond_weighted_at_64_reaches_its_bound(bool anywhere, double bound)
        => Assert.True(Computation.RelativeDeviation(Computation.Run("bond-weighted", 64, 50, anywhere: anywhere), Exact) <= bound);

    [Theory]
    [InlineData("trg", 16)]
    [InlineData("hotrg", 12)]
    [InlineData("bond-weighted", 16)]
    [InlineData("bond-weighted", 24)]
    public void Grading_changes_nothing(string scheme, int bondDimension)
    {
        double with = Computation.Run(scheme, bondDimension, 44)[^1].LogZPerSite;
        double without = Computation.Run(scheme, bondDimension, 44, graded: false)[^1].LogZPerSite;
        Assert.True(Math.Abs(with - without) <= 1e-12, $"they differ by {with - without:e2}");
    }

    [Theory]
    [InlineData("trg", 16)]
    [InlineData("bond-weighted", 16)]
    public void Iterating_on_rings_gives_what_full_decompositions_give(string scheme, int bondDimension)
    {
        double full = Computation.Run(scheme, bondDimension, 44, mode: DecompositionMode.Full)[^1].LogZPerSite;
        double ring = Computation.Run(scheme, bondDimension, 44, mode: DecompositionMode.Iterative)[^1].LogZPerSite;
        Assert.True(Math.Abs(full - ring) <= 1e-12, $"they differ by {full - ring:e2}");
    }
}
