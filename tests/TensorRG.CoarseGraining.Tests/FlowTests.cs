using System.Numerics;
using TensorRG.Tensors;
using TensorRG.Tensors.Decompositions;

namespace TensorRG.CoarseGraining.Tests;

/// <summary>What the flow itself promises, whatever the scheme: records, spectra, failures.</summary>
public sealed class FlowTests
{
    private static readonly SchemeSettings Cut = new(new CutRule(8));

    /// <summary>
    /// Onsager at K = 0.3 (L. Onsager, Phys. Rev. 65, 117 (1944)), by the midpoint rule over one period, which converges
    /// exponentially for a smooth periodic function: ln Z / N = ln(2)/2 + 1/(2 pi) int_0^pi ln(c^2 + sqrt(1 + k^2 - 2 k cos 2t)) dt.
    /// </summary>
    [Theory]
    [MemberData(nameof(SchemeCase.Schemes), MemberType = typeof(SchemeCase))]
    public void The_bulk_estimate_converges_to_the_exact_value(string scheme)
    {
        const double K = 0.3;
        const int Points = 400;
        double sinh = Math.Sinh(2 * K), cosh = Math.Cosh(2 * K), k = 1 / (sinh * sinh), sum = 0;
        for (int i = 0; i < Points; i++)
            sum += Math.Log((cosh * cosh) + (Math.Sqrt(1 + (k * k) - (2 * k * Math.Cos(2 * Math.PI * (i + 0.5) / Points))) / k));
        double exact = (Math.Log(2) / 2) + (sum / Points / 2);
        StepRecord last = SchemeCase.Flow(scheme, Sites.Ising(K), new SchemeSettings(new CutRule(16))).Run(24).Records[^1];
        SchemeCase.Near(exact, last.LogZPerSite, 1e-8, "ln Z per site");
        SchemeCase.Near(1, last.DegeneracyRatio, 1e-6, "X of one phase");
    }

    [Theory]
    [MemberData(nameof(SchemeCase.Schemes), MemberType = typeof(SchemeCase))]
    public void Two_coexisting_phases_give_X_of_two_and_a_degenerate_spectrum(string scheme)
    {
        StepRecord last = SchemeCase.Flow(scheme, Sites.Ising(0.6), Cut).Run(20).Records[^1];
        SchemeCase.Near(2, last.DegeneracyRatio, 1e-6, "X");
        Assert.Equal(["0", "1"], last.Spectrum.Take(2).Select(static s => s.Charge).Order());
        SchemeCase.Near(1, last.Spectrum[1].Magnitude, 1e-6, "second eigenvalue");
        Assert.True(last.Spectrum[2].Magnitude <= 1e-6, "third eigenvalue");
    }

    /// <summary>At step 0 everything follows from M[u, d] = sum_l A[u, l, d, l].</summary>
    [Theory]
    [MemberData(nameof(SchemeCase.SchemesAndSites), MemberType = typeof(SchemeCase))]
    public void The_first_record_describes_the_site_tensor(string scheme, SiteKind kind)
    {
        Tensor<Complex> site = new RandomSite(40).Positive<Complex>(kind);
        Tensor<Complex> m = TensorAlgebra<Complex>.Trace(site, [1], [3]);
        StepRecord record = SchemeCase.Flow(scheme, site, Cut).Records[0];
        Complex trace = m.At(0, 0) + m.At(1, 1), determinant = (m.At(0, 0) * m.At(1, 1)) - (m.At(0, 1) * m.At(1, 0));
        Complex square = (trace * trace) - (2 * determinant), root = Complex.Sqrt((trace * trace) - (4 * determinant));
        Complex[] eigenvalues = [.. new[] { (trace + root) / 2, (trace - root) / 2 }.OrderByDescending(static x => x.Magnitude)];
        SchemeCase.Near(Math.Log(trace.Magnitude), record.LogZTorusPerSite, 1e-14, "ln Z");
        SchemeCase.Near(trace.Phase, record.TorusPhase, 1e-14, "phase");
        SchemeCase.Near((trace * trace / square).Real, record.DegeneracyRatio, 1e-13, "X");
        SchemeCase.Near(eigenvalues[1].Magnitude / eigenvalues[0].Magnitude, record.Spectrum[1].Magnitude, 1e-13, "eigenvalue");
        SchemeCase.Near((eigenvalues[1] / eigenvalues[0]).Phase, record.Spectrum[1].Phase, 1e-12, "phase of the eigenvalue");
        Assert.Equal(1, record.Spectrum[0].Magnitude);
        SchemeCase.Near(0, record.Spectrum[0].Phase, 1e-15, "phase of the leading eigenvalue");
        Assert.Equal((2, site.Legs[1].Dimension), (record.VerticalDimension, record.HorizontalDimension));
        Assert.True(double.IsNaN(record.LogZPerSite), "no bulk estimate without an earlier step");
    }

    [Theory]
    [MemberData(nameof(SchemeCase.Schemes), MemberType = typeof(SchemeCase))]
    public void Bonds_never_exceed_the_bond_dimension_and_cuts_inside_multiplets_are_noticed(string scheme)
    {
        var anywhere = new SchemeSettings(new CutRule(5, MultipletGap: 0));
        IReadOnlyList<StepRecord> records = SchemeCase.Flow(scheme, Sites.Ising(Sites.CriticalCoupling), anywhere).Run(8).Records;
        Assert.All(records, static r => Assert.InRange(Math.Max(r.VerticalDimension, r.HorizontalDimension), 1, 5));
        Assert.All(records.Skip(1).SelectMany(static r => r.Notices), static notice => Assert.Contains("multiplet", notice, StringComparison.Ordinal));
        Assert.All(records, static r => Assert.InRange(r.DiscardedWeight, 0, 1));
        Assert.True(records[^1].DiscardedWeight > 0);
    }

