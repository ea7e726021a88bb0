using System.Numerics;
using System.Runtime.InteropServices;
using CsCheck;
using TensorRG.Tensors.Kernels;

namespace TensorRG.Tensors.Tests.Kernels;

public class GemmTests
{
    private static readonly SimdPath[] Paths = [SimdPath.Portable, SimdPath.Avx2, SimdPath.Avx512];

    public static TheoryData<int, int, int> Shapes()
    {
        var data = new TheoryData<int, int, int>();
        foreach (int m in (int[])[0, 1, 2, 3, 5, 6, 7, 8, 13, 25])
        {
            foreach (int k in (int[])[0, 1, 2, 7, 33])
            {
                foreach (int n in (int[])[0, 1, 2, 3, 4, 5, 8, 11, 24, 31])
                    data.Add(m, k, n);
            }
        }

        foreach ((int m, int k, int n) in ((int, int, int)[])[(1, 50, 200), (2, 50, 99), (200, 3, 1), (130, 90, 70), (70, 400, 20), (20, 800, 33), (300, 20, 9), (9, 20, 700), (60, 100, 300)])
            data.Add(m, k, n);
        return data;
    }

    [Theory]
    [MemberData(nameof(Shapes))]
    public void Every_path_agrees_with_the_plain_loop(int m, int k, int n)
    {
        var random = new Random((m * 10000) + (k * 100) + n);
        foreach (SimdPath path in Paths)
        {
            AssertMatchesPlain<double>(Draw(random), m, k, n, path, random);
            AssertMatchesPlain<Complex>(Draw(random), m, k, n, path, random);
        }
    }

    [Fact]
    public void Any_layout_conjugation_and_shape_agrees_with_the_plain_loop()
    {
        Gen.Select(Gen.Int[0, 40], Gen.Int[0, 40], Gen.Int[0, 40], Gen.Int[0, int.MaxValue - 1]).Sample(
            (m, k, n, seed) =>
            {
                var random = new Random(seed);
                SimdPath path = Paths[random.Next(3)];
                AssertMatchesPlain<double>(Draw(random), m, k, n, path, random);
                AssertMatchesPlain<Complex>(Draw(random), m, k, n, path, random);
            },
            iter: 600);
    }

    [Theory]
    [InlineData(1, 1, 1)]
    [InlineData(1, 40, 70)]
    [InlineData(2, 33, 53)]
    [InlineData(7, 5, 13)]
    [InlineData(31, 47, 29)]
    [InlineData(64, 64, 64)]
    [InlineData(150, 790, 61)]
    public void Every_path_gives_the_same_bits(int m, int k, int n)
    {
        AssertSameBits<double>(m, k, n, 1);
        AssertSameBits<Complex>(m, k, n, 1);
    }

    [Theory]
    [InlineData(200, 130, 200)]
    [InlineData(131, 800, 57)]
    [InlineData(57, 401, 333)]
    [InlineData(700, 65, 65)]
    public void Every_number_of_threads_gives_the_same_bits(int m, int k, int n)
    {
        AssertSameBits<double>(m, k, n, 2, SimdPath.Avx2, SimdPath.Portable);
        AssertSameBits<double>(m, k, n, 3, SimdPath.Avx2);
        AssertSameBits<Complex>(m, k, n, 2, SimdPath.Avx2, SimdPath.Portable);
    }

    [Theory]
    [InlineData(6, 383)]
    [InlineData(9, 384)]
    [InlineData(9, 385)]
    [InlineData(5, 1001)]
    public unsafe void Each_element_is_a_chain_of_fused_multiply_adds_in_slabs(int n, int k)
    {
        var random = new Random(n + k);
        using var a = new StridedMatrix<double>(n, k, Layout.RowMajor, random);
        using var b = new StridedMatrix<double>(k, n, Layout.RowMajor, random);
        using var c = new StridedMatrix<double>(n, n, Layout.RowMajor, random);
        using var workers = new Workers(1);
        Gemm.Multiply(a.View, b.View, c.View, false, workers, SimdPath.Avx2);
        int slabs = (k + 383) / 384, depth = ((((k + slabs - 1) / slabs) + 3) / 4) * 4;
        for (int i = 0; i < n; i++)
        {
            for (int j = 0; j < n; j++)
            {
                double total = 0;
                for (int start = 0; start < k; start += depth)
                {
                    double sum = 0;
                    for (int p = start; p < Math.Min(start + depth, k); p++)
                        sum = Math.FusedMultiplyAdd(a.View[i, p], b.View[p, j], sum);
                    total = start == 0 ? sum : total + sum;
                }

                Assert.Equal(BitConverter.DoubleToInt64Bits(total), BitConverter.DoubleToInt64Bits(c.View[i, j]));
            }
        }
    }

    [Fact]
    public void A_product_with_no_inner_dimension_is_zero_or_leaves_C()
    {
        var random = new Random(1);
        using var a = new StridedMatrix<double>(3, 0, Layout.RowMajor, random);
        using var b = new StridedMatrix<double>(0, 4, Layout.RowMajor, random);
        using var c = new StridedMatrix<double>(3, 4, Layout.PaddedRows, random);
        using var workers = new Workers(1);
        double[] before = c.ToArray();
        Gemm.Multiply(a.View, b.View, c.View, true, workers, SimdPath.Portable);
        Assert.Equal(before, c.ToArray());
        Gemm.Multiply(a.View, b.View, c.View, false, workers, SimdPath.Portable);
        Assert.All(c.ToArray(), x => Assert.Equal(0, x));
        c.AssertGuardsIntact();
    }

