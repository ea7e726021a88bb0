using System.Numerics;
using TensorRG.Tensors.Kernels;

namespace TensorRG.Tensors.Tests.Graded;

/// <summary>Operations that only move numbers: every element must arrive with the same bits.</summary>
public sealed class ShapeTests
{
    [Fact]
    public void Permutation_moves_every_element_to_its_place()
    {
        RandomCase.Check(CheckPermute<double>, 120);
        RandomCase.Check(CheckPermute<Complex>, 120);
    }

    [Fact]
    public void Conjugation_reverses_arrows_and_negates_the_flux()
        => RandomCase.Check(static random =>
        {
            using Tensor<Complex> a = AnyTensor<Complex>(random, 3);
            using Tensor<Complex> conjugate = a.Conjugate();
            TensorAssert.Same(NaiveTensor<Complex>.Of(a).Map(static (_, x) => Complex.Conjugate(x)), conjugate, 1, 0);
            Assert.Equal(a.Legs.Select(static leg => leg.Dual), conjugate.Legs.ToArray());
            Assert.Equal(random.Group.Negate(a.Flux), conjugate.Flux);
            using Tensor<Complex> back = conjugate.Conjugate();
            TensorAssert.SameBits(a, back);
        });

    [Fact]
    public void Fused_legs_follow_the_documented_order_and_split_again()
    {
        RandomCase.Check(CheckFuse<double>, 120);
        RandomCase.Check(CheckFuse<Complex>, 120);
    }

    [Fact]
    public void A_contraction_over_fused_legs_equals_one_over_the_legs()
        => RandomCase.Check(static random =>
        {
            Leg[] shared = random.Legs(2);
            using Tensor<double> a = random.Tensor<double>(random.Flux(shared), shared);
            using Tensor<double> b = random.Tensor<double>(random.Group.Negate(a.Flux), [.. shared.Select(static leg => leg.Dual)]);
            var algebra = new TensorAlgebra<double>(Backends.Create(Backends.Default, 1));
            using Tensor<double> fusedA = a.Fuse(0, 2, Arrow.In), fusedB = b.Fuse(0, 2, Arrow.Out);
            double apart = algebra.Contract(a, [0, 1], b, [0, 1]).At(), together = algebra.Contract(fusedA, [0], fusedB, [0]).At();
            TensorAssert.Small(Math.Abs(apart - together), 1e-14 * (1 + (TensorAlgebra<double>.Norm(a) * TensorAlgebra<double>.Norm(b))), "contraction");
        });

    [Fact]
    public void Reversing_an_arrow_relabels_the_charges()
    {
        RandomCase.Check(CheckReverse<double>);
        RandomCase.Check(CheckReverse<Complex>);
    }

    [Fact]
    public void Slices_hold_the_right_elements_and_go_back_into_place()
    {
        RandomCase.Check(CheckSlice<double>);
        RandomCase.Check(CheckSlice<Complex>);
    }

