using System.Globalization;
using TensorRG.Tensors.Kernels;

namespace TensorRG.Benchmarks;

/// <summary>
/// Permutations of tensor legs beside a plain contiguous copy of the same size (the bound set by memory). Bytes read and
/// written both count.
/// </summary>
internal static unsafe class CopyBenchmark
{
    private static readonly (int[] Dims, int[] Order)[] Cases =
    [
        ([4, 4, 4, 4], [0, 2, 1, 3]), ([4, 4, 4, 4], [3, 2, 1, 0]), ([12, 12], [1, 0]), ([8, 8, 8, 8], [0, 2, 1, 3]), ([8, 8, 8, 8], [2, 3, 0, 1]), ([13, 13, 13, 13], [3, 1, 2, 0]),
        ([24, 24, 24, 24], [0, 2, 1, 3]), ([24, 24, 24, 24], [2, 3, 0, 1]), ([24, 24, 24, 24], [3, 1, 2, 0]), ([24, 24, 24, 24], [3, 2, 1, 0]),
        ([32, 32, 32, 32], [3, 2, 1, 0]), ([1024, 1024], [1, 0]), ([48, 48, 48, 48], [3, 2, 1, 0]), ([48, 48, 48, 48], [0, 2, 1, 3]),
    ];

    /// <summary>Prints the table; returns 0.</summary>
    public static int Run()
    {
        using var two = new Workers(2);
        Console.WriteLine("dims -> order of legs            one thread: ns     GB/s   two: GB/s   memcpy GB/s");
        foreach ((int[] dims, int[] order) in Cases)
            Measure(dims, order, two);
        return 0;
    }

    private static void Measure(int[] dims, int[] order, Workers two)
    {
        long volume = dims.Aggregate(1L, (v, d) => v * d);
        using AlignedBuffer<double> a = BufferPool.RentZeroed<double>(volume), b = BufferPool.RentZeroed<double>(volume);
        double* pa = a.Data, pb = b.Data;
        nint[] source = RowMajor(dims);
        nint[] permuted = [.. order.Select(leg => source[leg])];
        int[] extents = [.. order.Select(leg => dims[leg])];
        nint[] target = RowMajor(extents);
        double[] seconds = Stopwatches.Best(
            7,
            0.02,
            () => StridedCopy.Run(extents, pa, permuted, pb, target, false),
            () => StridedCopy.Run(extents, pa, permuted, pb, target, false, two),
            () => Buffer.MemoryCopy(pa, pb, volume * 8, volume * 8));
        double gigabytes = volume * 16e-9;
        string name = $"{string.Join("x", dims)} -> {string.Join(",", order)}";
        Console.WriteLine(string.Create(CultureInfo.InvariantCulture, $"{name,-32} {seconds[0] * 1e9,14:F0} {gigabytes / seconds[0],8:F1} {gigabytes / seconds[1],11:F1} {gigabytes / seconds[2],13:F1}"));
    }

    private static nint[] RowMajor(int[] dims)
    {
        var strides = new nint[dims.Length];
        nint step = 1;
        for (int i = dims.Length - 1; i >= 0; i--)
        {
            strides[i] = step;
            step *= dims[i];
        }

        return strides;
    }
}
