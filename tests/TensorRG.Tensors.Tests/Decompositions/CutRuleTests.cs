using TensorRG.Tensors.Decompositions;

namespace TensorRG.Tensors.Tests.Decompositions;

public sealed class CutRuleTests
{
    [Theory]
    [InlineData(2, new[] { 3.0, 2, 1 }, 2)]
    [InlineData(5, new[] { 3.0, 2, 1 }, 3)]
    [InlineData(1, new[] { 3.0, 2, 1 }, 1)]
    [InlineData(3, new[] { 3.0, 2, 2, 1 }, 3)]
    [InlineData(2, new[] { 3.0, 2, 2, 1 }, 1)]
    [InlineData(4, new[] { 3.0, 2, 2, 2, 2 }, 1)]
    [InlineData(5, new[] { 3.0, 2, 2, 2, 2 }, 5)]
    [InlineData(2, new[] { 3.0, 2, 2 - 1e-9, 1 }, 1)]
    [InlineData(2, new[] { 3.0, 2, 2 - 1e-7, 1 }, 2)]
    public void A_cut_never_splits_a_multiplet_that_ends_above_it(int chi, double[] values, int expected)
    {
        Assert.Equal(expected, new CutRule(chi).Count(values, out bool cuts));
        Assert.False(cuts);
    }

    [Fact]
    public void Nearly_equal_neighbours_chain_into_one_multiplet()
    {
        double[] values = [1, .. Enumerable.Range(0, 6).Select(static i => 0.5 - (i * 4e-9)), 0.1];
        Assert.Equal(1, new CutRule(5).Count(values, out bool cuts));
        Assert.False(cuts);
        Assert.Equal(7, new CutRule(7).Count(values, out _));
    }

    [Fact]
    public void A_multiplet_that_starts_at_the_first_value_has_to_be_cut()
    {
        Assert.Equal(2, new CutRule(2).Count([1, 1, 1, 0.5], out bool cuts));
        Assert.True(cuts);
        Assert.Equal(3, new CutRule(3).Count([1, 1, 1, 0.5], out cuts));
        Assert.False(cuts);
    }

    [Fact]
    public void A_zero_gap_cuts_anywhere_and_says_so()
    {
        var anywhere = new CutRule(2, MultipletGap: 0);
        Assert.Equal(2, anywhere.Count([3, 2, 2, 1], out bool cuts));
        Assert.True(cuts);
        Assert.Equal(2, anywhere.Count([3, 2, 1, 1], out cuts));
        Assert.False(cuts);
    }

    [Fact]
    public void A_wider_gap_joins_more_values()
    {
        Assert.Equal(1, new CutRule(2, MultipletGap: 0.1).Count([3, 2, 1.9, 1], out _));
        Assert.Equal(2, new CutRule(2, MultipletGap: 0.01).Count([3, 2, 1.9, 1], out _));
    }

    [Fact]
    public void Round_off_is_never_kept()
    {
        Assert.Equal(2, new CutRule(4).Count([1, 1e-3, 1e-16, 5e-17], out bool cuts));
        Assert.False(cuts);
        Assert.Equal(1, new CutRule(4, RelativeFloor: 1e-2).Count([1, 1e-3, 1e-4, 1e-5], out _));
        Assert.Equal(1, new CutRule(4).Count([1, 0, 0, 0], out _));
    }

    [Fact]
    public void Nothing_positive_gives_nothing_to_keep()
    {
        Assert.Equal(0, new CutRule(4).Count([], out _));
        Assert.Equal(0, new CutRule(4).Count([0, 0], out _));
        Assert.Equal(0, new CutRule(4).Count([double.NaN, 1], out _));
    }
}
