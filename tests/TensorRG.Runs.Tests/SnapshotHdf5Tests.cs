using TensorRG.CoarseGraining;

namespace TensorRG.Runs.Tests;

public class SnapshotHdf5Tests
{
    private const string Identity = "0123456789abcdef0123456789abcdef0123456789abcdef0123456789abcdef";

    [Fact]
    public void Every_bit_comes_back()
    {
        Random random = new(5);
        double[] bits = [.. Enumerable.Range(0, 5000).Select(_ => BitConverter.Int64BitsToDouble(random.NextInt64(long.MinValue, long.MaxValue)))];
        Snapshot snapshot = Make(
            new() { ["a/b/c/d/e"] = bits, ["a/b/none"] = [], ["a/one"] = [double.NaN], ["µ/β"] = [-0.0] },
            new() { ["a/n"] = [long.MinValue, -1, 0, long.MaxValue], ["none"] = [] },
            new() { ["t/long"] = new string('x', 200_000) + "𝄞", ["t/empty"] = "", ["t/line"] = "a\r\n\tb" });
        Snapshot back = CheckpointFile.Read(CheckpointFile.Write(snapshot, Identity), Identity, 3);
        Assert.Equal(bits.Select(BitConverter.DoubleToInt64Bits), back.Numbers["a/b/c/d/e"].Select(BitConverter.DoubleToInt64Bits));
        Assert.True(SnapshotHdf5.Same(snapshot, back));
        Assert.Equal("a\r\n\tb", back.Texts["t/line"]);
        Assert.Equal([long.MinValue, -1, 0, long.MaxValue], back.Integers["a/n"]);
    }

    [Fact]
    public void Comparison_sees_every_difference()
    {
        Snapshot one = Make(new() { ["x"] = [0.0] }, new() { ["n"] = [1] }, new() { ["t"] = "a" });
        Assert.True(SnapshotHdf5.Same(one, one));
        Assert.False(SnapshotHdf5.Same(one, Make(new() { ["x"] = [-0.0] }, new() { ["n"] = [1] }, new() { ["t"] = "a" })));
        Assert.False(SnapshotHdf5.Same(one, Make(new() { ["x"] = [0.0] }, new() { ["n"] = [2] }, new() { ["t"] = "a" })));
        Assert.False(SnapshotHdf5.Same(one, Make(new() { ["x"] = [0.0] }, new() { ["n"] = [1] }, new() { ["t"] = "b" })));
        Assert.False(SnapshotHdf5.Same(one, Make(new() { ["x"] = [0.0] }, new() { ["n"] = [1] }, [])));
        Assert.False(SnapshotHdf5.Same(one, Make(new() { ["y"] = [0.0] }, new() { ["n"] = [1] }, new() { ["t"] = "a" })));
    }

    [Fact]
    public void Bytes_depend_on_the_content_alone()
    {
        Snapshot forward = Make(new() { ["a/x"] = [1], ["a/y"] = [2], ["b"] = [3] }, [], new() { ["c"] = "c" });
        Snapshot backward = Make(new() { ["b"] = [3], ["a/y"] = [2], ["a/x"] = [1] }, [], new() { ["c"] = "c" });
        byte[] first = CheckpointFile.Write(forward, Identity);

        // A time stamp of one second, if there were one, would differ after this.
        Thread.Sleep(1100);
        Assert.Equal(first, CheckpointFile.Write(backward, Identity));
    }

    [Fact]
    public void Large_array_and_many_names_come_back()
    {
        Dictionary<string, double[]> numbers = Enumerable.Range(0, 500).ToDictionary(i => $"blocks/{i}/elements", i => new double[] { i, -i });
        numbers["large"] = [.. Enumerable.Range(0, 1_000_000).Select(i => Math.Sqrt(i))];
        Snapshot snapshot = Make(numbers, [], []);
        Assert.True(SnapshotHdf5.Same(snapshot, CheckpointFile.Read(CheckpointFile.Write(snapshot, Identity), Identity, 3)));
    }

    [Theory]
    [InlineData("")]
    [InlineData("/a")]
    [InlineData("a/")]
    [InlineData("a//b")]
    [InlineData("a/../b")]
    [InlineData("./a")]
    [InlineData("a\0b")]
    [InlineData("x")]
    [InlineData("x/y")]
    public void Names_that_could_not_come_back_are_refused(string name) =>
        Assert.Throws<ArgumentException>(() => CheckpointFile.Write(Make(new() { ["x"] = [1] }, new() { [name] = [1] }, []), Identity));

    [Fact]
    public void Texts_that_could_not_come_back_are_refused()
    {
        Assert.Throws<ArgumentException>(() => CheckpointFile.Write(Make([], [], new() { ["t"] = "a\0b" }), Identity));
        Assert.Throws<ArgumentException>(() => CheckpointFile.Write(Make([], [], new() { ["t"] = "\uD800" }), Identity));
    }

    private static Snapshot Make(
        Dictionary<string, double[]> numbers, Dictionary<string, long[]> integers, Dictionary<string, string> texts) =>
        new(3, numbers, integers, texts);
}
