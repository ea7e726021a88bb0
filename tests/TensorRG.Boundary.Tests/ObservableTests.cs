using System.Numerics;
using TensorRG.Models;
using TensorRG.Tensors;
using TensorRG.Tensors.Decompositions;

namespace TensorRG.Boundary.Tests;

/// <summary>What one vertex measures.</summary>
public sealed class ObservableTests
{
    // Exact: C. N. Yang, Phys. Rev. 85, 808 (1952): m = (1 - sinh(2/T)^-4)^(1/8).
    [Theory]
    [InlineData(2.0, 16)]
    [InlineData(2.2, 24)]
    public void A_small_field_selects_the_spontaneous_magnetisation(double temperature, int chi)
    {
        BoundarySolver<double> solver = Networks.Solver<double>(1e-11);
        using Tensor<double> inField = Networks.Ising(temperature, 1, 0.01), site = Networks.Ising(temperature, 1, 0.0), spin = Networks.Ising(temperature, 0.0, 1);
        BoundaryState<double> started = Networks.Solver<double>(1e-5).Solve(inField, chi / 2);
        BoundaryState<double> state = solver.Solve(site, chi, started);
        double exact = Math.Pow(1 - Math.Pow(Math.Sinh(2 / temperature), -4), 0.125);
        Complex measured = solver.Expectation(state, site, spin);
        Assert.True(state.IsConverged);
        Assert.True((measured - exact).Magnitude <= 1e-8, $"{measured.Real - exact:e2}");
    }

    // Exact: L. Onsager, Phys. Rev. 65, 117 (1944). A bond that counts s s' has tanh K and coth K in place of 1 on its even and odd state.
    [Theory]
    [InlineData(2.0, 3)]
    [InlineData(2.5, 2)]
    public void Energy_from_a_changed_bond(double temperature, int axis)
    {
        (Tensor<double> site, _, _) = Networks.Of("ising", true, ("T", temperature));
        double t = Math.Tanh(1 / temperature);
        using Tensor<double> bond = TensorAlgebra<double>.ScaleLeg(site, axis, new BondWeights(site.Legs[axis], [[t], [1 / t]]));
        BoundarySolver<double> solver = Networks.Solver<double>(1e-12);
        BoundaryState<double> state = solver.Solve(site, 24);
        Model ising = ModelCatalogue.Find("ising");
        double exact = ising.Exact(Quantity.EnergyPerSite, ising.CreateParameters([KeyValuePair.Create("T", temperature)]))!.Value;
        double energy = -2 * solver.Expectation(state, site, bond).Real;
        Assert.True(Math.Abs(energy - exact) <= 1e-11, $"{energy - exact:e2}");
    }

    // Exact: L. Onsager, Phys. Rev. 65, 117 (1944) for the nearest pair; C. N. Yang, Phys. Rev. 85, 808 (1952) for distant ones.
    [Fact]
    public void Spins_that_carry_the_charge_correlate()
    {
        const double temperature = 2.0;
        (Tensor<double> site, _, _) = Networks.Of("ising", true, ("T", temperature));
        using Tensor<double> spin = Spin(site, temperature);
        BoundarySolver<double> solver = Networks.Solver<double>(1e-12);
        BoundaryState<double> state = solver.Solve(site, 24);
        IReadOnlyList<Complex> pairs = solver.Correlation(state, site, spin, spin, 60);
        Model ising = ModelCatalogue.Find("ising");
        double energy = ising.Exact(Quantity.EnergyPerSite, ising.CreateParameters([KeyValuePair.Create("T", temperature)]))!.Value;
        Assert.True((pairs[0] + (energy / 2)).Magnitude <= 1e-11, $"{pairs[0]}");
        double squared = Math.Pow(1 - Math.Pow(Math.Sinh(2 / temperature), -4), 0.25);
        Assert.True((pairs[^1] - squared).Magnitude <= 1e-9, $"{pairs[^1].Real - squared:e2}");
        Assert.True(Enumerable.Range(1, 20).All(i => pairs[i].Real < pairs[i - 1].Real));
    }

    // Exact: L. Onsager, Phys. Rev. 65, 117 (1944): 1/xi = ln coth K - 2 K for spins above Tc. The approach in chi is slow: measured 24.
    [Fact]
    public void Correlation_length_of_spins()
    {
        const double temperature = 2.8;
        (Tensor<double> site, _, _) = Networks.Of("ising", true, ("T", temperature));
        BoundarySolver<double> solver = Networks.Solver<double>(1e-11);
        BoundaryState<double> state = solver.Solve(site, 24);
        double exact = 1 / (-Math.Log(Math.Tanh(1 / temperature)) - (2 / temperature));
        double spins = solver.CorrelationLength(state, site, new Charge(1)), energies = solver.CorrelationLength(state, site);
        Assert.True(spins < exact * (1 + 1e-10) && spins > exact * (1 - 2e-2), $"{spins} against {exact}");
        Assert.True(energies < spins / 1.8 && energies > 0, $"{energies}");
    }

    [Fact]
    public void An_impurity_must_fit()
    {
        (Tensor<double> site, _, _) = Networks.Of("ising", true, ("T", 3));
        using Tensor<double> other = Networks.Ising(3, 1, 0.0);
        BoundarySolver<double> solver = Networks.Solver<double>(1e-8);
        BoundaryState<double> state = solver.Solve(site, 2);
        Assert.Throws<ArgumentException>(() => solver.Expectation(state, site, other));
    }

    /// <summary>The spin in the place of a vertex graded by the flip: t^(n/2) for n odd legs, n odd.</summary>
    private static Tensor<double> Spin(Tensor<double> site, double temperature)
    {
        double t = Math.Tanh(1 / temperature);
        return Tensor<double>.FromFunction(site.Legs, at => Math.Pow(t, (at.Span[0] + at.Span[1] + at.Span[2] + at.Span[3]) / 2.0), new Charge(1));
    }
}
