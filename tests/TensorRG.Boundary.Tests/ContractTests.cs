using TensorRG.Tensors;

namespace TensorRG.Boundary.Tests;

/// <summary>What a boundary state promises.</summary>
public sealed class ContractTests
{
    [Theory]
    [InlineData(false)]
    [InlineData(true)]
    public void States_are_in_mixed_canonical_form(bool graded)
    {
        (Tensor<double> site, _, _) = Networks.Of("ising", graded, ("T", 2.4), ("Jy", 0.7));
        Check(Networks.Solver<double>(1e-11).Solve(site, 10));
    }

    // Far from criticality most of the states asked for have a weight below round-off.
    [Fact]
    public void States_of_no_weight_leave_isometries_behind()
    {
        (Tensor<double> site, _, _) = Networks.Of("ising", true, ("T", 1.3));
        BoundaryState<double> state = Networks.Solver<double>(1e-12).Solve(site, 48);
        Check(state);
        Assert.True(state.BondDimension < 48);
    }

    [Fact]
    public void A_sequence_goes_on_from_one_bond_dimension_to_the_next()
    {
        (Tensor<double> site, double prefactor, double exact) = Networks.Of("ising", true, ("T", 2.6));
        double last = double.PositiveInfinity;
        foreach (BoundaryState<double> state in Networks.Solver<double>(1e-9).Sequence(site, [2, 4, 8]))
        {
            double deviation = exact - (state.LogEigenvalue.Real + prefactor);
            Assert.True(deviation > 0 && deviation < last / 10, $"{deviation:e2}");
            last = deviation;
        }
    }

    [Theory]
    [InlineData(0)]
    [InlineData(double.NaN)]
    public void Nothing_to_decompose_is_refused(double value)
    {
        using Tensor<double> site = Networks.FromElements(2, (_, _, _, _) => value);
        Assert.Throws<Tensors.Kernels.DecompositionException>(() => Networks.Solver<double>(1e-8).Solve(site, 4));
    }

    [Fact]
    public void Asymmetric_states_are_in_mixed_canonical_form()
    {
        using Tensor<double> site = Networks.RandomPositive(3, 7);
        Check(Networks.Solver<double>(1e-11).Solve(site, 10));
    }

    [Fact]
    public void Environments_are_eigenvectors_of_the_strip()
    {
        using Tensor<double> site = Networks.RandomPositive(2, 5);
        BoundaryState<double> state = Networks.Solver<double>(1e-11).Solve(site, 8);
        TensorAlgebra<double> algebra = Networks.Algebra<double>();
        using Tensor<double> top = algebra.Contract(state.FL, [1], state.Upper.AL, [0]);
        using Tensor<double> half = algebra.Contract(top, [2, 1], site, [0, 1]);
        using Tensor<double> image = algebra.Contract(state.Lower.AL, [0, 1], half, [0, 2]);
        double factor = TensorAlgebra<double>.Norm(image) / TensorAlgebra<double>.Norm(state.FL);
        using Tensor<double> rest = TensorAlgebra<double>.Add(image, state.FL, -factor);
        Assert.True(TensorAlgebra<double>.Norm(rest) <= 1e-12 * TensorAlgebra<double>.Norm(image));
    }

    [Fact]
    public void Schmidt_values_have_norm_one_and_their_largest_in_charge_zero()
    {
        (Tensor<double> site, _, _) = Networks.Of("ising", true, ("T", 2.6));
        BoundaryState<double> state = Networks.Solver<double>(1e-10).Solve(site, 8);
        Assert.True(Math.Abs(state.Schmidt.Values.Sum(static v => v.Sum(static x => x * x)) - 1) <= 1e-13);
        Assert.Equal(state.Schmidt.Largest, state.Schmidt.Values[state.Schmidt.Leg.IndexOf(Charge.Zero)][0]);
    }

    [Fact]
    public void Bits_do_not_depend_on_threads()
    {
        using Tensor<double> site = Networks.RandomPositive(2, 9);
        BoundaryState<double> one = Networks.Solver<double>(1e-12, threads: 1).Solve(site, 10);
        BoundaryState<double> three = Networks.Solver<double>(1e-12, threads: 3).Solve(site, 10);
        Assert.Equal(one.LogEigenvalue, three.LogEigenvalue);
        Assert.Equal(one.Iterations, three.Iterations);
        Assert.True(one.Upper.AL.Elements.SequenceEqual(three.Upper.AL.Elements));
        Assert.True(one.FR.Elements.SequenceEqual(three.FR.Elements));
    }

