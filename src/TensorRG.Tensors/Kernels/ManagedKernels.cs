using System.Numerics;
using TensorRG.Tensors.Kernels.Decompositions;

namespace TensorRG.Tensors.Kernels;

/// <summary>
/// The default kernels: SIMD code of our own, no native library, and the same bits on any number of threads.
/// </summary>
/// <typeparam name="T"><see cref="double"/> or <see cref="Complex"/>.</typeparam>
public sealed class ManagedKernels<T> : IKernels<T>
    where T : unmanaged, INumberBase<T>
{
    private readonly PlainKernels<T> _shim = new();

    /// <inheritdoc/>
    public void Multiply(MatrixView<T> a, MatrixView<T> b, MatrixView<T> c, bool accumulate)
        => _shim.Multiply(a, b, c, accumulate);

    /// <inheritdoc/>
    public void OrthogonalFactor(MatrixView<T> a, MatrixView<T> r) => ThinQr.Factor(this, a, r);

    /// <inheritdoc/>
    public void HermitianEigen(MatrixView<T> a, Span<double> values, MatrixView<T> vectors)
        => HermitianEigenSolver.Solve(this, a, values, vectors);

    /// <inheritdoc/>
    public void SingularValues(MatrixView<T> a, MatrixView<T> u, Span<double> s, MatrixView<T> v)
        => SingularValueSolver.Solve(this, a, u, s, v);
}
