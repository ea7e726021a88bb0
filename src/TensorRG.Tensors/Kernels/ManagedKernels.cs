using System.Numerics;
using TensorRG.Tensors.Kernels.Decompositions;

namespace TensorRG.Tensors.Kernels;

/// <summary>
/// The default kernels: SIMD code of our own, no native library, and the same bits on any number of threads and on every
/// instruction path. An object may be used from one thread at a time or from many; calls that find the workers busy run
/// on their caller.
/// </summary>
/// <typeparam name="T"><see cref="double"/> or <see cref="Complex"/>.</typeparam>
/// <param name="workers">Threads for large problems; shared, not owned.</param>
/// <param name="path">Instruction path of the matrix product.</param>
public sealed class ManagedKernels<T>(Workers workers, SimdPath path) : IKernels<T>
    where T : unmanaged, INumberBase<T>
{
    /// <summary>Multiply-adds below which products stay on one thread.</summary>
    private const double SmallestShared = 128 * 128 * 128;

    /// <summary>Threads for large problems.</summary>
    internal Workers Workers { get; } = workers;

    /// <inheritdoc/>
    public void Multiply(MatrixView<T> a, MatrixView<T> b, MatrixView<T> c, bool accumulate)
        => Gemm.Multiply(a, b, c, accumulate, Workers, path);

    /// <inheritdoc/>
    public void MultiplyEach(MatrixView<T> a, MatrixView<T> b, nint stepB, MatrixView<T> c, nint stepC, int count, bool accumulate)
    {
        double work = (double)a.Rows * a.Columns * b.Columns * count;
        if (Workers.Threads == 1 || count < Workers.Threads || work < SmallestShared)
            Part(0, count);
        else
            Workers.Run(Workers.Threads, i => Part(count * i / Workers.Threads, count * (i + 1) / Workers.Threads));

        void Part(int first, int end)
        {
            for (int i = first; i < end; i++)
                Gemm.Multiply(a, b.Advanced(i * stepB), c.Advanced(i * stepC), accumulate, Workers, path);
        }
    }

    /// <inheritdoc/>
    public void RunEach(int parts, Action<int> body) => Workers.Run(parts, body);

    /// <inheritdoc/>
    /// <exception cref="ArgumentException">A has fewer rows than columns.</exception>
    /// <exception cref="DecompositionException">A holds a NaN or infinity.</exception>
    public void OrthogonalFactor(MatrixView<T> a, MatrixView<T> r) => ThinQr.Factor(this, a, r);

    /// <inheritdoc/>
    public void HermitianEigen(MatrixView<T> a, Span<double> values, MatrixView<T> vectors)
        => HermitianEigenSolver.Solve(this, a, values, vectors);

    /// <inheritdoc/>
    public void SingularValues(MatrixView<T> a, MatrixView<T> u, Span<double> s, MatrixView<T> v)
        => SingularValueSolver.Solve(this, a, u, s, v);
}
