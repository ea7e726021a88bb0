using System.Globalization;

namespace TensorRG.Tensors.Tests.Graded;

public sealed class RandomSequenceTests
{
    /// <summary>
    /// The promise of identical bits: these values must never change. They come from an independent implementation of
    /// SplitMix64 with the documented seeding (in Python, integers of arbitrary size), not from the code under test.
    /// </summary>
    [Theory]
    [InlineData(1, new int[0], "-0.4566049117231413 1.5365515685562778 -1.575275968610493 0.9610696774057051")]
    [InlineData(-5, new[] { 3, 1 }, "-0.7188104090211961 0.18957097775151244 -1.1353007330375064 -0.6094107314682787")]
    [InlineData(long.MaxValue, new[] { -1 }, "1.3573779035433033 0.11684510407037026 -0.48635189620756575 -0.2546589812836002")]
    public void The_first_values_are_fixed_for_ever(long seed, int[] purpose, string expected)
    {
        var random = new RandomSequence(seed, purpose);
        string[] values = [.. Enumerable.Range(0, 4).Select(_ => random.NextUnit().ToString("R", CultureInfo.InvariantCulture))];
        Assert.Equal(expected, string.Join(' ', values));
    }

    [Fact]
    public void Moments_are_those_of_the_uniform_distribution_of_variance_one()
    {
        const int Count = 200_000;
        var random = new RandomSequence(20);
        double[] x = [.. Enumerable.Range(0, Count).Select(_ => random.NextUnit())];
        Assert.All(x, static v => Assert.InRange(v, -Math.Sqrt(3), Math.Sqrt(3)));

        // Five standard errors: var(x) = 1, var(x^2) = 9/5 - 1, var(x^3) = 27/7, var(x^4) = 9 - 81/25, var(x y) = 1.
        Near(0, x.Average(), 1);
        Near(1, x.Average(static v => v * v), 0.8);
        Near(0, x.Average(static v => v * v * v), 27.0 / 7);
        Near(1.8, x.Average(static v => v * v * v * v), 9 - 3.24);
        Near(0, x.Zip(x.Skip(1), static (a, b) => a * b).Average(), 1);

        static void Near(double expected, double actual, double variance)
            => Assert.True(Math.Abs(actual - expected) <= 5 * Math.Sqrt(variance / Count), string.Create(CultureInfo.InvariantCulture, $"{actual:R} instead of {expected:R}"));
    }

    [Fact]
    public void Seeds_and_purposes_set_streams_apart()
    {
        double[] first =
        [
            new RandomSequence(1).NextUnit(), new RandomSequence(2).NextUnit(), new RandomSequence(1, 0).NextUnit(), new RandomSequence(1, 1).NextUnit(),
            new RandomSequence(1, 1, 2).NextUnit(), new RandomSequence(1, 2, 1).NextUnit(), new RandomSequence(-1).NextUnit(),
        ];
        Assert.Equal(first.Length, first.Distinct().Count());
    }
}
