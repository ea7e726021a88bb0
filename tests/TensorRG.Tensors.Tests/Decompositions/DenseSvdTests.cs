using System.Numerics;
using TensorRG.Tensors.Decompositions;
using TensorRG.Tensors.Kernels;
using TensorRG.Tensors.Tests.Graded;

namespace TensorRG.Tensors.Tests.Decompositions;

public sealed class DenseSvdTests
{
    private static readonly Backend Managed = Backends.Create(Backends.Default, 1);

    [Fact]
    public void An_uncut_decomposition_reproduces_the_tensor()
    {
        RandomCase.Check(CheckUncut<double>, 80);
        RandomCase.Check(CheckUncut<Complex>, 80);
    }

    [Fact]
    public void A_cut_keeps_the_largest_values_of_the_dense_matrix()
    {
        RandomCase.Check(CheckCut<double>, 80);
        RandomCase.Check(CheckCut<Complex>, 80);
    }

    [Theory]
    [InlineData(1, 1)]
    [InlineData(2, 1)]
    [InlineData(3, 3)]
    [InlineData(4, 4)]
    [InlineData(5, 4)]
    [InlineData(6, 4)]
    [InlineData(7, 7)]
    [InlineData(100, 8)]
    public void A_multiplet_shared_by_sectors_is_kept_or_dropped_whole(int chi, int expected)
    {
        TruncatedSvd<double> svd = Multiplets<double>(new CutRule(chi));
        Assert.Equal(expected, svd.Weights.Leg.Dimension);
        Assert.False(svd.Truncation.CutsMultiplet);
        Assert.Equal(expected, Multiplets<Complex>(new CutRule(chi)).Weights.Leg.Dimension);
    }

    [Theory]
    [InlineData(2, true)]
    [InlineData(3, false)]
    [InlineData(5, true)]
    public void A_zero_gap_cuts_anywhere_and_the_smaller_charge_wins(int chi, bool cuts)
    {
        TruncatedSvd<double> svd = Multiplets<double>(new CutRule(chi, MultipletGap: 0));
        Assert.Equal(chi, svd.Weights.Leg.Dimension);
        Assert.Equal(cuts, svd.Truncation.CutsMultiplet);
        TensorAssert.Near(Spectrum.SelectMany(static v => v).OrderDescending().Skip(chi).Sum(static x => x * x), svd.Truncation.DiscardedWeight, 1, 1e-14, "discarded weight");
    }

    [Fact]
    public void Ties_go_to_the_smaller_charge()
    {
        AbelianGroup z2 = AbelianGroup.Cyclic(2);
        Leg leg = GradedMatrices.Graded(z2, Arrow.In, 2, 2);
        using Tensor<double> unit = Tensor<double>.FromFunction([leg, leg.Dual], static p => p.Span[0] == p.Span[1] ? 1 : 0);
        TruncatedSvd<double> svd = DenseSvd.Compute(Managed.For<double>(), unit, [0], [1], new CutRule(3, MultipletGap: 0));
        Assert.Equal("out 0:2 1:1", svd.Weights.Leg.ToString());
    }

    [Fact]
    public void A_zero_tensor_and_one_without_blocks_are_refused()
    {
        Leg leg = GradedMatrices.Graded(AbelianGroup.Cyclic(2), Arrow.In, 2, 2);
        using Tensor<double> zero = Tensor<double>.Zeros([leg, leg.Dual]);
        Assert.Contains("zero", Assert.Throws<DecompositionException>(() => Svd(zero)).Message, StringComparison.Ordinal);
        using Tensor<double> empty = Tensor<double>.Zeros([GradedMatrices.Graded(AbelianGroup.Cyclic(2), Arrow.In, 2), GradedMatrices.Graded(AbelianGroup.Cyclic(2), Arrow.Out, 0, 2)]);
        Assert.Equal(0, empty.BlockCount);
        Assert.Throws<DecompositionException>(() => Svd(empty));
    }

    [Fact]
    public void Flux_and_NaN_are_refused()
    {
        Leg leg = GradedMatrices.Graded(AbelianGroup.Cyclic(2), Arrow.In, 2, 2);
        using Tensor<double> charged = Tensor<double>.Zeros([leg, leg.Dual], new Charge(1));
        Assert.Contains("flux", Assert.Throws<ArgumentException>(() => Svd(charged)).Message, StringComparison.Ordinal);
        using Tensor<double> nan = Tensor<double>.FromFunction([leg, leg.Dual], static p => p.Span[0] == 3 ? double.NaN : 1);
        Assert.Throws<DecompositionException>(() => Svd(nan));
    }

    private static readonly double[][] Spectrum = [[1, 0.5, 0.1, 0.1], [0.5, 0.3, 0.1, 0.01]];

