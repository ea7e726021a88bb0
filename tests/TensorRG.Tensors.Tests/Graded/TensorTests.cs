using System.Numerics;

namespace TensorRG.Tensors.Tests.Graded;

public sealed class TensorTests
{
    [Theory]
    [InlineData(0)]
    [InlineData(1)]
    [InlineData(2)]
    [InlineData(3)]
    [InlineData(4)]
    public void Exactly_the_elements_that_conserve_charge_are_stored(int rank)
        => RandomCase.Check(random =>
        {
            Leg[] legs = random.Legs(rank);
            Charge flux = random.Flux(legs);
            var asked = new Dictionary<string, double>();
            using Tensor<double> tensor = Tensor<double>.FromFunction(
                legs,
                position =>
                {
                    double value = random.Element<double>();
                    asked.Add(string.Join(',', position.ToArray()), value);
                    return value;
                },
                flux);
            int allowed = 0;
            foreach (int[] position in NaiveTensor<double>.Of(tensor).Positions)
            {
                Charge total = position.Select((p, axis) => legs[axis].SignedCharge(legs[axis].Locate(p).Sector))
                    .Aggregate(Charge.Zero, random.Group.Add);
                bool conserves = total == flux;
                allowed += conserves ? 1 : 0;
                Assert.Equal(conserves, asked.TryGetValue(string.Join(',', position), out double value));
                Assert.Equal(value, tensor.At(position));
            }

            Assert.Equal(allowed, tensor.StoredCount);
            Assert.Equal(allowed, asked.Count);
        });

    [Fact]
    public void An_ungraded_tensor_is_one_row_major_block()
    {
        using Tensor<double> tensor = Tensor<double>.FromFunction(
            [Leg.Plain(2, Arrow.In), Leg.Plain(3, Arrow.In), Leg.Plain(4, Arrow.Out)],
            static p => (100 * p.Span[0]) + (10 * p.Span[1]) + p.Span[2]);
        Assert.Equal(1, tensor.BlockCount);
        double[] expected = [.. Enumerable.Range(0, 2).SelectMany(static i => Enumerable.Range(0, 3).SelectMany(j => Enumerable.Range(0, 4).Select(k => (100.0 * i) + (10 * j) + k)))];
        Assert.Equal(expected, tensor.Elements.ToArray());
        Assert.Equal("[in 0:2; in 0:3; out 0:4]", tensor.ToString());
    }

    [Fact]
    public void A_copy_has_its_own_memory()
    {
        using Tensor<Complex> tensor = new RandomCase(3).Tensor<Complex>([Leg.Plain(3, Arrow.In)]);
        using Tensor<Complex> copy = tensor.Clone();
        TensorAssert.SameBits(tensor, copy);
        copy.Elements[0] = 7;
        Assert.NotEqual(copy.Elements[0], tensor.Elements[0]);
    }

    [Fact]
    public void A_disposed_tensor_refuses_access()
    {
        Tensor<double> tensor = Tensor<double>.Zeros([Leg.Plain(3, Arrow.In)]);
        tensor.Dispose();
        Assert.Throws<ObjectDisposedException>(() => tensor.Elements.Length);
    }

    [Fact]
    public void Wrong_positions_and_mixed_groups_are_refused()
    {
        using Tensor<double> tensor = Tensor<double>.Zeros([Leg.Plain(2, Arrow.In), Leg.Plain(2, Arrow.Out)]);
        Assert.Throws<ArgumentException>(() => tensor.At(0));
        Assert.Throws<ArgumentOutOfRangeException>(() => tensor.At(0, 2));
        var z2 = new Leg(AbelianGroup.Cyclic(2), Arrow.In, [new Sector(default, 2)]);
        string message = Assert.Throws<ArgumentException>(() => Tensor<double>.Zeros([Leg.Plain(2, Arrow.In), z2])).Message;
        Assert.Contains("Leg 1 is graded by Z2, leg 0 by none", message, StringComparison.Ordinal);
    }
}
