using System.Numerics;
using TensorRG.Tensors;
using TensorRG.Tensors.Kernels;

namespace TensorRG.CoarseGraining.Tests;

/// <summary>
/// Every registered scheme, without truncation, on small tori against an explicit sum. Site tensors are general: no
/// reflection symmetry, different bonds in the two directions, any grading.
/// </summary>
public sealed class ExactTorusTests
{
    private const int Seeds = 2;

    [Theory]
    [MemberData(nameof(SchemeCase.SchemesAndSites), MemberType = typeof(SchemeCase))]
    public void Positive_weights_give_the_exact_Z(string scheme, SiteKind kind)
    {
        for (int seed = 0; seed < Seeds; seed++)
        {
            Check(scheme, new RandomSite(seed).Positive<double>(kind), 1e-12);
            Check(scheme, new RandomSite(seed).Positive<Complex>(kind), 1e-12);
        }
    }

    /// <summary>Z may cancel by orders of magnitude; the error is relative to the sum of magnitudes.</summary>
    [Theory]
    [MemberData(nameof(SchemeCase.SchemesAndSites), MemberType = typeof(SchemeCase))]
    public void Weights_of_any_sign_or_phase_give_the_exact_Z_and_its_phase(string scheme, SiteKind kind)
    {
        for (int seed = 10; seed < 10 + Seeds; seed++)
        {
            Check(scheme, new RandomSite(seed).Signed<double>(kind), 1e-12);
            Check(scheme, new RandomSite(seed).Signed<Complex>(kind), 1e-12);
        }
    }

    [Theory]
    [MemberData(nameof(SchemeCase.Schemes), MemberType = typeof(SchemeCase))]
    public void A_negative_site_has_phase_pi_on_a_torus_of_an_odd_number_of_vertices(string scheme)
    {
        Tensor<double> site = TensorAlgebra<double>.Scale(new RandomSite(3).Positive<double>(SiteKind.Parity), -1);
        StepRecord first = SchemeCase.Flow(scheme, site, SchemeCase.Uncut).Records[0];
        Assert.Equal(Math.PI, first.TorusPhase);
        StepRecord second = SchemeCase.Flow(scheme, site, SchemeCase.Uncut).Run(1).Records[1];
        Assert.Equal(0, second.TorusPhase);
        Tensor<Complex> complex = Sites.ToComplex(site);
        SchemeCase.Near(Math.PI, Math.Abs(SchemeCase.Flow(scheme, complex, SchemeCase.Uncut).Records[0].TorusPhase), 1e-14, "phase");
    }

    [Theory]
    [MemberData(nameof(SchemeCase.SchemesAndSites), MemberType = typeof(SchemeCase))]
    public void A_change_of_basis_on_the_bonds_leaves_Z_unchanged(string scheme, SiteKind kind)
    {
        var random = new RandomSite(21);
        var algebra = new TensorAlgebra<Complex>(Backends.Create(Backends.Default, 1));
        Tensor<Complex> site = random.Positive<Complex>(kind);
        (Tensor<Complex> x, Tensor<Complex> inverseX) = random.Gauge(algebra, site.Legs[0]);
        (Tensor<Complex> y, Tensor<Complex> inverseY) = random.Gauge(algebra, site.Legs[1]);
        Tensor<Complex> up = algebra.Contract(x, [1], site, [0]);
        Tensor<Complex> left = algebra.Contract(y, [1], up, [1]);
        Tensor<Complex> down = algebra.Contract(left, [2], inverseX, [0]);
        Tensor<Complex> right = algebra.Contract(down, [2], inverseY, [0]);
        Tensor<Complex> changed = right.Permute(1, 0, 2, 3);
        Assert.True(TensorAlgebra<Complex>.Norm(TensorAlgebra<Complex>.Add(site, changed, -1)) >= 0.05, "the change of basis changes something");
        IReadOnlyList<StepRecord> before = SchemeCase.Flow(scheme, site, SchemeCase.Uncut).Run(Steps(kind)).Records;
        IReadOnlyList<StepRecord> after = SchemeCase.Flow(scheme, changed, SchemeCase.Uncut).Run(Steps(kind)).Records;
        foreach ((StepRecord b, StepRecord a) in before.Zip(after))
            SchemeCase.Near(SchemeCase.TorusZ(b), SchemeCase.TorusZ(a), SchemeCase.TorusZ(b).Magnitude, 1e-11, $"Z after {b.Step} steps");
    }

    /// <summary>Untruncated bonds of three steps on 2 x 3 states reach 36, of four steps on 2 x 2 states 16.</summary>
    private static int Steps(SiteKind kind) => RandomSite.Legs(kind).Left.Dimension > 2 ? 3 : 4;

    private static void Check<T>(string scheme, Tensor<T> site, double bound)
        where T : unmanaged, INumberBase<T>
    {
        SiteKind size = site.Legs[1].Dimension > 2 ? SiteKind.Oblong : SiteKind.Plain;
        Flow<T> flow = SchemeCase.Flow(scheme, site, SchemeCase.Uncut).Run(Steps(size));
        foreach (StepRecord record in flow.Records)
        {
            var torus = Torus.After(record.Step, record.AspectRatio);
            Assert.Equal(torus.Vertices, record.SitesPerTensor);
            Assert.Equal(Math.Sqrt(torus.Vertices), record.LengthScale, 12);
            (Complex z, double scale) = torus.Z(site);
            SchemeCase.Near(z, SchemeCase.TorusZ(record), scale, bound, $"Z of {torus}");
            Assert.True(record.DiscardedWeight <= 1e-27, $"step {record.Step} discarded {record.DiscardedWeight}");
        }
    }
}
