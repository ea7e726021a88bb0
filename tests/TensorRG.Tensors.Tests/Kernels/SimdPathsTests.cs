using TensorRG.Tensors.Kernels;

namespace TensorRG.Tensors.Tests.Kernels;

public class SimdPathsTests
{
    [Theory]
    [InlineData(SimdPath.Portable)]
    [InlineData(SimdPath.Avx2)]
    [InlineData(SimdPath.Avx512)]
    public void A_setting_forces_a_path_or_says_why_not(SimdPath path)
    {
        string name = SimdPaths.Name(path);
        if (SimdPaths.IsSupported(path))
        {
            Assert.Equal(path, SimdPaths.Select(name));
            Assert.Equal(path, SimdPaths.Select($" {name.ToUpperInvariant()} "));
        }
        else
        {
            ArgumentException e = Assert.Throws<ArgumentException>(() => SimdPaths.Select(name));
            Assert.Contains(name, e.Message, StringComparison.Ordinal);
        }
    }

    [Fact]
    public void No_setting_gives_the_best_path_the_machine_has()
    {
        Assert.Equal(SimdPaths.Best, SimdPaths.Select(null));
        Assert.Equal(SimdPaths.Best, SimdPaths.Select(string.Empty));
        Assert.True(SimdPaths.IsSupported(SimdPaths.Best));
    }

    [Fact]
    public void An_unknown_setting_names_the_choices()
    {
        ArgumentException e = Assert.Throws<ArgumentException>(() => SimdPaths.Select("sse2"));
        Assert.Contains("avx512, avx2 or portable", e.Message, StringComparison.Ordinal);
    }
}
