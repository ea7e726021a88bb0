using System.Numerics;
using TensorRG.Tensors.Decompositions;
using TensorRG.Tensors.Kernels;

namespace TensorRG.Tensors.Tests.Graded;

/// <summary>Arithmetic of graded tensors against <see cref="NaiveTensor{T}"/>. Bounds: round-off of sums of at most some hundred terms.</summary>
public sealed class AlgebraTests
{
    private static readonly Backend Managed = Backends.Create(Backends.Default, 1);

    [Theory]
    [InlineData(0)]
    [InlineData(1)]
    [InlineData(2)]
    [InlineData(3)]
    public void Contraction_of_reals_equals_plain_loops(int pairs) => RandomCase.Check(random => CheckContraction<double>(random, pairs), 120);

    [Theory]
    [InlineData(0)]
    [InlineData(1)]
    [InlineData(2)]
    [InlineData(3)]
    public void Contraction_of_complex_numbers_equals_plain_loops(int pairs) => RandomCase.Check(random => CheckContraction<Complex>(random, pairs), 120);

    [Fact]
    public void Contraction_over_middle_legs_equals_plain_loops()
    {
        RandomCase.Check(CheckMiddle<double>, 120);
        RandomCase.Check(CheckMiddle<Complex>, 120);
    }

    [Fact]
    public void Partial_traces_equal_plain_loops()
    {
        RandomCase.Check(CheckTrace<double>, 100);
        RandomCase.Check(CheckTrace<Complex>, 100);
    }

    [Fact]
    public void Scaling_a_leg_equals_plain_loops()
    {
        RandomCase.Check(CheckScaleLeg<double>);
        RandomCase.Check(CheckScaleLeg<Complex>);
    }

    [Fact]
    public void Sums_multiples_and_norms_equal_plain_loops()
    {
        RandomCase.Check(CheckLinear<double>);
        RandomCase.Check(CheckLinear<Complex>);
    }

    [Fact]
    public void The_full_contraction_with_the_conjugate_is_the_squared_norm()
        => RandomCase.Check(static random =>
        {
            Leg[] legs = random.Legs(1 + random.Next(4));
            using Tensor<Complex> a = random.Tensor<Complex>(random.Flux(legs), legs);
            using Tensor<Complex> conjugate = a.Conjugate();
            int[] all = [.. Enumerable.Range(0, a.Rank)];
            Complex square = new TensorAlgebra<Complex>(Managed).Contract(conjugate, all, a, all).At();
            double norm = TensorAlgebra<Complex>.Norm(a);
            TensorAssert.Small((square - (norm * norm)).Magnitude / Math.Max(norm * norm, 1), 1e-14, "squared norm");
        });

    [Fact]
    public void A_number_times_a_graded_tensor_is_an_outer_product()
        => RandomCase.Check(static random =>
        {
            using Tensor<double> number = Tensor<double>.FromFunction([], static _ => 3);
            Leg[] legs = random.Legs(2);
            using Tensor<double> a = random.Tensor<double>(random.Flux(legs), legs);
            var algebra = new TensorAlgebra<double>(Managed);
            using Tensor<double> left = algebra.Contract(number, [], a, []), right = algebra.Contract(a, [], number, []);
            using Tensor<double> expected = TensorAlgebra<double>.Scale(a, 3);
            TensorAssert.SameBits(expected, right);
            TensorAssert.SameBits(expected, left);
        });

    [Fact]
    public void Norms_of_huge_and_tiny_elements_stay_in_range()
    {
        foreach (double size in new[] { 1e300, 1e-300, 1e-310 })
        {
            using Tensor<double> a = Tensor<double>.FromFunction([Leg.Plain(4, Arrow.In)], _ => size);
            TensorAssert.Near(2 * size, TensorAlgebra<double>.Norm(a), 2 * size, 1e-12, $"norm of four elements");
        }
    }

