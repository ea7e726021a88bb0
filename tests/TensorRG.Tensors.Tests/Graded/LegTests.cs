namespace TensorRG.Tensors.Tests.Graded;

public sealed class LegTests
{
    private static readonly AbelianGroup Z3 = AbelianGroup.Cyclic(3);

    [Fact]
    public void Sectors_are_sorted_normalised_and_never_empty()
    {
        var leg = new Leg(Z3, Arrow.In, [new Sector(new Charge(-1), 2), new Sector(new Charge(1), 0), new Sector(new Charge(3), 4)]);
        Assert.Equal([new Sector(new Charge(0), 4), new Sector(new Charge(2), 2)], leg.Sectors.ToArray());
        Assert.Equal(6, leg.Dimension);
        Assert.Equal("in 0:4 2:2", leg.ToString());
        Assert.Equal("out 0:4 2:2", leg.Dual.ToString());
    }

    [Fact]
    public void Bad_sectors_are_refused_with_the_charge_in_the_message()
    {
        Assert.Contains("Charge 1 appears twice", Assert.Throws<ArgumentException>(
            static () => new Leg(Z3, Arrow.In, [new Sector(new Charge(1), 2), new Sector(new Charge(-2), 1)])).Message, StringComparison.Ordinal);
        Assert.Contains("Charge 2 has a negative dimension", Assert.Throws<ArgumentException>(
            static () => new Leg(Z3, Arrow.In, [new Sector(new Charge(2), -1)])).Message, StringComparison.Ordinal);
    }

    [Fact]
    public void Positions_and_sectors_translate_into_each_other()
        => RandomCase.Check(static random =>
        {
            Leg leg = random.Leg();
            int position = 0;
            for (int sector = 0; sector < leg.Sectors.Length; sector++)
            {
                Assert.Equal(position, leg.Start(sector));
                Assert.Equal(sector, leg.IndexOf(leg.Sectors[sector].Charge));
                for (int local = 0; local < leg.Sectors[sector].Dimension; local++)
                    Assert.Equal((sector, local), leg.Locate(position++));
            }

            Assert.Equal(position, leg.Dimension);
            Assert.Throws<ArgumentOutOfRangeException>(() => leg.Locate(position));
            Assert.Throws<ArgumentOutOfRangeException>(() => leg.Locate(-1));
        });

    [Fact]
    public void A_leg_matches_its_dual_and_nothing_else()
    {
        var leg = new Leg(Z3, Arrow.In, [new Sector(new Charge(0), 2), new Sector(new Charge(1), 1)]);
        Assert.True(leg.Matches(leg.Dual));
        Assert.True(leg.Dual.Matches(leg));
        Assert.False(leg.Matches(leg));
        Assert.Equal(leg, leg.Dual.Dual);
        Assert.Equal(leg.GetHashCode(), leg.Dual.Dual.GetHashCode());
        Assert.False(leg.Matches(new Leg(Z3, Arrow.Out, [new Sector(new Charge(0), 2), new Sector(new Charge(1), 2)])));
        Assert.False(leg.Matches(new Leg(AbelianGroup.Cyclic(2), Arrow.Out, leg.Sectors)));
        Assert.Equal(-1, leg.IndexOf(new Charge(2)));
        Assert.Equal(new Charge(2), leg.Dual.SignedCharge(1));
    }
}
