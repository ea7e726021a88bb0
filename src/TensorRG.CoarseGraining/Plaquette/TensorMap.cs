using System.Collections.Immutable;
using System.Numerics;
using TensorRG.Tensors;
using TensorRG.Tensors.Decompositions;

namespace TensorRG.CoarseGraining.Plaquette;

/// <summary>The matrix (first two legs) -> (last two legs) of an explicit four-leg tensor.</summary>
/// <typeparam name="T">Element type.</typeparam>
internal sealed class TensorMap<T> : ILinearMap<T>, IDisposable
    where T : unmanaged, INumberBase<T>
{
    private readonly TensorAlgebra<T> _algebra;
    private readonly Tensor<T> _tensor;
    private readonly Tensor<T> _conjugate;

    public TensorMap(TensorAlgebra<T> algebra, Tensor<T> tensor)
    {
        _algebra = algebra;
        _tensor = tensor;
        _conjugate = tensor.Conjugate();
    }

    public ImmutableArray<Leg> RowLegs => [_tensor.Legs[0], _tensor.Legs[1]];

    public ImmutableArray<Leg> ColumnLegs => [_tensor.Legs[2], _tensor.Legs[3]];

    public Tensor<T> Apply(Tensor<T> block) => _algebra.Contract(_tensor, [2, 3], block, [0, 1]);

    public Tensor<T> ApplyAdjoint(Tensor<T> block) => _algebra.Contract(_conjugate, [0, 1], block, [0, 1]);

    public Tensor<T> ToTensor() => _tensor.Clone();

    public void Dispose() => _conjugate.Dispose();
}
