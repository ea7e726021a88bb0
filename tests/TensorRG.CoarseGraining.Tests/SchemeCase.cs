using System.Globalization;
using System.Numerics;
using TensorRG.Tensors;
using TensorRG.Tensors.Decompositions;
using TensorRG.Tensors.Kernels;

namespace TensorRG.CoarseGraining.Tests;

/// <summary>Flows and comparisons that the contract tests share.</summary>
internal static class SchemeCase
{
    /// <summary>More states than any untruncated bond of the small tori here.</summary>
    public static readonly SchemeSettings Uncut = new(new CutRule(300));

    /// <summary>One row a registered scheme and site kind.</summary>
    public static TheoryData<string, SiteKind> SchemesAndSites()
    {
        var data = new TheoryData<string, SiteKind>();
        foreach (SchemeDefinition scheme in SchemeRegistry.All)
        {
            foreach (SiteKind kind in Enum.GetValues<SiteKind>())
                data.Add(scheme.Name, kind);
        }

        return data;
    }

    /// <summary>One row a registered scheme.</summary>
    public static TheoryData<string> Schemes() => new(SchemeRegistry.All.Select(static s => s.Name));

    public static Flow<T> Flow<T>(string scheme, Tensor<T> site, SchemeSettings settings, double sitesPerTensor = 1, double logPrefactor = 0, int threads = 1)
        where T : unmanaged, INumberBase<T>
    {
        var algebra = new TensorAlgebra<T>(Backends.Create(Backends.Default, threads));
        return new Flow<T>(SchemeRegistry.Find(scheme)!.Create(algebra, settings), new InitialNetwork<T>(site, sitesPerTensor, logPrefactor));
    }

    /// <summary>The flow advanced by some steps.</summary>
    public static Flow<T> Run<T>(this Flow<T> flow, int steps)
        where T : unmanaged, INumberBase<T>
    {
        for (int i = 0; i < steps; i++)
            flow.Advance();
        return flow;
    }

    /// <summary>Z of the torus of one tensor at the record.</summary>
    public static Complex TorusZ(StepRecord record)
        => Complex.FromPolarCoordinates(Math.Exp(record.LogZTorusPerSite * record.SitesPerTensor), record.TorusPhase);

    public static void Near(double expected, double actual, double bound, string what)
    {
        double error = expected == actual ? 0 : Math.Abs(actual - expected) / Math.Max(1, Math.Abs(expected));
        Assert.True(error <= bound, string.Create(CultureInfo.InvariantCulture, $"{what}: expected {expected:R}, got {actual:R}, error {error:E2} > {bound:E2}"));
    }

    /// <summary>Relative to the scale of the sum of magnitudes.</summary>
    public static void Near(Complex expected, Complex actual, double scale, double bound, string what)
    {
        double error = (actual - expected).Magnitude / scale;
        Assert.True(error <= bound, string.Create(CultureInfo.InvariantCulture, $"{what}: expected {expected:R}, got {actual:R}, error {error:E2} > {bound:E2}"));
    }

    /// <summary>All but the wall-clock time, bit by bit.</summary>
    public static void SameRecords(IReadOnlyList<StepRecord> expected, IReadOnlyList<StepRecord> actual)
    {
        Assert.Equal(expected.Count, actual.Count);
        foreach ((StepRecord e, StepRecord a) in expected.Zip(actual))
        {
            Assert.Equal(e.Step, a.Step);
            Assert.Equal(Bits(e), Bits(a));
            Assert.Equal(e.VerticalBond.ToArray(), a.VerticalBond.ToArray());
            Assert.Equal(e.HorizontalBond.ToArray(), a.HorizontalBond.ToArray());
            Assert.Equal(e.Spectrum.ToArray(), a.Spectrum.ToArray());
            Assert.Equal(e.Notices.ToArray(), a.Notices.ToArray());
        }
    }

    public static void SameSnapshots(Snapshot expected, Snapshot actual)
    {
        Assert.Equal(expected.Step, actual.Step);
        Assert.Equal(expected.Numbers.Keys, actual.Numbers.Keys);
        foreach (string name in expected.Numbers.Keys)
            Assert.Equal(expected.Numbers[name].Select(BitConverter.DoubleToInt64Bits), actual.Numbers[name].Select(BitConverter.DoubleToInt64Bits));
        Assert.Equal(expected.Integers.Keys, actual.Integers.Keys);
        foreach (string name in expected.Integers.Keys)
            Assert.Equal(expected.Integers[name], actual.Integers[name]);
        Assert.Equal(expected.Texts, actual.Texts);
    }

    private static long[] Bits(StepRecord r) => Array.ConvertAll(
        [r.LengthScale, r.AspectRatio, r.SitesPerTensor, r.DiscardedWeight, r.LogZTorusPerSite, r.TorusPhase, r.LogZPerSite, r.DegeneracyRatio],
        BitConverter.DoubleToInt64Bits);
}
