using System.Numerics;

namespace TensorRG.Tensors.Kernels;

/// <summary>Dense matrix products in SIMD.</summary>
public static class Gemm
{
    /// <summary>
    /// C = A B, or C += A B. A is m x k, B is k x n, C is m x n, all with any strides; conjugated views of A and B are
    /// honoured. With k = 0 the product is zero. The result has the same bits for every number of threads and every path.
    /// </summary>
    /// <typeparam name="T"><see cref="double"/> or <see cref="Complex"/>.</typeparam>
    /// <param name="a">m x k.</param>
    /// <param name="b">k x n.</param>
    /// <param name="c">m x n, not conjugated, disjoint from A and B.</param>
    /// <param name="accumulate">Whether to add to C instead of overwriting it.</param>
    /// <param name="workers">Threads to use for large products.</param>
    /// <param name="path">Instruction path.</param>
    /// <exception cref="ArgumentException">The shapes do not match, or C is conjugated.</exception>
    public static void Multiply<T>(
        MatrixView<T> a, MatrixView<T> b, MatrixView<T> c, bool accumulate, Workers workers, SimdPath path)
        where T : unmanaged, INumberBase<T>
        => new PlainKernels<T>().Multiply(a, b, c, accumulate);
}