    [Theory]
    [MemberData(nameof(SchemeCase.Schemes), MemberType = typeof(SchemeCase))]
    public void Weights_that_vanish_or_are_not_finite_fail_with_a_clear_message(string scheme)
    {
        (Leg up, Leg left) = RandomSite.Legs(SiteKind.Oblong);
        Tensor<double> zero = Tensor<double>.Zeros([up, left, up.Dual, left.Dual]);
        string message = Assert.Throws<ArithmeticException>(() => SchemeCase.Flow(scheme, zero, Cut)).Message;
        Assert.Contains("Step 0", message, StringComparison.Ordinal);
        Assert.Contains("vanish", message, StringComparison.Ordinal);
        foreach (double bad in new[] { double.NaN, double.PositiveInfinity })
        {
            Tensor<double> site = Tensor<double>.FromFunction([up, left, up.Dual, left.Dual], _ => bad);
            Assert.Throws<ArithmeticException>(() => SchemeCase.Flow(scheme, site, Cut));
        }
    }

    /// <summary>Z of a small torus may be zero: no dimers cover a single vertex. Larger ones are covered, and the flow must go on.</summary>
    [Theory]
    [MemberData(nameof(SchemeCase.Schemes), MemberType = typeof(SchemeCase))]
    public void A_small_torus_with_Z_of_zero_does_not_stop_the_flow(string scheme)
    {
        Flow<double> flow = SchemeCase.Flow(scheme, Dimers(), SchemeCase.Uncut);
        Assert.Equal(double.NegativeInfinity, flow.Records[0].LogZTorusPerSite);
        flow.Run(4);
        foreach (StepRecord record in flow.Records.Skip(1))
        {
            var torus = Torus.After(record.Step, record.AspectRatio);
            double z = torus.Z(Dimers()).Value.Real;
            SchemeCase.Near(z, SchemeCase.TorusZ(record), z, 1e-12, $"dimer coverings of {torus}");
            Assert.False(double.IsInfinity(record.LogZPerSite), $"step {record.Step}: bulk estimate {record.LogZPerSite}");
        }

        Flow<double> restored = SchemeCase.Flow(scheme, Dimers(), SchemeCase.Uncut);
        restored.Restore(flow.Save());
        SchemeCase.SameSnapshots(flow.Save(), restored.Save());
    }

    /// <summary>Neighbours must differ: a ring of one vertex allows nothing, so the first transfer matrix is exactly zero, and larger tori are coloured in many ways.</summary>
    [Theory]
    [MemberData(nameof(SchemeCase.Schemes), MemberType = typeof(SchemeCase))]
    public void A_first_transfer_matrix_of_zero_does_not_stop_the_flow(string scheme)
    {
        Flow<double> flow = SchemeCase.Flow(scheme, Colourings(), SchemeCase.Uncut);
        Assert.Equal(double.NegativeInfinity, flow.Records[0].LogZTorusPerSite);
        Flow<double> restored = SchemeCase.Flow(scheme, Colourings(), SchemeCase.Uncut);
        restored.Restore(flow.Save());
        flow.Run(4);
        restored.Run(4);
        SchemeCase.SameSnapshots(flow.Save(), restored.Save());
        foreach (StepRecord record in flow.Records.Where(static r => r.Step is 2 or 4))
        {
            var torus = Torus.After(record.Step, record.AspectRatio);
            double z = torus.Z(Colourings()).Value.Real;
            Assert.True(z > 0);
            SchemeCase.Near(z, SchemeCase.TorusZ(record), z, 1e-12, $"colourings of {torus}");
        }
    }

    /// <summary>A transfer matrix whose eigenvalues all vanish: no torus has a configuration.</summary>
    [Theory]
    [MemberData(nameof(SchemeCase.Schemes), MemberType = typeof(SchemeCase))]
    public void A_step_that_fails_leaves_the_flow_where_it_was(string scheme)
    {
        Leg two = Leg.Plain(2, Arrow.In), one = Leg.Plain(1, Arrow.In);
        Tensor<double> site = Tensor<double>.FromFunction([two, one, two.Dual, one.Dual], static p => p.Span[0] == 0 && p.Span[2] == 1 ? 1 : 0);
        Flow<double> flow = SchemeCase.Flow(scheme, site, Cut);
        Assert.All(flow.Records[0].Spectrum, static line => Assert.Equal((0, 0), (line.Magnitude, line.Phase)));
        Snapshot before = flow.Save();
        Exception? failure = null;
        for (int step = 0; step < 4 && failure is null; step++)
        {
            before = flow.Save();
            failure = Record.Exception(flow.Advance);
        }

        Assert.IsAssignableFrom<ArithmeticException>(failure);
        SchemeCase.SameSnapshots(before, flow.Save());
    }

    /// <summary>Dimers: exactly one of the four legs of a vertex is occupied.</summary>
    private static Tensor<double> Dimers()
    {
        Leg two = Leg.Plain(2, Arrow.In);
        return Tensor<double>.FromFunction([two, two, two.Dual, two.Dual], static p => p.Span[0] + p.Span[1] + p.Span[2] + p.Span[3] == 1 ? 1 : 0);
    }

    /// <summary>Three colours on the vertices; the legs u and l bring the neighbours' colours, which must differ from the vertex's own.</summary>
    private static Tensor<double> Colourings()
    {
        Leg three = Leg.Plain(3, Arrow.In);
        return Tensor<double>.FromFunction(
            [three, three, three.Dual, three.Dual],
            static p => p.Span[2] == p.Span[3] && p.Span[0] != p.Span[2] && p.Span[1] != p.Span[2] ? 1 : 0);
    }
}
