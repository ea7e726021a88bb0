using TensorRG.Tensors;

namespace TensorRG.Boundary.Tests;

/// <summary>ln Z per site against exact solutions.</summary>
public sealed class ExactValueTests
{
    // Exact: L. Onsager, Phys. Rev. 65, 117 (1944). The reach in chi is that of corner matrices, measured by an independent script, except where noted.
    [Theory]
    [InlineData(2.0, true, 24, 1e-14)]
    [InlineData(2.0, false, 16, 1e-14)]
    [InlineData(2.5, true, 24, 1e-14)]
    [InlineData(2.5, false, 24, 1e-14)]
    [InlineData(2.2, true, 32, 1e-12)]
    [InlineData(2.3, true, 32, 1e-12)]
    public void Ising_off_criticality_reaches_round_off(double temperature, bool graded, int chi, double bound)
        => Assert.True(Deviation("ising", graded, chi, 1e-12, ("T", temperature)) <= bound);

    // Exact: L. Onsager, Phys. Rev. 65, 117 (1944). Converged corner matrices: 1.28e-7 and 9.29e-9 at chi = 16 and 32 (own script, no source).
    [Theory]
    [InlineData(16, 1.30e-7)]
    [InlineData(32, 9.5e-9)]
    public void Ising_at_criticality_is_as_good_as_corner_matrices(int chi, double bound)
    {
        double deviation = Deviation("ising", true, chi, 1e-8);
        Assert.True(deviation <= bound && deviation > bound / 2, $"{deviation:e2}");
    }

    // Exact: R. J. Baxter, J. Phys. C 6, L445 (1973). Symmetric corner matrices: 1.2e-6 (own script, no source). At a transition an
    // ungraded state of few states gives up the symmetry and comes closer with as many states: measured 2.3e-7.
    [Theory]
    [InlineData(true, 1.2e-6)]
    [InlineData(false, 2.4e-7)]
    public void Potts_at_its_transition(bool graded, double bound)
    {
        double deviation = Deviation("potts", graded, 24, 1e-7, ("q", 3));
        Assert.True(deviation <= bound && deviation > bound / 2, $"{deviation:e2}");
    }

    [Fact]
    public void Square_ice_without_its_line_charge()
    {
        // Exact: E. H. Lieb, Phys. Rev. 162, 162 (1967). The bound is 1.2 times what was measured: central charge one converges as chi^-2.7.
        double deviation = Deviation("six-vertex", true, 16, 1e-7);
        Assert.True(deviation <= 2.2e-5, $"{deviation:e2}");
    }

    // Frozen phases have ln Z = ln max(a, b): E. H. Lieb, Phys. Rev. Lett. 19, 108 (1967).
    [Theory]
    [InlineData("a")]
    [InlineData("b")]
    public void Frozen_six_vertex_phases(string heavy)
    {
        (Tensor<double> site, double prefactor, _) = Networks.Of("six-vertex", true, (heavy, 3));
        BoundaryState<double> state = Networks.Solver<double>(1e-10).Solve(site, 8);
        Assert.True(Math.Abs(state.LogEigenvalue.Real + prefactor - Math.Log(3)) <= 1e-13);
        Assert.True(state.IsConverged);
    }

    // Exact: the antiferromagnet on the square lattice has the partition function of the ferromagnet (spins of one sublattice turned).
    [Theory]
    [InlineData(1.5, 16, 1e-14)]
    [InlineData(2.5, 24, 1e-14)]
    public void Antiferromagnet_with_its_charge(double temperature, int chi, double bound)
        => Assert.True(Deviation("ising", true, chi, 1e-12, ("J", -1), ("T", temperature)) <= bound);

    // Exact: L. Onsager, Phys. Rev. 65, 117 (1944).
    [Fact]
    public void Unequal_couplings()
        => Assert.True(Deviation("ising", true, 8, 1e-12, ("Jx", 1), ("Jy", 0.3), ("T", 2)) <= 1e-14);

    [Theory]
    [InlineData(1e5, true)]
    [InlineData(1e5, false)]
    [InlineData(0.2, true)]
    public void Extreme_temperatures_need_two_states(double temperature, bool graded)
    {
        (Tensor<double> site, double prefactor, double exact) = Networks.Of("ising", graded, ("T", temperature));
        BoundaryState<double> state = Networks.Solver<double>(1e-13).Solve(site, 8);
        Assert.True(state.IsConverged);
        Assert.True(state.BondDimension <= 2);
        Assert.True(Math.Abs(state.LogEigenvalue.Real + prefactor - exact) <= 1e-14 * exact);
    }

    private static double Deviation(string model, bool graded, int chi, double tolerance, params (string Name, double Value)[] parameters)
    {
        (Tensor<double> site, double prefactor, double exact) = Networks.Of(model, graded, parameters);
        BoundaryState<double> state = Networks.Solver<double>(tolerance).Solve(site, chi);
        Assert.True(state.IsConverged, $"residual {state.Residual:e2} after {state.Iterations} rounds");
        Assert.True(state.BondDimension <= chi);
        Assert.Equal(0, state.LogEigenvalue.Imaginary);
        return Math.Abs((state.LogEigenvalue.Real + prefactor - exact) / exact);
    }
}
