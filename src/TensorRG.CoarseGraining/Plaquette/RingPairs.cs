using System.Numerics;
using TensorRG.Tensors;
using TensorRG.Tensors.Decompositions;

namespace TensorRG.CoarseGraining.Plaquette;

/// <summary>
/// The ring (a b) -> (c d) as a product of two matrices, one for each pair of neighbouring pieces: half the operations of
/// <see cref="RingMap{T}"/> and none of its gathering, for memory of O(chi^4). The four-leg tensor itself is still never formed.
/// </summary>
/// <typeparam name="T">Element type.</typeparam>
internal sealed class RingPairs<T> : IDisposable
    where T : unmanaged, INumberBase<T>
{
    public RingPairs(TensorAlgebra<T> algebra, Tensor<T> a, Tensor<T> b, Tensor<T> c, Tensor<T> d)
    {
        Map = new ProductMap<T>(algebra, Pair(algebra, a, b, [0, 2], [1, 3]), Pair(algebra, c, d, [3, 1], [0, 2]));
    }

    /// <summary>The product.</summary>
    public ProductMap<T> Map { get; }

    public void Dispose() => Map.Dispose();

    private static TensorMap<T> Pair(TensorAlgebra<T> algebra, Tensor<T> first, Tensor<T> second, ReadOnlySpan<int> rows, ReadOnlySpan<int> columns)
    {
        using Tensor<T> pair = algebra.Contract(first, [2], second, [1]);
        return new TensorMap<T>(algebra.Kernels, pair, rows, columns, copy: true);
    }
}
