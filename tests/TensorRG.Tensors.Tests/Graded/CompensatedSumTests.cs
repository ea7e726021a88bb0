using CsCheck;

namespace TensorRG.Tensors.Tests.Graded;

public sealed class CompensatedSumTests
{
    [Fact]
    public void Cancelled_terms_leave_the_small_ones()
    {
        var sum = default(CompensatedSum);
        foreach (double term in new[] { 1, 1e100, 1, -1e100 })
            sum.Add(term);
        Assert.Equal(2, sum.Value);
    }

    /// <summary>Terms are integers times 2^-40, which decimals add exactly.</summary>
    [Fact]
    public void Sums_are_right_to_one_unit_in_the_last_place()
        => Gen.Select(Gen.Long[-(1L << 40), 1L << 40], Gen.Int[0, 30]).Array[1, 200].Sample(static pairs =>
        {
            var sum = default(CompensatedSum);
            decimal exact = 0;
            foreach ((long mantissa, int shift) in pairs)
            {
                sum.Add(Math.ScaleB(mantissa, -shift));
                exact += mantissa / (decimal)(1L << shift);
            }

            double expected = (double)exact;
            Assert.True(Math.Abs(sum.Value - expected) <= Math.BitIncrement(Math.Abs(expected)) - Math.Abs(expected), $"{sum.Value:R} instead of {expected:R}");
        });

    [Fact]
    public void An_infinite_term_makes_the_sum_infinite()
    {
        var sum = new CompensatedSum(1, 1e-20);
        sum.Add(double.NegativeInfinity);
        Assert.Equal(double.NegativeInfinity, sum.Value);
        sum.Add(3);
        Assert.Equal(double.NegativeInfinity, sum.Value);
        sum.Add(double.PositiveInfinity);
        Assert.True(double.IsNaN(sum.Value));
    }

    [Fact]
    public void A_restored_sum_goes_on_with_the_same_bits()
    {
        var whole = default(CompensatedSum);
        var random = new Random(4);
        for (int i = 0; i < 1000; i++)
        {
            double term = Math.ScaleB(random.NextDouble() - 0.5, random.Next(60));
            var restored = new CompensatedSum(whole.High, whole.Low);
            Assert.True(restored == whole);
            Assert.Equal(restored.GetHashCode(), whole.GetHashCode());
            restored.Add(term);
            whole.Add(term);
            Assert.Equal(BitConverter.DoubleToInt64Bits(whole.Value), BitConverter.DoubleToInt64Bits(restored.Value));
        }

        Assert.True(whole != default);
    }
}
