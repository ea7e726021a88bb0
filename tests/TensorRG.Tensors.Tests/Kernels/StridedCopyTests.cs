using System.Numerics;
using CsCheck;
using TensorRG.Tensors.Kernels;

namespace TensorRG.Tensors.Tests.Kernels;

public unsafe class StridedCopyTests
{
    [Fact]
    public void Any_rank_strides_and_extents_agree_with_a_naive_loop()
    {
        Gen.Int[0, int.MaxValue - 1].Sample(
            seed =>
            {
                var random = new Random(seed);
                int rank = random.Next(7);
                int[] dims = [.. Enumerable.Range(0, rank).Select(_ => random.Next(12) == 0 ? 0 : random.Next(1, 8))];
                Compare<double>(dims, random, null);
                Compare<Complex>(dims, random, null);
            },
            iter: 2000);
    }

    [Theory]
    [InlineData(1, 1)]
    [InlineData(3, 5)]
    [InlineData(8, 8)]
    [InlineData(4, 13)]
    [InlineData(67, 130)]
    [InlineData(129, 64)]
    [InlineData(200, 1000)]
    public void Planes_of_all_sizes_are_copied_and_turned(int rows, int columns)
    {
        for (int seed = 0; seed < 12; seed++)
        {
            Compare<double>([rows, columns], new Random(seed), null);
            Compare<Complex>([rows, columns], new Random(seed), null);
        }
    }

    [Fact]
    public void Rank_sixteen_with_many_trivial_axes()
    {
        int[] dims = [2, 1, 2, 3, 1, 1, 2, 2, 1, 2, 1, 1, 2, 2, 1, 2];
        for (int seed = 0; seed < 10; seed++)
            Compare<double>(dims, new Random(seed), null);
    }

    [Fact]
    public void Large_copies_on_two_and_three_threads()
    {
        foreach (int threads in (int[])[2, 3])
        {
            using var workers = new Workers(threads);
            for (int seed = 0; seed < 8; seed++)
            {
                Compare<double>([17, 19, 16, 18], new Random(seed), workers);
                Compare<Complex>([1, 35000, 2], new Random(seed), workers);
                Compare<double>([70000], new Random(seed), workers);
            }
        }
    }

    [Fact]
    public void A_source_stride_of_zero_repeats_elements()
    {
        double* source = stackalloc double[] { 1, 2, 3 };
        double* target = stackalloc double[6];
        StridedCopy.Run([2, 3], source, [0, 1], target, [3, 1], conjugate: false);
        Assert.Equal([1, 2, 3, 1, 2, 3], new Span<double>(target, 6).ToArray());
        StridedCopy.Run([3, 2], source, [1, 0], target, [2, 1], conjugate: false);
        Assert.Equal([1, 1, 2, 2, 3, 3], new Span<double>(target, 6).ToArray());
    }

    [Fact]
    public void Lists_of_different_length_are_refused()
    {
        double x = 1, y = 2;
        double* from = &x, to = &y;
        Assert.Throws<ArgumentException>(() => StridedCopy.Run([2, 3], from, [1], to, [1, 2], conjugate: false));
        Assert.Throws<ArgumentException>(() => StridedCopy.Run(new int[65], from, new nint[65], to, new nint[65], conjugate: false));
        Assert.Equal(2, y);
    }

    [Fact]
    public void A_copy_on_one_thread_allocates_nothing()
    {
        using AlignedBuffer<double> a = BufferPool.RentZeroed<double>(10000), b = BufferPool.Rent<double>(10000);
        StridedCopy.Run([10, 10, 10, 10], a.Data, [1, 1000, 10, 100], b.Data, [1000, 100, 10, 1], false);
        long before = GC.GetAllocatedBytesForCurrentThread();
        for (int i = 0; i < 50; i++)
            StridedCopy.Run([10, 10, 10, 10], a.Data, [1, 1000, 10, 100], b.Data, [1000, 100, 10, 1], false);
        Assert.Equal(before, GC.GetAllocatedBytesForCurrentThread());
    }

    private static void Compare<T>(int[] dims, Random random, Workers? workers)
        where T : unmanaged, INumberBase<T>
    {
        nint[] sourceStrides = Strides(dims, random, out long sourceFirst, out long sourceLength);
        nint[] targetStrides = Strides(dims, random, out long targetFirst, out long targetLength);
        bool conjugate = random.Next(2) == 0;
        using AlignedBuffer<T> source = BufferPool.Rent<T>(sourceLength), target = BufferPool.Rent<T>(targetLength);
        for (int i = 0; i < sourceLength; i++)
            source.Span[i] = StridedMatrix<T>.Element(random);
        target.Span.Fill(StridedMatrix<T>.Marker);
        T[] expected = target.Span.ToArray();
        Naive(dims, source.Span, sourceFirst, sourceStrides, expected, targetFirst, targetStrides, conjugate);
        StridedCopy.Run<T>(dims, source.Data + sourceFirst, sourceStrides, target.Data + targetFirst, targetStrides, conjugate, workers);
        Assert.True(
            target.Span.SequenceEqual(expected),
            $"{typeof(T).Name} [{string.Join(',', dims)}] from [{string.Join(',', sourceStrides)}] to [{string.Join(',', targetStrides)}] conj {conjugate}");
    }

    /// <summary>Strides of a random axis order, with a gap or a reversal now and then.</summary>
    private static nint[] Strides(int[] dims, Random random, out long first, out long length)
    {
        int[] order = [.. Enumerable.Range(0, dims.Length).OrderBy(_ => random.Next())];
        var strides = new nint[dims.Length];
        long step = random.Next(4) == 0 ? 2 : 1;
        first = 8;
        foreach (int axis in order)
        {
            bool reversed = random.Next(6) == 0;
            strides[axis] = (nint)(reversed ? -step : step);
            first += reversed ? step * Math.Max(dims[axis] - 1, 0) : 0;
            step = (step * Math.Max(dims[axis], 1)) + (random.Next(5) == 0 ? 3 : 0);
        }

        length = step + 24;
        return strides;
    }

    private static void Naive<T>(
        int[] dims, Span<T> source, long s, nint[] sourceStrides, T[] target, long t, nint[] targetStrides, bool conjugate)
        where T : unmanaged, INumberBase<T>
    {
        long volume = dims.Aggregate(1L, (v, d) => v * d);
        for (long number = 0; number < volume; number++)
        {
            long rest = number, from = s, to = t;
            for (int axis = 0; axis < dims.Length; axis++)
            {
                from += rest % dims[axis] * sourceStrides[axis];
                to += rest % dims[axis] * targetStrides[axis];
                rest /= dims[axis];
            }

            target[to] = conjugate ? Scalar.Conjugate(source[(int)from]) : source[(int)from];
        }
    }
}
