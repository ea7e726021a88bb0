using System.Numerics;
using TensorRG.Tensors.Kernels;

namespace TensorRG.Tensors.Tests.Kernels;

/// <summary>The registry of backends: names, availability, refusals.</summary>
public sealed class BackendsTests
{
    [Fact]
    public void Availability_is_stated_for_every_name_and_is_true()
    {
        IReadOnlyList<BackendStatus> all = Backends.Available();
        Assert.Equal(Backends.Names, all.Select(status => status.Name));
        foreach (BackendStatus status in all)
        {
            Assert.NotEmpty(status.Remark);
            if (status.IsAvailable)
                Assert.Equal(status.Name, Backends.Create(status.Name, 2).Name);
            else
                Assert.Equal(status.Remark, Assert.Throws<BackendUnavailableException>(() => Backends.Create(status.Name, 2)).Message);
        }
    }

    [Theory]
    [InlineData("managed")]
    [InlineData("plain")]
    [InlineData("mathnet")]
    public void Nothing_need_be_installed_for_the_managed_ones(string name)
        => Assert.True(Backends.Available().Single(status => status.Name == name).IsAvailable);

    [Fact]
    public void An_unknown_name_is_refused_with_the_list_of_names()
    {
        ArgumentException e = Assert.Throws<ArgumentException>(() => Backends.Create("Managed", 1));
        Assert.All(Backends.Names, name => Assert.Contains(name, e.Message, StringComparison.Ordinal));
    }

    [Fact]
    public void Fewer_than_one_thread_is_refused()
        => Assert.Throws<ArgumentOutOfRangeException>(() => Backends.Create(Backends.Default, 0));

    [Fact]
    public void The_description_tells_path_and_threads()
    {
        Backend backend = Backends.Create("managed", 2, SimdPath.Portable);
        Assert.Contains("portable", backend.Description, StringComparison.Ordinal);
        Assert.Contains("2 thread", backend.Description, StringComparison.Ordinal);
        Assert.IsType<ManagedKernels<double>>(backend.For<double>());
        Assert.IsType<ManagedKernels<Complex>>(backend.For<Complex>());
    }

    [Fact]
    public void A_missing_library_comes_with_a_remedy()
    {
        foreach (BackendStatus status in Backends.Available().Where(status => !status.IsAvailable))
            Assert.Matches("Install|Put", status.Remark);
    }

    [Fact]
    public void Wide_matrices_are_refused_by_thin_QR()
    {
        using var a = new StridedMatrix<double>(2, 3, Layout.RowMajor, new Random(1));
        using var r = new StridedMatrix<double>(3, 3, Layout.RowMajor, new Random(1));
        Assert.Throws<ArgumentException>(() => Backends.Create("managed", 1).For<double>().OrthogonalFactor(a.View, r.View));
    }
}
