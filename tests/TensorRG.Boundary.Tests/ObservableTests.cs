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

    [Fact]
    public void An_impurity_must_fit()
    {
        (Tensor<double> site, _, _) = Networks.Of("ising", true, ("T", 3));
        using Tensor<double> other = Networks.Ising(3, 1, 0.0);
        BoundarySolver<double> solver = Networks.Solver<double>(1e-8);
        BoundaryState<double> state = solver.Solve(site, 2);
        Assert.Throws<ArgumentException>(() => solver.Expectation(state, site, other));
    }
}
