using System.Numerics;
using TensorRG.Tensors;

namespace TensorRG.Boundary.Tests;

/// <summary>Networks without reflection symmetry and with complex weights, against rings of finite length.</summary>
public sealed class AsymmetricTests
{
    // The oracle is exact but for corrections that fall exponentially with the length; their size is read off two lengths.
    [Theory]
    [InlineData(2, 1, 12)]
    [InlineData(2, 2, 12)]
    [InlineData(2, 3, 12)]
    [InlineData(3, 4, 8)]
    public void Random_positive_vertices(int dimension, long seed, int length)
    {
        using Tensor<double> site = Networks.RandomPositive(dimension, seed);
        BoundaryState<double> state = Networks.Solver<double>(1e-12).Solve(site, 10);
        Check(state, site, length, $"seed {seed}");
    }

    [Theory]
    [InlineData(8, 0.3)]
    [InlineData(6, 0.1)]
    public void Ising_in_an_imaginary_field(double temperature, double angle)
    {
        // h/T = i angle: tanh(i angle) = i tan(angle).
        using Tensor<Complex> site = Networks.Ising(temperature, Complex.One, new Complex(0, Math.Tan(angle)));
        BoundaryState<Complex> state = Networks.Solver<Complex>(1e-12).Solve(site, 10);
        Check(state, site, 12, $"angle {angle}");
    }

    [Fact]
    public void A_phase_of_the_vertex_is_the_phase_of_the_eigenvalue()
    {
        var phase = Complex.FromPolarCoordinates(3, 0.7);
        using Tensor<Complex> plain = Networks.Ising(3, Complex.One, Complex.Zero), turned = TensorAlgebra<Complex>.Scale(plain, phase);
        Complex first = Networks.Solver<Complex>(1e-11).Solve(plain, 8).LogEigenvalue, second = Networks.Solver<Complex>(1e-11).Solve(turned, 8).LogEigenvalue;
        Assert.True((second - first - Complex.Log(phase)).Magnitude <= 1e-13);
    }

    private static void Check<T>(BoundaryState<T> state, Tensor<T> site, int length, string what)
        where T : unmanaged, INumberBase<T>
    {
        Complex shorter = Ring.LogPerVertex(site, length - 2), ring = Ring.LogPerVertex(site, length);
        double bound = 1e-13 + (shorter - ring).Magnitude;
        Assert.True(state.IsConverged, $"{what}: residual {state.Residual:e2}");
        Assert.True(bound < 1e-6, $"{what}: the ring is too short, {bound:e2}");
        double deviation = Math.Abs(state.LogEigenvalue.Real - ring.Real);
        Assert.True(deviation <= bound, $"{what}: {deviation:e2} above {bound:e2}");
    }
}
