using System.Numerics;
using TensorRG.Tensors;
using TensorRG.Tensors.Decompositions;

namespace TensorRG.CoarseGraining.Tests;

/// <summary>Ways to the same number agree: decompositions, gradings, threads, element types, units of weight.</summary>
public sealed class AgreementTests
{
    private const int Steps = 12;

    public static TheoryData<string, int> SchemesAndChi()
    {
        var data = new TheoryData<string, int>();
        foreach (SchemeDefinition scheme in SchemeRegistry.All)
        {
            foreach (int chi in new[] { 8, 10, 12 })
                data.Add(scheme.Name, chi);
        }

        return data;
    }

    [Theory]
    [MemberData(nameof(SchemesAndChi))]
    public void All_ways_to_decompose_agree(string scheme, int chi)
    {
        foreach (bool graded in new[] { true, false })
        {
            Tensor<double> site = Sites.Ising(Sites.CriticalCoupling, graded);
            IReadOnlyList<StepRecord> full = Records(scheme, site, Cut(chi, DecompositionMode.Full));
            Same(full, Records(scheme, site, Cut(chi, DecompositionMode.Auto)), 1e-12);
            Same(full, Records(scheme, site, Cut(chi, DecompositionMode.Iterative)), 1e-12);
        }
    }

    [Theory]
    [MemberData(nameof(SchemeCase.Schemes), MemberType = typeof(SchemeCase))]
    public void Iterated_and_full_decompositions_agree_for_complex_weights_without_symmetry(string scheme)
    {
        Tensor<Complex> site = new RandomSite(31).Positive<Complex>(SiteKind.Oblong);
        Same(
            Records(scheme, site, Cut(9, DecompositionMode.Full)),
            Records(scheme, site, Cut(9, DecompositionMode.Iterative)),
            1e-12);
    }

    [Theory]
    [MemberData(nameof(SchemesAndChi))]
    public void The_grading_changes_no_number(string scheme, int chi)
    {
        foreach (double coupling in new[] { 0.3, Sites.CriticalCoupling, 0.6 })
            Same(Records(scheme, Sites.Ising(coupling), Cut(chi)), Records(scheme, Sites.Ising(coupling, graded: false), Cut(chi)), 1e-12);
    }

    [Theory]
    [MemberData(nameof(SchemeCase.SchemesAndSites), MemberType = typeof(SchemeCase))]
    public void The_grading_changes_no_number_of_a_random_tensor(string scheme, SiteKind kind)
    {
        Tensor<Complex> site = new RandomSite(33).Positive<Complex>(kind);
        SchemeSettings full = Cut(8, DecompositionMode.Full);
        Same(Records(scheme, site, full), Records(scheme, Sites.Ungraded(site), full), 1e-12);
    }

    /// <summary>
    /// Random tensors have no gap at the cut. The iteration stops when values have settled to its tolerance tau, so the
    /// kept subspace is right to sqrt(tau), and what that moves is a share of the weight that the cut discards.
    /// </summary>
    [Theory]
    [MemberData(nameof(SchemeCase.SchemesAndSites), MemberType = typeof(SchemeCase))]
    public void All_ways_to_decompose_agree_far_below_the_truncation_where_the_spectrum_has_no_gap(string scheme, SiteKind kind)
    {
        Tensor<double> site = Sites.Ungraded(new RandomSite(33).Positive<double>(kind));
        IReadOnlyList<StepRecord> full = Records(scheme, site, Cut(8, DecompositionMode.Full));
        double bound = 1e-12 + (Math.Sqrt(new SubspaceOptions().Tolerance) * full.Max(static r => r.DiscardedWeight));
        Same(full, Records(scheme, site, Cut(8, DecompositionMode.Auto)), bound);
        Same(full, Records(scheme, site, Cut(8, DecompositionMode.Iterative)), bound);
    }

    [Theory]
    [MemberData(nameof(SchemeCase.Schemes), MemberType = typeof(SchemeCase))]
    public void Complex_arithmetic_on_real_weights_gives_the_real_numbers(string scheme)
    {
        Tensor<double> site = Sites.Ising(0.4);
        IReadOnlyList<StepRecord> complex = Records(scheme, Sites.ToComplex(site), Cut(8));
        Same(Records(scheme, site, Cut(8)), complex, 1e-12);
        Assert.All(complex, static r => Assert.True(Math.Abs(r.TorusPhase) <= 1e-12));
    }