    [Fact]
    public void NaN_and_infinity_show_in_the_norm()
    {
        using Tensor<double> a = Tensor<double>.FromFunction([Leg.Plain(2, Arrow.In)], static p => p.Span[0] == 0 ? double.NaN : 1);
        Assert.True(double.IsNaN(TensorAlgebra<double>.Norm(a)));
        Assert.True(double.IsNaN(TensorAlgebra<double>.LargestMagnitude(a)));
        using Tensor<double> b = Tensor<double>.FromFunction([Leg.Plain(2, Arrow.In)], static p => p.Span[0] == 0 ? double.NegativeInfinity : 1);
        Assert.Equal(double.PositiveInfinity, TensorAlgebra<double>.Norm(b));
    }

    [Fact]
    public void Legs_that_do_not_match_are_named()
    {
        var algebra = new TensorAlgebra<double>(Managed);
        AbelianGroup z2 = AbelianGroup.Cyclic(2);
        var leg = new Leg(z2, Arrow.In, [new Sector(new Charge(0), 2), new Sector(new Charge(1), 1)]);
        var other = new Leg(z2, Arrow.Out, [new Sector(new Charge(0), 1), new Sector(new Charge(1), 2)]);
        using Tensor<double> a = Tensor<double>.Zeros([leg, leg.Dual]);
        using Tensor<double> b = Tensor<double>.Zeros([other, leg]);
        Says("Leg 0 (in 0:2 1:1) cannot be contracted with leg 0 (out 0:1 1:2)", () => algebra.Contract(a, [0], b, [0]));
        Says("Leg 0 (in 0:2 1:1) cannot be contracted with leg 1 (in 0:2 1:1)", () => algebra.Contract(a, [0], b, [1]));
        Says("1 axes cannot be paired with 2", () => algebra.Contract(a, [0], b, [0, 1]));
        Says("Leg 0", () => TensorAlgebra<double>.Trace(b, [0], [1]));
        Says("named twice", () => algebra.Contract(a, [0, 0], a, [1, 1]));
        Says("three and four legs", () => algebra.ContractMiddle(a, b));
        Says("cannot be added", () => TensorAlgebra<double>.Add(a, b, 1));
        Says("do not fit leg 0", () => TensorAlgebra<double>.ScaleLeg(a, 0, BondWeights.Ones(other)));
    }

    private static void Says(string part, Action action)
        => Assert.Contains(part, Assert.ThrowsAny<ArgumentException>(action).Message, StringComparison.Ordinal);

    private static void CheckContraction<T>(RandomCase random, int pairs)
        where T : unmanaged, INumberBase<T>
    {
        Leg[] shared = random.Legs(pairs);
        Leg[] freeA = random.Legs(random.Next(3)), freeB = random.Legs(random.Next(3));
        int[] orderA = random.Permutation(pairs + freeA.Length), orderB = random.Permutation(pairs + freeB.Length);
        Leg[] legsA = Placed([.. shared, .. freeA], orderA);
        Leg[] legsB = Placed([.. shared.Select(static leg => leg.Dual), .. freeB], orderB);
        using Tensor<T> a = random.Tensor<T>(random.Flux(legsA), legsA), b = random.Tensor<T>(random.Flux(legsB), legsB);
        int[] axesA = orderA[..pairs], axesB = orderB[..pairs];
        using Tensor<T> c = new TensorAlgebra<T>(Managed).Contract(a, axesA, b, axesB);
        NaiveTensor<T> naiveA = NaiveTensor<T>.Of(a), naiveB = NaiveTensor<T>.Of(b);
        TensorAssert.Same(NaiveTensor<T>.Contract(naiveA, axesA, naiveB, axesB), c, naiveA.Norm() * naiveB.Norm());
        Assert.Equal(random.Group.Add(a.Flux, b.Flux), c.Flux);
        Assert.Equal(legsA.Where((_, i) => !axesA.Contains(i)).Concat(legsB.Where((_, i) => !axesB.Contains(i))), c.Legs.ToArray());
    }