    private static TruncatedSvd<double> Svd(Tensor<double> tensor) => DenseSvd.Compute(Managed.For<double>(), tensor, [0], [1], new CutRule(4));

    private static TruncatedSvd<T> Multiplets<T>(CutRule rule)
        where T : unmanaged, INumberBase<T>
    {
        var algebra = new TensorAlgebra<T>(Managed);
        using Tensor<T> matrix = GradedMatrices.WithSpectrum(algebra, new RandomCase(5), AbelianGroup.Cyclic(2), [6, 5], [4, 7], Spectrum);
        return DenseSvd.Compute(algebra.Kernels, matrix, [0], [1], rule);
    }

    private static void CheckUncut<T>(RandomCase random)
        where T : unmanaged, INumberBase<T>
    {
        var algebra = new TensorAlgebra<T>(Managed);
        (Tensor<T> tensor, int[] rows, int[] columns) = Operand<T>(random);
        if (tensor.BlockCount == 0)
            return;
        TruncatedSvd<T> svd = DenseSvd.Compute(algebra.Kernels, tensor, rows, columns, new CutRule(int.MaxValue));
        double norm = TensorAlgebra<T>.Norm(tensor);
        using Tensor<T> product = GradedMatrices.Product(algebra, svd);
        TensorAssert.Same(NaiveTensor<T>.Of(tensor).Permute([.. rows, .. columns]), product, norm, 1e-13);
        TensorAssert.Isometry(algebra, svd.U);
        TensorAssert.Isometry(algebra, GradedMatrices.RightVectors(svd));
        TensorAssert.Near(norm * norm, svd.Truncation.KeptWeight + svd.Truncation.DiscardedWeight, norm * norm, 1e-13, "kept and discarded weight");
        foreach (double[] values in svd.Weights.Values)
            Assert.Equal(values.OrderDescending(), values);
    }

    private static void CheckCut<T>(RandomCase random)
        where T : unmanaged, INumberBase<T>
    {
        var algebra = new TensorAlgebra<T>(Managed);
        (Tensor<T> tensor, int[] rows, int[] columns) = Operand<T>(random);
        if (tensor.BlockCount == 0)
            return;
        int chi = 1 + random.Next(8);
        TruncatedSvd<T> svd = DenseSvd.Compute(algebra.Kernels, tensor, rows, columns, new CutRule(chi));
        double[] dense = GradedMatrices.DenseSingularValues(NaiveTensor<T>.Of(tensor).Permute([.. rows, .. columns]), rows.Length);
        double[] kept = GradedMatrices.Descending(svd.Weights);
        Assert.InRange(kept.Length, 1, chi);
        for (int i = 0; i < kept.Length; i++)
            TensorAssert.Near(dense[i], kept[i], dense[0], 1e-13, $"value {i}");
        Assert.Equal(new CutRule(chi).Count(dense, out _), kept.Length);
        double lost = dense.Skip(kept.Length).Sum(static x => x * x);
        TensorAssert.Near(lost, svd.Truncation.DiscardedWeight, dense[0] * dense[0], 1e-13, "discarded weight");
        TensorAssert.Near(lost / dense.Sum(static x => x * x), svd.Truncation.DiscardedFraction, 1, 1e-13, "discarded fraction");
        CheckConvention(svd);
        TruncatedSvd<T> again = DenseSvd.Compute(algebra.Kernels, tensor, rows, columns, new CutRule(chi));
        TensorAssert.SameBits(svd.U, again.U);
        TensorAssert.SameBits(svd.V, again.V);
        TensorAssert.SameBits(svd.Weights, again.Weights);
    }

    /// <summary>In each column of U some element of nearly the largest magnitude is real and positive.</summary>
    private static void CheckConvention<T>(TruncatedSvd<T> svd)
        where T : unmanaged, INumberBase<T>
    {
        NaiveTensor<T> u = NaiveTensor<T>.Of(svd.U);
        foreach (IGrouping<int, T> column in u.Positions.GroupBy(static p => p[^1], p => u[p]))
        {
            double largest = column.Max(Scalar.Magnitude);
            Assert.Contains(column, x => (Scalar.ToComplex(x) - largest).Magnitude <= 2e-6 * largest);
        }
    }

    private static (Tensor<T> Tensor, int[] Rows, int[] Columns) Operand<T>(RandomCase random)
        where T : unmanaged, INumberBase<T>
    {
        Leg[] legs = random.Legs(2 + random.Next(3), mayBeEmpty: false);
        if (random.Chance(0.7))
            legs[^1] = legs[0].Dual;
        int[] order = random.Permutation(legs.Length);
        int split = 1 + random.Next(legs.Length - 1);
        return (random.Tensor<T>(legs), order[..split], order[split..]);
    }
}