    [Fact]
    public void A_warm_start_saves_rounds_and_keeps_the_value()
    {
        (Tensor<double> first, _, _) = Networks.Of("ising", true, ("T", 2.5));
        (Tensor<double> second, double prefactor, double exact) = Networks.Of("ising", true, ("T", 2.51));
        BoundarySolver<double> solver = Networks.Solver<double>(1e-10);
        BoundaryState<double> start = solver.Solve(first, 16), cold = solver.Solve(second, 16), warm = solver.Solve(second, 16, start);
        Assert.True(warm.Iterations < cold.Iterations);
        Assert.True(Math.Abs(warm.LogEigenvalue.Real + prefactor - exact) <= 1e-13);
        Assert.Equal(cold.LogEigenvalue.Real, warm.LogEigenvalue.Real, 1e-14);
    }

    [Fact]
    public void A_search_can_be_stopped()
    {
        (Tensor<double> site, _, _) = Networks.Of("ising", true, ("T", 2.3));
        using var stop = new CancellationTokenSource();
        int rounds = 0;
        BoundarySolver<double> solver = Networks.Solver<double>(1e-12, report: _ =>
        {
            if (++rounds == 5)
                stop.Cancel();
        });
        Assert.Throws<OperationCanceledException>(() => solver.Solve(site, 64, null, stop.Token));
        Assert.Equal(5, rounds);
    }

    // Without a charge to tell them apart the two alternating vectors compete, and no uniform state is the answer.
    [Fact]
    public void Alternating_order_without_a_charge_is_reported()
    {
        (Tensor<double> site, _, _) = Networks.Of("ising", false, ("T", 1.5), ("J", -1));
        Assert.False(Networks.Solver<double>(1e-10).Solve(site, 8).IsConverged);
    }

    [Fact]
    public void Misfits_are_refused()
    {
        (Tensor<double> graded, _, _) = Networks.Of("ising", true, ("T", 3));
        (Tensor<double> plain, _, _) = Networks.Of("ising", false, ("T", 3));
        BoundarySolver<double> solver = Networks.Solver<double>(1e-8);
        BoundaryState<double> start = solver.Solve(graded, 2);
        Assert.Throws<ArgumentException>(() => solver.Solve(plain, 2, start));
        using Tensor<double> turned = plain.Permute(2, 1, 0, 3);
        Assert.Throws<ArgumentException>(() => solver.Solve(turned, 2));
        Assert.Throws<ArgumentOutOfRangeException>(() => solver.Solve(plain, 0));
    }

    private static void Check(BoundaryState<double> state)
    {
        Assert.True(state.IsConverged);
        foreach (UniformState<double> mps in new[] { state.Upper, state.Lower })
        {
            TensorAlgebra<double> algebra = Networks.Algebra<double>();
            using Tensor<double> left = mps.AL.Conjugate(), right = mps.AR.Conjugate();
            using Tensor<double> one = algebra.Contract(left, [0, 1], mps.AL, [0, 1]), other = algebra.Contract(mps.AR, [1, 2], right, [1, 2]);
            Assert.True(FromIdentity(one) <= 1e-13 && FromIdentity(other) <= 1e-13);
            using Tensor<double> fromLeft = algebra.Contract(mps.AL, [2], mps.C, [0]), fromRight = algebra.Contract(mps.C, [1], mps.AR, [0]);
            Assert.True(Distance(fromLeft, mps.AC) <= 2 * state.Residual + 1e-14);
            Assert.True(Distance(fromRight, mps.AC) <= 2 * state.Residual + 1e-14);
        }
    }

    private static double Distance(Tensor<double> a, Tensor<double> b)
    {
        using Tensor<double> difference = TensorAlgebra<double>.Add(a, b, -1);
        return TensorAlgebra<double>.Norm(difference);
    }

    private static double FromIdentity(Tensor<double> matrix)
    {
        using Tensor<double> identity = Tensor<double>.FromFunction(matrix.Legs, static at => at.Span[0] == at.Span[1] ? 1 : 0);
        return Distance(matrix, identity);
    }
}