    [Theory]
    [MemberData(nameof(SchemeCase.Schemes), MemberType = typeof(SchemeCase))]
    public void One_thread_and_two_give_the_same_bits(string scheme)
    {
        foreach (DecompositionMode mode in Enum.GetValues<DecompositionMode>())
        {
            SchemeSettings settings = Cut(12, mode);
            Tensor<double> real = Sites.Ising(Sites.CriticalCoupling);
            SchemeCase.SameSnapshots(
                SchemeCase.Flow(scheme, real, settings, threads: 1).Run(6).Save(),
                SchemeCase.Flow(scheme, real, settings, threads: 2).Run(6).Save());
            Tensor<Complex> complex = new RandomSite(34).Positive<Complex>(SiteKind.Oblong);
            SchemeCase.SameSnapshots(
                SchemeCase.Flow(scheme, complex, settings, threads: 1).Run(6).Save(),
                SchemeCase.Flow(scheme, complex, settings, threads: 2).Run(6).Save());
        }
    }

    [Theory]
    [MemberData(nameof(SchemeCase.Schemes), MemberType = typeof(SchemeCase))]
    public void A_factor_on_the_weights_adds_its_logarithm(string scheme)
    {
        Tensor<double> site = Sites.Ising(0.35);
        IReadOnlyList<StepRecord> plain = Records(scheme, site, Cut(8));
        foreach (double factor in new[] { 3.7, 1e-60, 1e60 })
        {
            IReadOnlyList<StepRecord> scaled = Records(scheme, TensorAlgebra<double>.Scale(site, factor), Cut(8));
            foreach ((StepRecord p, StepRecord s) in plain.Zip(scaled))
            {
                SchemeCase.Near(p.LogZTorusPerSite + Math.Log(factor), s.LogZTorusPerSite, 1e-13, $"ln Z of the torus, step {p.Step}, factor {factor}");
                SchemeCase.Near(p.DegeneracyRatio, s.DegeneracyRatio, 1e-11, $"X, step {p.Step}");
            }
        }
    }

    [Theory]
    [MemberData(nameof(SchemeCase.Schemes), MemberType = typeof(SchemeCase))]
    public void A_prefactor_and_several_sites_a_vertex_are_counted(string scheme)
    {
        Tensor<double> site = Sites.Ising(0.35);
        IReadOnlyList<StepRecord> plain = Records(scheme, site, Cut(8)), counted = SchemeCase.Flow(scheme, site, Cut(8), 3, 1.25).Run(Steps).Records;
        foreach ((StepRecord p, StepRecord c) in plain.Zip(counted))
        {
            Assert.Equal(3 * p.SitesPerTensor, c.SitesPerTensor);
            SchemeCase.Near((p.LogZTorusPerSite + 1.25) / 3, c.LogZTorusPerSite, 1e-14, $"ln Z, step {p.Step}");
        }
    }

    private static SchemeSettings Cut(int chi, DecompositionMode mode = DecompositionMode.Auto)
        => new(new CutRule(chi)) { Decomposition = mode };

    private static IReadOnlyList<StepRecord> Records<T>(string scheme, Tensor<T> site, SchemeSettings settings)
        where T : unmanaged, INumberBase<T>
        => SchemeCase.Flow(scheme, site, settings).Run(Steps).Records;

    private static void Same(IReadOnlyList<StepRecord> expected, IReadOnlyList<StepRecord> actual, double bound)
    {
        foreach ((StepRecord e, StepRecord a) in expected.Zip(actual))
        {
            Assert.Equal(e.VerticalDimension, a.VerticalDimension);
            Assert.Equal(e.HorizontalDimension, a.HorizontalDimension);
            SchemeCase.Near(e.LogZTorusPerSite, a.LogZTorusPerSite, bound, $"ln Z of the torus, step {e.Step}");
            if (!double.IsNaN(e.LogZPerSite))
                SchemeCase.Near(e.LogZPerSite, a.LogZPerSite, bound, $"ln Z per site, step {e.Step}");
        }
    }
}
