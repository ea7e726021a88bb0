using System.Numerics;

namespace TensorRG.Tensors.Kernels;

/// <summary>
/// Dense linear algebra on views, for one element type. Inputs and outputs may have any strides; an output never
/// overlaps an input unless the member says "in place". Implementations give the same bits on every call with the same
/// inputs.
/// </summary>
/// <typeparam name="T">Element type, <see cref="double"/> or <see cref="Complex"/>.</typeparam>
public interface IKernels<T>
    where T : unmanaged, INumberBase<T>
{
    /// <summary>
    /// C = A B, or C += A B. A is m x k, B is k x n, C is m x n; conjugated views of A and B are honoured.
    /// With k = 0 the product is zero.
    /// </summary>
    /// <param name="a">m x k.</param>
    /// <param name="b">k x n.</param>
    /// <param name="c">m x n, not conjugated, disjoint from A and B.</param>
    /// <param name="accumulate">Whether to add to C instead of overwriting it.</param>
    void Multiply(MatrixView<T> a, MatrixView<T> b, MatrixView<T> c, bool accumulate);

    /// <summary>
    /// The products C_i = A B_i, or C_i += A B_i, for B_i and C_i that follow one another in memory at fixed distances.
    /// </summary>
    /// <param name="a">m x k.</param>
    /// <param name="b">B_0, k x n.</param>
    /// <param name="stepB">Distance in elements from B_i to B_(i+1).</param>
    /// <param name="c">C_0, m x n, not conjugated.</param>
    /// <param name="stepC">Distance in elements from C_i to C_(i+1); the C_i do not overlap.</param>
    /// <param name="count">Number of products.</param>
    /// <param name="accumulate">Whether to add to the C_i instead of overwriting them.</param>
    unsafe void MultiplyEach(MatrixView<T> a, MatrixView<T> b, nint stepB, MatrixView<T> c, nint stepC, int count, bool accumulate)
    {
        for (int i = 0; i < count; i++)
            Multiply(a, b.Advanced(i * stepB), c.Advanced(i * stepC), accumulate);
    }

    /// <summary>
    /// Runs independent pieces of work that each call kernels, on as many threads as these kernels have. Kernels called
    /// from a piece stay on its thread. The default runs one piece after the other.
    /// </summary>
    /// <param name="parts">Number of pieces.</param>
    /// <param name="body">Does piece i, from 0 to parts - 1.</param>
    void RunEach(int parts, Action<int> body)
    {
        ArgumentNullException.ThrowIfNull(body);
        for (int i = 0; i < parts; i++)
            body(i);
    }

    /// <summary>
    /// Thin QR in place: A (m x n, m >= n) = Q R with Q^H Q = 1 to round-off, R upper triangular with real
    /// non-negative diagonal. A rank-deficient A still gives orthonormal Q.
    /// </summary>
    /// <param name="a">m x n on entry A, on return Q.</param>
    /// <param name="r">n x n, overwritten with R (zeros below the diagonal).</param>
    void OrthogonalFactor(MatrixView<T> a, MatrixView<T> r);

    /// <summary>
    /// Eigendecomposition of a Hermitian A (n x n): A V = V diag(values), V unitary, values in descending order.
    /// Only Hermitian input is defined; A is left unchanged.
    /// </summary>
    /// <param name="a">n x n, Hermitian.</param>
    /// <param name="values">n numbers, descending.</param>
    /// <param name="vectors">n x n, column j belongs to values[j].</param>
    /// <exception cref="DecompositionException">The iteration did not converge, or A holds a NaN or infinity.</exception>
    void HermitianEigen(MatrixView<T> a, Span<double> values, MatrixView<T> vectors);

    /// <summary>
    /// Thin singular value decomposition: A (m x n) = U diag(s) V^H with k = min(m, n), s in descending order,
    /// U (m x k) and V (n x k) with orthonormal columns even where s is zero. Small singular values are accurate to
    /// round-off of the largest one or better. A is left unchanged. Signs are not fixed here.
    /// </summary>
    /// <param name="a">m x n.</param>
    /// <param name="u">m x k.</param>
    /// <param name="s">k numbers, descending, non-negative.</param>
    /// <param name="v">n x k (not adjoint: column j is the right singular vector j).</param>
    /// <exception cref="DecompositionException">The iteration did not converge, or A holds a NaN or infinity.</exception>
    void SingularValues(MatrixView<T> a, MatrixView<T> u, Span<double> s, MatrixView<T> v);
}
