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
    private readonly Tensor<T> _left;
    private readonly Tensor<T> _right;

    public RingPairs(TensorAlgebra<T> algebra, Tensor<T> a, Tensor<T> b, Tensor<T> c, Tensor<T> d)
    {
        _left = algebra.Contract(a, [2], b, [1]);
        _right = algebra.Contract(c, [2], d, [1]);
        Map = new ProductMap<T>(
            algebra,
            new TensorMap<T>(algebra.Kernels, _left, [0, 2], [1, 3]),
            new TensorMap<T>(algebra.Kernels, _right, [3, 1], [0, 2]));
    }

    /// <summary>The product.</summary>
    public ProductMap<T> Map { get; }

    public void Dispose()
    {
        Map.Dispose();
        _left.Dispose();
        _right.Dispose();
    }
}
