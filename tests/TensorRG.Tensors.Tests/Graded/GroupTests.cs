using CsCheck;

namespace TensorRG.Tensors.Tests.Graded;

public sealed class GroupTests
{
    private static readonly Gen<Charge> Charges = Gen.Select(
        Gen.Int[-50, 50], Gen.Int[-50, 50], Gen.Int[-50, 50], Gen.Int[-50, 50], static (a, b, c, d) => new Charge(a, b, c, d));

    private static readonly Gen<AbelianGroup> Groups = Gen.OneOf(Gen.Const(0), Gen.Int[2, 7]).Array[0, AbelianGroup.MaxFactors]
        .Select(static orders => new AbelianGroup(orders));

    [Fact]
    public void Charges_obey_the_laws_of_an_abelian_group()
        => Gen.Select(Groups, Charges, Charges, Charges).Sample(static (group, x, y, z) =>
        {
            Charge a = group.Normalize(x), b = group.Normalize(y), c = group.Normalize(z);
            Assert.Equal(group.Add(a, b), group.Add(b, a));
            Assert.Equal(group.Add(group.Add(a, b), c), group.Add(a, group.Add(b, c)));
            Assert.Equal(a, group.Add(a, Charge.Zero));
            Assert.Equal(Charge.Zero, group.Add(a, group.Negate(a)));
            Assert.Equal(group.Add(a, group.Negate(b)), group.Subtract(a, b));
            Assert.Equal(a, group.Normalize(a));
        });

    [Fact]
    public void Components_lie_in_their_range()
        => Gen.Select(Groups, Charges).Sample(static (group, x) =>
        {
            Charge a = group.Normalize(x);
            for (int factor = 0; factor < 4; factor++)
            {
                int order = factor < group.Orders.Length ? group.Orders[factor] : 1;
                int expected = order == 0 ? x[factor] : ((x[factor] % order) + order) % order;
                Assert.Equal(expected, a[factor]);
            }
        });

    [Fact]
    public void Charges_sort_lexicographically()
        => Gen.Select(Charges, Charges).Sample(static (a, b) =>
        {
            int[] x = [a.First, a.Second, a.Third, a.Fourth], y = [b.First, b.Second, b.Third, b.Fourth];
            int expected = x.Zip(y, static (s, t) => s.CompareTo(t)).FirstOrDefault(static o => o != 0);
            Assert.Equal(Math.Sign(expected), Math.Sign(a.CompareTo(b)));
            Assert.Equal(expected < 0, a < b);
            Assert.Equal(expected > 0, a > b);
            Assert.Equal(expected <= 0, a <= b);
            Assert.Equal(expected >= 0, a >= b);
        });

    [Theory]
    [InlineData(new int[0], "none")]
    [InlineData(new[] { 2 }, "Z2")]
    [InlineData(new[] { 0 }, "U(1)")]
    [InlineData(new[] { 2, 3, 0 }, "Z2 x Z3 x U(1)")]
    public void Groups_have_the_names_of_the_trade(int[] orders, string name)
        => Assert.Equal(name, new AbelianGroup(orders).ToString());

    [Fact]
    public void Bad_groups_are_refused()
    {
        Assert.Contains("at most 4", Assert.Throws<ArgumentException>(static () => new AbelianGroup(2, 2, 2, 2, 2)).Message, StringComparison.Ordinal);
        Assert.Throws<ArgumentException>(static () => new AbelianGroup(1));
        Assert.Throws<ArgumentException>(static () => new AbelianGroup(-2));
        Assert.Throws<ArgumentOutOfRangeException>(static () => AbelianGroup.Cyclic(1));
        Assert.Throws<ArgumentOutOfRangeException>(static () => new Charge(1)[4]);
    }

    [Fact]
    public void Charges_read_as_text_with_as_many_components_as_factors()
    {
        Assert.Equal("0", AbelianGroup.Trivial.Text(Charge.Zero));
        Assert.Equal("-3", new AbelianGroup(0).Text(new Charge(-3)));
        Assert.Equal("(1,-2)", new AbelianGroup(2, 0).Text(new Charge(1, -2)));
    }
}
