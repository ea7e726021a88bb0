using System.Collections.Immutable;
using System.Numerics;
using TensorRG.Tensors.Kernels;

namespace TensorRG.Tensors.Decompositions;

/// <summary>
/// The matrix between some legs of an explicit tensor and the rest. The tensor is read as a block-diagonal matrix once; after that each
/// application is one matrix product a sector.
/// </summary>
/// <typeparam name="T">Element type.</typeparam>
public sealed class TensorMap<T> : ILinearMap<T>, IDisposable
    where T : unmanaged, INumberBase<T>
{
    private readonly IKernels<T> _kernels;
    private readonly BlockMatrix<T> _matrix;

    /// <summary>Reads a tensor as a matrix.</summary>
    /// <param name="kernels">Dense kernels.</param>
    /// <param name="tensor">A tensor without flux; it must not be disposed before the map.</param>
    /// <param name="rowAxes">Legs that make the rows.</param>
    /// <param name="columnAxes">The other legs.</param>
    /// <exception cref="ArgumentException">The tensor has flux.</exception>
    public TensorMap(IKernels<T> kernels, Tensor<T> tensor, ReadOnlySpan<int> rowAxes, ReadOnlySpan<int> columnAxes)
    {
        ArgumentNullException.ThrowIfNull(kernels);
        ArgumentNullException.ThrowIfNull(tensor);
        if (tensor.Flux != Charge.Zero)
            throw new ArgumentException("Only a tensor without flux can be decomposed.", nameof(tensor));
        _kernels = kernels;
        _matrix = BlockMatrix<T>.From(tensor, rowAxes, columnAxes);
    }

    /// <inheritdoc/>
    public ImmutableArray<Leg> RowLegs => _matrix.Rows.Legs;

    /// <inheritdoc/>
    public ImmutableArray<Leg> ColumnLegs => _matrix.Columns.Legs;

    /// <inheritdoc/>
    public Tensor<T> Apply(Tensor<T> block) => Move(block, RowLegs, adjoint: false);

    /// <inheritdoc/>
    public Tensor<T> ApplyAdjoint(Tensor<T> block) => Move(block, [.. ColumnLegs.Select(static leg => leg.Dual)], adjoint: true);

    /// <inheritdoc/>
    public Tensor<T> ToTensor() => _matrix.ToTensor();

    /// <inheritdoc/>
    public void Dispose() => _matrix.Dispose();

    internal TruncatedSvd<T> Decompose(CutRule rule) => DenseSvd.Compute(_kernels, _matrix, rule);

    private Tensor<T> Move(Tensor<T> block, ImmutableArray<Leg> target, bool adjoint)
    {
        ArgumentNullException.ThrowIfNull(block);
        int last = block.Rank - 1;
        using BlockMatrix<T> source = BlockMatrix<T>.From(block, [.. Enumerable.Range(0, last)], [last]);
        using BlockMatrix<T> result = BlockMatrix<T>.Allocate(new FusedSpace(_matrix.Rows.Group, target), source.Columns, Charge.Zero);
        foreach (Charge charge in result.Charges)
        {
            if (_matrix.Contains(charge) && source.Contains(charge))
                _kernels.Multiply(adjoint ? _matrix[charge].Adjoint : _matrix[charge], source[charge], result[charge], accumulate: false);
            else
                result.Clear(charge);
        }

        return result.ToTensor();
    }
}