    [Fact]
    public void Impossible_requests_are_refused()
    {
        AbelianGroup z2 = AbelianGroup.Cyclic(2);
        var leg = new Leg(z2, Arrow.In, [new Sector(new Charge(0), 2), new Sector(new Charge(1), 3)]);
        using Tensor<double> a = Tensor<double>.Zeros([leg, leg.Dual]);
        Assert.Throws<ArgumentException>(() => a.Permute(0, 0));
        Assert.Throws<ArgumentException>(() => a.Permute(0));
        Assert.Throws<ArgumentOutOfRangeException>(() => a.Fuse(1, 2, Arrow.In));
        Assert.Throws<ArgumentOutOfRangeException>(() => a.Fuse(0, 0, Arrow.In));
        Assert.Throws<ArgumentOutOfRangeException>(() => a.Fuse(-1, 1, Arrow.In));
        Assert.Contains("is not the fusion of", Assert.Throws<ArgumentException>(() => a.Split(0, leg, leg)).Message, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData(0, 0, 3)]
    [InlineData(0, 2, 1)]
    [InlineData(1, -1, 1)]
    [InlineData(1, 0, 0)]
    [InlineData(1, 1, int.MaxValue)]
    public void A_slice_beyond_its_sector_is_refused(int sector, int start, int count)
    {
        var leg = new Leg(AbelianGroup.Cyclic(2), Arrow.In, [new Sector(new Charge(0), 2), new Sector(new Charge(1), 3)]);
        using Tensor<double> a = Tensor<double>.Zeros([leg, leg.Dual]);
        Assert.ThrowsAny<ArgumentException>(() => a.Slice(0, sector, start, count));
    }

    [Fact]
    public void A_slice_of_another_tensor_is_refused()
    {
        var leg = new Leg(AbelianGroup.Cyclic(2), Arrow.In, [new Sector(new Charge(0), 2), new Sector(new Charge(1), 3)]);
        using Tensor<double> a = Tensor<double>.Zeros([leg, leg.Dual]);
        using Tensor<double> slice = a.Slice(0, 1, 0, 2);
        Assert.ThrowsAny<ArgumentException>(() => a.Assign(0, 0, 0, slice));
        Assert.ThrowsAny<ArgumentException>(() => a.Assign(0, 1, 2, slice));
        Assert.ThrowsAny<ArgumentException>(() => a.Assign(1, 1, 0, slice));
        a.Assign(0, 1, 1, slice);
    }

    private static Tensor<T> AnyTensor<T>(RandomCase random, int maxRank)
        where T : unmanaged, INumberBase<T>
    {
        Leg[] legs = random.Legs(1 + random.Next(maxRank));
        return random.Tensor<T>(random.Flux(legs), legs);
    }

    private static void CheckPermute<T>(RandomCase random)
        where T : unmanaged, INumberBase<T>
    {
        using Tensor<T> a = AnyTensor<T>(random, 4);
        int[] order = random.Permutation(a.Rank);
        using Tensor<T> permuted = a.Permute(order);
        TensorAssert.Same(NaiveTensor<T>.Of(a).Permute(order), permuted, 1, 0);
        Assert.Equal(order.Select(axis => a.Legs[axis]), permuted.Legs.ToArray());
        Assert.Equal(a.Flux, permuted.Flux);
        var inverse = new int[order.Length];
        for (int i = 0; i < order.Length; i++)
            inverse[order[i]] = i;
        using Tensor<T> back = permuted.Permute(inverse);
        TensorAssert.SameBits(a, back);
    }

    private static void CheckFuse<T>(RandomCase random)
        where T : unmanaged, INumberBase<T>
    {
        using Tensor<T> a = AnyTensor<T>(random, 4);
        int first = random.Next(a.Rank), count = 1 + random.Next(a.Rank - first);
        Arrow arrow = random.Chance(0.5) ? Arrow.In : Arrow.Out;
        using Tensor<T> fused = a.Fuse(first, count, arrow);
        int[][] states = FusedStates(random.Group, [.. a.Legs.AsSpan(first, count)], arrow);
        NaiveTensor<T> naive = NaiveTensor<T>.Of(a);
        int[] dimensions = [.. naive.Dimensions[..first], states.Length, .. naive.Dimensions[(first + count)..]];
        NaiveTensor<T> expected = NaiveTensor<T>.From(dimensions, p => naive[(int[])[.. p[..first], .. states[p[first]], .. p[(first + 1)..]]]);
        TensorAssert.Same(expected, fused, 1, 0);
        Assert.Equal(arrow, fused.Legs[first].Arrow);
        using Tensor<T> back = fused.Split(first, [.. a.Legs.AsSpan(first, count)]);
        TensorAssert.SameBits(a, back);
    }

    /// <summary>The states of a fused leg: by total charge with the fused leg's sign, then by sectors, then row-major.</summary>
    private static int[][] FusedStates(AbelianGroup group, Leg[] legs, Arrow arrow)
    {
        NaiveTensor<double> all = NaiveTensor<double>.From([.. legs.Select(static leg => leg.Dimension)], static _ => 0);
        return [.. all.Positions.Select(p =>
            {
                int[] sectors = [.. p.Select((x, i) => legs[i].Locate(x).Sector)];
                Charge total = sectors.Select((s, i) => legs[i].SignedCharge(s)).Aggregate(Charge.Zero, group.Add);
                return (Position: p, Charge: arrow == Arrow.In ? total : group.Negate(total), Sectors: sectors);
            })
            .OrderBy(static x => x.Charge)
            .ThenBy(static x => x.Sectors, Comparer<int[]>.Create(static (s, t) => s.AsSpan().SequenceCompareTo(t)))
            .ThenBy(static x => x.Position, Comparer<int[]>.Create(static (s, t) => s.AsSpan().SequenceCompareTo(t)))
            .Select(static x => x.Position)];
    }

    private static void CheckReverse<T>(RandomCase random)
        where T : unmanaged, INumberBase<T>
    {
        using Tensor<T> a = AnyTensor<T>(random, 3);
        int axis = random.Next(a.Rank);
        using Tensor<T> reversed = a.ReverseArrow(axis);
        Leg old = a.Legs[axis], leg = reversed.Legs[axis];
        Assert.Equal(old.Dual.Arrow, leg.Arrow);
        NaiveTensor<T> naive = NaiveTensor<T>.Of(a);
        NaiveTensor<T> expected = NaiveTensor<T>.From(naive.Dimensions, p =>
        {
            (int sector, int local) = leg.Locate(p[axis]);
            int[] source = [.. p];
            source[axis] = old.Start(old.IndexOf(random.Group.Negate(leg.Sectors[sector].Charge))) + local;
            return naive[source];
        });
        TensorAssert.Same(expected, reversed, 1, 0);
        using Tensor<T> back = reversed.ReverseArrow(axis);
        TensorAssert.SameBits(a, back);
    }

    private static void CheckSlice<T>(RandomCase random)
        where T : unmanaged, INumberBase<T>
    {
        Leg[] legs = random.Legs(1 + random.Next(3), mayBeEmpty: false);
        using Tensor<T> a = random.Tensor<T>(random.Flux(legs), legs);
        int axis = random.Next(a.Rank);
        Leg leg = a.Legs[axis];
        int sector = random.Next(leg.Sectors.Length), start = random.Next(leg.Sectors[sector].Dimension);
        int count = 1 + random.Next(leg.Sectors[sector].Dimension - start);
        using Tensor<T> slice = a.Slice(axis, sector, start, count);
        NaiveTensor<T> naive = NaiveTensor<T>.Of(a);
        int shift = leg.Start(sector) + start;
        int[] dimensions = [.. naive.Dimensions];
        dimensions[axis] = count;
        TensorAssert.Same(NaiveTensor<T>.From(dimensions, p => naive[Moved(p, axis, shift)]), slice, 1, 0);
        using Tensor<T> doubled = TensorAlgebra<T>.Scale(slice, Scalar.FromReal<T>(2)), target = a.Clone();
        target.Assign(axis, sector, start, doubled);
        TensorAssert.Same(naive.Map((p, x) => p[axis] >= shift && p[axis] < shift + count ? x + x : x), target, 1, 0);
    }

    private static int[] Moved(int[] position, int axis, int shift)
    {
        int[] moved = [.. position];
        moved[axis] += shift;
        return moved;
    }
}