    [Fact]
    public void NaN_and_infinity_reach_exactly_the_elements_they_touch()
    {
        var random = new Random(2);
        foreach (SimdPath path in Paths)
        {
            using var a = new StridedMatrix<double>(9, 11, Layout.RowMajor, random);
            using var b = new StridedMatrix<double>(11, 13, Layout.RowMajor, random);
            using var c = new StridedMatrix<double>(9, 13, Layout.RowMajor, random);
            using var workers = new Workers(1);
            a.View[4, 10] = double.NaN;
            b.View[3, 12] = double.PositiveInfinity;
            Gemm.Multiply(a.View, b.View, c.View, false, workers, path);
            for (int i = 0; i < 9; i++)
            {
                for (int j = 0; j < 13; j++)
                    Assert.Equal(i != 4 && j != 12, double.IsFinite(c.View[i, j]));
            }
        }
    }

    [Fact]
    public void Shapes_that_do_not_match_are_refused()
    {
        var random = new Random(3);
        using var a = new StridedMatrix<Complex>(3, 4, Layout.RowMajor, random);
        using var b = new StridedMatrix<Complex>(5, 2, Layout.RowMajor, random);
        using var c = new StridedMatrix<Complex>(3, 2, Layout.RowMajor, random);
        using var workers = new Workers(1);
        ArgumentException e = Assert.Throws<ArgumentException>(
            () => Gemm.Multiply(a.View, b.View, c.View, false, workers, SimdPath.Portable));
        Assert.Contains("3 x 4", e.Message, StringComparison.Ordinal);
        MatrixView<Complex> conjugated = c.View.Adjoint.Transposed;
        Assert.Throws<ArgumentException>(
            () => Gemm.Multiply(a.View, b.View.Slice(0, 0, 4, 2), conjugated, false, workers, SimdPath.Portable));
    }

    [Fact]
    public void A_small_product_allocates_nothing()
    {
        var random = new Random(4);
        using var a = new StridedMatrix<double>(13, 17, Layout.ColumnMajor, random);
        using var b = new StridedMatrix<double>(17, 19, Layout.ColumnMajor, random);
        using var c = new StridedMatrix<double>(13, 19, Layout.RowMajor, random);
        using var workers = new Workers(1);
        Gemm.Multiply(a.View, b.View, c.View, false, workers, SimdPath.Avx2);
        long before = GC.GetAllocatedBytesForCurrentThread();
        for (int i = 0; i < 100; i++)
            Gemm.Multiply(a.View, b.View, c.View, true, workers, SimdPath.Avx2);
        Assert.Equal(before, GC.GetAllocatedBytesForCurrentThread());
    }

    private static Case Draw(Random random) => new(
        (Layout)random.Next(5), (Layout)random.Next(5), (Layout)random.Next(5),
        random.Next(2) == 1, random.Next(2) == 1, random.Next(2) == 1);

    private static void AssertMatchesPlain<T>(Case layout, int m, int k, int n, SimdPath path, Random random)
        where T : unmanaged, INumberBase<T>
    {
        using var a = new StridedMatrix<T>(m, k, layout.A, random, layout.ConjugateA);
        using var b = new StridedMatrix<T>(k, n, layout.B, random, layout.ConjugateB);
        int seed = random.Next();
        using var c = new StridedMatrix<T>(m, n, layout.C, new Random(seed));
        using var expected = new StridedMatrix<T>(m, n, Layout.RowMajor, new Random(seed));
        using var workers = new Workers(1);
        Gemm.Multiply(a.View, b.View, c.View, layout.Accumulate, workers, path);
        new PlainKernels<T>().Multiply(a.View, b.View, expected.View, layout.Accumulate);
        for (int i = 0; i < m; i++)
        {
            for (int j = 0; j < n; j++)
            {
                // k terms of at most 1/2 each (complex), each rounded a few times; 1 more for C.
                double bound = 4e-16 * (k + 2) * (Math.Sqrt(k) + 1);
                double error = Scalar.Magnitude(c.View[i, j] - expected.View[i, j]);
                Assert.True(error <= bound, $"{layout} {path} {m}x{k}x{n} at ({i}, {j}): error {error}");
            }
        }

        c.AssertGuardsIntact();
    }

    private static void AssertSameBits<T>(int m, int k, int n, int threads, params SimdPath[] paths)
        where T : unmanaged, INumberBase<T>
    {
        foreach (Layout layout in Enum.GetValues<Layout>())
        {
            T[] reference = Product<T>(m, k, n, layout, 1, SimdPath.Avx2);
            foreach (SimdPath path in paths.Length == 0 ? Paths : paths)
            {
                T[] result = Product<T>(m, k, n, layout, threads, path);
                Assert.True(
                    MemoryMarshal.AsBytes<T>(reference).SequenceEqual(MemoryMarshal.AsBytes<T>(result)),
                    $"{typeof(T).Name} {layout} {path} {m}x{k}x{n} on {threads} threads differs");
            }
        }
    }

    private static T[] Product<T>(int m, int k, int n, Layout layout, int threads, SimdPath path)
        where T : unmanaged, INumberBase<T>
    {
        var random = new Random(m + k + n);
        using var a = new StridedMatrix<T>(m, k, layout, random, conjugated: true);
        using var b = new StridedMatrix<T>(k, n, layout == Layout.RowMajor ? Layout.ColumnMajor : Layout.RowMajor, random);
        using var c = new StridedMatrix<T>(m, n, layout, random);
        using var workers = new Workers(threads);
        Gemm.Multiply(a.View, b.View, c.View, true, workers, path);
        return c.ToArray();
    }

    private sealed record Case(Layout A, Layout B, Layout C, bool ConjugateA, bool ConjugateB, bool Accumulate);
}
