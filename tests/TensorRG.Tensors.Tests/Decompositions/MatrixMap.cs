using System.Collections.Immutable;
using System.Numerics;
using TensorRG.Tensors.Decompositions;

namespace TensorRG.Tensors.Tests.Decompositions;

/// <summary>A two-leg tensor as a linear map that counts how often it is applied.</summary>
internal sealed class MatrixMap<T>(TensorAlgebra<T> algebra, Tensor<T> matrix) : ILinearMap<T>
    where T : unmanaged, INumberBase<T>
{
    private readonly Tensor<T> _conjugate = matrix.Conjugate();

    public int Applications { get; private set; }

    public int Expansions { get; private set; }

    public ImmutableArray<Leg> RowLegs => [matrix.Legs[0]];

    public ImmutableArray<Leg> ColumnLegs => [matrix.Legs[1]];

    public Tensor<T> Apply(Tensor<T> block)
    {
        Applications++;
        return algebra.Contract(matrix, [1], block, [0]);
    }

    public Tensor<T> ApplyAdjoint(Tensor<T> block)
    {
        Applications++;
        return algebra.Contract(_conjugate, [0], block, [0]);
    }

    public Tensor<T> ToTensor()
    {
        Expansions++;
        return matrix.Clone();
    }
}
