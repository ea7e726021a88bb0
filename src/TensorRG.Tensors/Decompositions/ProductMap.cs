using System.Collections.Immutable;
using System.Numerics;

namespace TensorRG.Tensors.Decompositions;

/// <summary>The product of two matrices that is never formed: vectors pass through one factor, then the other.</summary>
/// <typeparam name="T">Element type.</typeparam>
public sealed class ProductMap<T> : ILinearMap<T>, IDisposable
    where T : unmanaged, INumberBase<T>
{
    private readonly TensorAlgebra<T> _algebra;
    private readonly TensorMap<T> _left;
    private readonly TensorMap<T> _right;

    /// <summary>Takes over two factors.</summary>
    /// <param name="algebra">Contractions.</param>
    /// <param name="left">Left factor; disposed with the product.</param>
    /// <param name="right">Right factor, whose row legs match the column legs of the left one; disposed with the product.</param>
    /// <exception cref="ArgumentException">The inner legs do not match.</exception>
    public ProductMap(TensorAlgebra<T> algebra, TensorMap<T> left, TensorMap<T> right)
    {
        ArgumentNullException.ThrowIfNull(left);
        ArgumentNullException.ThrowIfNull(right);
        if (left.ColumnLegs.Length != right.RowLegs.Length || left.ColumnLegs.Zip(right.RowLegs).Any(static p => !p.First.Matches(p.Second)))
            throw new ArgumentException("The column legs of the left factor do not match the row legs of the right one.", nameof(right));
        _algebra = algebra;
        _left = left;
        _right = right;
    }

    /// <inheritdoc/>
    public ImmutableArray<Leg> RowLegs => _left.RowLegs;

    /// <inheritdoc/>
    public ImmutableArray<Leg> ColumnLegs => _right.ColumnLegs;

    /// <inheritdoc/>
    public Tensor<T> Apply(Tensor<T> block)
    {
        using Tensor<T> inner = _right.Apply(block);
        return _left.Apply(inner);
    }

    /// <inheritdoc/>
    public Tensor<T> ApplyAdjoint(Tensor<T> block)
    {
        using Tensor<T> inner = _left.ApplyAdjoint(block);
        return _right.ApplyAdjoint(inner);
    }

    /// <inheritdoc/>
    public Tensor<T> ToTensor()
    {
        using Tensor<T> left = _left.ToTensor();
        using Tensor<T> right = _right.ToTensor();
        int rows = RowLegs.Length, inner = _left.ColumnLegs.Length;
        return _algebra.Contract(left, [.. Enumerable.Range(rows, inner)], right, [.. Enumerable.Range(0, inner)]);
    }

    /// <inheritdoc/>
    public void Dispose()
    {
        _left.Dispose();
        _right.Dispose();
    }
}
