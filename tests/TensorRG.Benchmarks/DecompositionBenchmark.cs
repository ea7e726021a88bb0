using System.Globalization;
using TensorRG.Tensors.Kernels;

namespace TensorRG.Benchmarks;

/// <summary>
/// Decompositions of our kernels on one and two threads beside LAPACK (OpenBLAS) and Math.NET, in one process, taking
/// turns. Goal: <see cref="Goal"/> times LAPACK's time at most, everywhere.
/// </summary>
internal static unsafe class DecompositionBenchmark
{
    /// <summary>The most that our time may be, in units of LAPACK's on as many threads.</summary>
    public const double Goal = 5;

    private const int MathNetLargest = 128;

    /// <summary>Prints the tables; 1 if the goal is missed, else 0.</summary>
    /// <param name="tasks">Any of qr, svd, eigen; empty for all.</param>
    public static int Run(string[] tasks)
    {
        bool met = true;
        foreach (int threads in (int[])[1, 2])
        {
            IKernels<double>?[] kernels = [Open("managed", threads), Open("openblas", threads), Open("mathnet", threads)];
            Print($"\n{threads} thread(s), ms            managed   OpenBLAS   managed/OpenBLAS   Math.NET");
            if (Wanted(tasks, "qr"))
            {
                foreach ((int m, int n) in (ReadOnlySpan<(int, int)>)[(200, 20), (512, 40), (600, 60), (1024, 52), (4096, 64)])
                    met &= Compare("qr", m, n, kernels);
            }

            if (Wanted(tasks, "svd"))
            {
                foreach (int n in (ReadOnlySpan<int>)[16, 32, 44, 68, 100, 128, 256, 512])
                    met &= Compare("svd", n, n, kernels);
            }

            if (Wanted(tasks, "eigen"))
            {
                foreach (int n in (ReadOnlySpan<int>)[16, 32, 64, 128, 256, 512, 1024])
                    met &= Compare("eigen", n, n, kernels);
            }
        }

        Print($"\ngoal, at most {Goal} times LAPACK: {(met ? "met" : "MISSED")}");
        return met ? 0 : 1;
    }

    private static bool Wanted(string[] tasks, string task) => tasks.Length == 0 || tasks.Contains(task);

    private static IKernels<double>? Open(string name, int threads)
    {
        try
        {
            return Backends.Create(name, threads).For<double>();
        }
        catch (BackendUnavailableException e)
        {
            Print(e.Message);
            return null;
        }
    }

    private static bool Compare(string task, int m, int n, IKernels<double>?[] kernels)
    {
        using AlignedBuffer<double> source = Matrix(task, m, n), a = BufferPool.Rent<double>((long)m * n);
        using AlignedBuffer<double> u = BufferPool.Rent<double>((long)m * n), v = BufferPool.Rent<double>((long)n * n);
        using AlignedBuffer<double> s = BufferPool.Rent<double>(n);
        Action?[] candidates = new Action?[kernels.Length];
        for (int i = 0; i < kernels.Length; i++)
        {
            IKernels<double>? kernel = i == 2 && n > MathNetLargest ? null : kernels[i];
            candidates[i] = kernel is null ? null : () =>
            {
                var matrix = new MatrixView<double>(a.Data, m, n);
                source.Span.CopyTo(a.Span);
                if (task == "qr")
                    kernel.OrthogonalFactor(matrix, new MatrixView<double>(v.Data, n, n));
                else if (task == "svd")
                    kernel.SingularValues(matrix, new MatrixView<double>(u.Data, m, n), s.Span, new MatrixView<double>(v.Data, n, n));
                else
                    kernel.HermitianEigen(matrix, s.Span, new MatrixView<double>(v.Data, n, n));
            };
        }

        double[] seconds = Stopwatches.Best(7, n > 300 ? 0.05 : 0.02, candidates);
        double ratio = seconds[0] / seconds[1];
        Print($"{task,6} {m,5} x {n,5} {seconds[0] * 1e3,14:F3} {seconds[1] * 1e3,10:F3} {ratio,18:F2} {seconds[2] * 1e3,10:F3}");
        return double.IsNaN(ratio) || ratio <= Goal;
    }

    private static AlignedBuffer<double> Matrix(string task, int m, int n)
    {
        var random = new Random(m + n);
        AlignedBuffer<double> a = BufferPool.Rent<double>((long)m * n);
        for (int i = 0; i < m; i++)
        {
            for (int j = 0; j < n; j++)
            {
                double x = random.NextDouble() - 0.5;
                a.Data[((long)i * n) + j] = x;
                if (task == "eigen" && j < i)
                    a.Data[((long)i * n) + j] = a.Data[((long)j * n) + i];
            }
        }

        return a;
    }

    private static void Print(FormattableString line) => Console.WriteLine(line.ToString(CultureInfo.InvariantCulture));

    private static void Print(string line) => Console.WriteLine(line);
}