    /// <summary>R[p, n, x] from M[n, k, l] and Y[p, k, l, x].</summary>
    private static void CheckMiddle<T>(RandomCase random)
        where T : unmanaged, INumberBase<T>
    {
        Leg[] legs = random.Legs(5);
        Leg[] legsM = [legs[0], legs[1], legs[2]], legsY = [legs[3], legs[1].Dual, legs[2].Dual, legs[4]];
        using Tensor<T> m = random.Tensor<T>(random.Flux(legsM), legsM), y = random.Tensor<T>(random.Flux(legsY), legsY);
        using Tensor<T> r = new TensorAlgebra<T>(Managed).ContractMiddle(m, y);
        NaiveTensor<T> naiveM = NaiveTensor<T>.Of(m), naiveY = NaiveTensor<T>.Of(y);
        TensorAssert.Same(NaiveTensor<T>.Contract(naiveY, [1, 2], naiveM, [1, 2]).Permute([0, 2, 1]), r, naiveM.Norm() * naiveY.Norm());
        Assert.Equal(random.Group.Add(m.Flux, y.Flux), r.Flux);
        Assert.Equal([legs[3], legs[0], legs[4]], r.Legs.ToArray());
    }

    /// <summary>Leg i goes to position order[i].</summary>
    private static Leg[] Placed(Leg[] legs, int[] order)
    {
        var placed = new Leg[legs.Length];
        for (int i = 0; i < legs.Length; i++)
            placed[order[i]] = legs[i];
        return placed;
    }

    private static void CheckTrace<T>(RandomCase random)
        where T : unmanaged, INumberBase<T>
    {
        int pairs = random.Next(3);
        Leg[] shared = random.Legs(pairs), free = random.Legs(random.Next(3));
        int[] order = random.Permutation((2 * pairs) + free.Length);
        Leg[] legs = Placed([.. shared, .. shared.Select(static leg => leg.Dual), .. free], order);
        using Tensor<T> a = random.Tensor<T>(random.Flux(legs), legs);
        int[] first = order[..pairs], second = order[pairs..(2 * pairs)];
        using Tensor<T> trace = TensorAlgebra<T>.Trace(a, first, second);
        NaiveTensor<T> naive = NaiveTensor<T>.Of(a);
        TensorAssert.Same(naive.Trace(first, second), trace, naive.Norm());
    }

    private static void CheckScaleLeg<T>(RandomCase random)
        where T : unmanaged, INumberBase<T>
    {
        Leg[] legs = random.Legs(1 + random.Next(3));
        using Tensor<T> a = random.Tensor<T>(random.Flux(legs), legs);
        int axis = random.Next(legs.Length);
        Leg leg = random.Chance(0.5) ? legs[axis] : legs[axis].Dual;
        var weights = new BondWeights(leg, [.. leg.Sectors.Select(s => Enumerable.Range(0, s.Dimension).Select(_ => random.Element<double>()).ToArray())]);
        double[] flat = [.. weights.Values.SelectMany(static v => v)];
        using Tensor<T> scaled = TensorAlgebra<T>.ScaleLeg(a, axis, weights);
        NaiveTensor<T> naive = NaiveTensor<T>.Of(a);
        TensorAssert.Same(naive.Map((p, x) => x * Scalar.FromReal<T>(flat[p[axis]])), scaled, 1);
    }

    private static void CheckLinear<T>(RandomCase random)
        where T : unmanaged, INumberBase<T>
    {
        Leg[] legs = random.Legs(random.Next(4));
        Charge flux = random.Flux(legs);
        using Tensor<T> a = random.Tensor<T>(flux, legs), b = random.Tensor<T>(flux, legs);
        T factor = random.Element<T>();
        NaiveTensor<T> x = NaiveTensor<T>.Of(a), y = NaiveTensor<T>.Of(b);
        using Tensor<T> sum = TensorAlgebra<T>.Add(a, b, factor), multiple = TensorAlgebra<T>.Scale(a, factor);
        TensorAssert.Same(x.Map((p, v) => v + (y[p] * factor)), sum, 1);
        TensorAssert.Same(x.Map((_, v) => v * factor), multiple, 1);
        TensorAssert.Near(x.Norm(), TensorAlgebra<T>.Norm(a), Math.Max(x.Norm(), double.Epsilon), 1e-14, "norm");
        double largest = x.Positions.Select(p => Scalar.Magnitude(x[p])).DefaultIfEmpty(0).Max();
        Assert.Equal(largest, TensorAlgebra<T>.LargestMagnitude(a));
    }
}
