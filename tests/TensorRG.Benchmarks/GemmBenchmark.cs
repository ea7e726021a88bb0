using System.Globalization;
using System.Numerics;
using MathNet.Numerics.LinearAlgebra;
using TensorRG.Tensors.Kernels;

namespace TensorRG.Benchmarks;

/// <summary>
/// Matrix products of our kernels beside OpenBLAS and the managed provider of Math.NET, in one process, taking turns.
/// Goal: at n = 1024 at least <see cref="Goal"/> of OpenBLAS, on one and on two threads.
/// </summary>
internal static unsafe class GemmBenchmark
{
    /// <summary>The least share of OpenBLAS's speed at n = 1024.</summary>
    public const double Goal = 0.9;

    private const int MathNetLargest = 300;

    private static readonly (int M, int K, int N)[] RealShapes =
    [
        (8, 8, 8), (13, 13, 13), (16, 16, 16), (24, 24, 24), (32, 32, 32), (33, 33, 33), (48, 48, 48), (64, 64, 64), (96, 96, 96),
        (128, 128, 128), (256, 256, 256), (576, 576, 576), (1024, 64, 1024), (64, 1024, 1024), (1024, 1024, 64),
        (1024, 1024, 1), (1, 1024, 1024), (1024, 1024, 1024),
    ];

    private static readonly (int M, int K, int N)[] ComplexShapes =
        [(8, 8, 8), (16, 16, 16), (32, 32, 32), (64, 64, 64), (256, 256, 256), (512, 512, 512)];

    /// <summary>Prints the tables; 1 if the goal is missed, else 0.</summary>
    public static int Run()
    {
        OpenBlas? blas = OpenBlas.Find();
        Print($"path {SimdPaths.Name(SimdPaths.FromEnvironment())}; {blas?.Description ?? "OpenBLAS not found: its columns are empty"}");
        bool met = true;
        foreach (int threads in (int[])[1, 2])
        {
            using var workers = new Workers(threads);
            blas?.SetThreads(threads);
            MathNet.Numerics.Control.UseManaged();
            MathNet.Numerics.Control.MaxDegreeOfParallelism = threads;
            Print($"\n{threads} thread(s), GFlop/s       ours   OpenBLAS   ours/OpenBLAS   Math.NET");
            foreach ((int m, int k, int n) in RealShapes)
            {
                double ratio = Measure<double>(m, k, n, blas, workers);
                met &= n != 1024 || m != 1024 || k != 1024 || blas is null || ratio >= Goal;
            }

            Print("complex");
            foreach ((int m, int k, int n) in ComplexShapes)
                Measure<Complex>(m, k, n, blas, workers);
        }

        Print($"\ngoal {Goal} of OpenBLAS at 1024^3: {(blas is null ? "not measured" : met ? "met" : "MISSED")}");
        return met ? 0 : 1;
    }

    private static double Measure<T>(int m, int k, int n, OpenBlas? blas, Workers workers)
        where T : unmanaged, INumberBase<T>, IEquatable<T>, IFormattable
    {
        int reals = sizeof(T) / sizeof(double);
        using AlignedBuffer<T> a = Random<T>((long)m * k), b = Random<T>((long)k * n), c = Random<T>((long)m * n);
        T* pa = a.Data, pb = b.Data, pc = c.Data;
        SimdPath path = SimdPaths.FromEnvironment();
        Action ours = () => Gemm.Multiply(
            new MatrixView<T>(pa, m, k), new MatrixView<T>(pb, k, n), new MatrixView<T>(pc, m, n), false, workers, path);
        Action? theirs = blas is null ? null : () => blas.Multiply(m, n, k, (double*)pa, (double*)pb, (double*)pc, reals == 2);
        double[] seconds = Stopwatches.Best(9, 0.02, ours, theirs, MathNetProduct<T>(m, k, n));
        double flops = 2.0 * reals * reals * m * n * k * 1e-9;
        double ratio = seconds[1] / seconds[0];
        Print($"{m,5} x {k,5} x {n,5} {flops / seconds[0],14:F1} {flops / seconds[1],10:F1} {ratio,15:F2} {flops / seconds[2],10:F2}");
        return ratio;
    }

    private static Action? MathNetProduct<T>(int m, int k, int n)
        where T : unmanaged, INumberBase<T>, IEquatable<T>, IFormattable
    {
        if (Math.Max(m, Math.Max(k, n)) > MathNetLargest)
            return null;
        var a = Matrix<T>.Build.Dense(m, k, T.One);
        var b = Matrix<T>.Build.Dense(k, n, T.One);
        var c = Matrix<T>.Build.Dense(m, n);
        return () => a.Multiply(b, c);
    }

    private static AlignedBuffer<T> Random<T>(long length)
        where T : unmanaged
    {
        AlignedBuffer<T> buffer = BufferPool.Rent<T>(length);
        var random = new Random(1);
        for (long i = 0; i < length * sizeof(T) / sizeof(double); i++)
            ((double*)buffer.Data)[i] = random.NextDouble() - 0.5;
        return buffer;
    }

    private static void Print(FormattableString line) => Console.WriteLine(line.ToString(CultureInfo.InvariantCulture));

    private static void Print(string line) => Console.WriteLine(line);
}
