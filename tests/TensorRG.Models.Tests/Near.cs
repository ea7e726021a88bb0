using System.Globalization;

namespace TensorRG.Models.Tests;

/// <summary>Comparisons that fail on NaN and say what was compared.</summary>
internal static class Near
{
    /// <summary>|actual - expected| / max(1, |expected|) must not exceed the bound.</summary>
    public static void Check(double expected, double actual, double bound, string what)
        => Scaled(expected, actual, Math.Max(1, Math.Abs(expected)), bound, what);

    /// <summary>|actual - expected| / scale must not exceed the bound.</summary>
    public static void Scaled(double expected, double actual, double scale, double bound, string what)
    {
        double error = expected == actual ? 0 : Math.Abs(actual - expected) / scale;
        Assert.True(error <= bound, string.Create(CultureInfo.InvariantCulture, $"{what}: expected {expected:R}, got {actual:R}, error {error:E2} > {bound:E2}"));
    }
}
