using System.Collections.Immutable;
using System.Numerics;
using TensorRG.Tensors.Kernels;

namespace TensorRG.Tensors.Decompositions;

/// <summary>
/// The matrix between some legs of an explicit tensor and the rest. The tensor is read as a block-diagonal matrix once; after that each
/// application is one matrix product a sector. For the adjoint a second copy is kept the other way round, so that the products read both
/// along their rows: gathering columns would cost as much as the product itself where there are few vectors.
/// </summary>
/// <typeparam name="T">Element type.</typeparam>
public sealed class TensorMap<T> : ILinearMap<T>, IDisposable
    where T : unmanaged, INumberBase<T>
{
    private readonly IKernels<T> _kernels;
    private readonly BlockMatrix<T> _matrix;
    private readonly Lazy<BlockMatrix<T>> _turned;

    /// <summary>Reads a tensor as a matrix.</summary>
    /// <param name="kernels">Dense kernels.</param>
    /// <param name="tensor">A tensor without flux; without <paramref name="copy"/> it must not be disposed before the map.</param>
    /// <param name="rowAxes">Legs that make the rows.</param>
    /// <param name="columnAxes">The other legs.</param>
    /// <param name="copy">Whether the map always keeps elements of its own.</param>
    /// <exception cref="ArgumentException">The tensor has flux.</exception>
    public TensorMap(IKernels<T> kernels, Tensor<T> tensor, ReadOnlySpan<int> rowAxes, ReadOnlySpan<int> columnAxes, bool copy = false)
    {
        ArgumentNullException.ThrowIfNull(kernels);
        ArgumentNullException.ThrowIfNull(tensor);
        if (tensor.Flux != Charge.Zero)
            throw new ArgumentException("Only a tensor without flux can be decomposed.", nameof(tensor));
        _kernels = kernels;
        _matrix = BlockMatrix<T>.From(tensor, rowAxes, columnAxes, copy);
        _turned = new Lazy<BlockMatrix<T>>(_matrix.Turned);
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
    public void Dispose()
    {
        _matrix.Dispose();
        if (_turned.IsValueCreated)
            _turned.Value.Dispose();
    }

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
                _kernels.Multiply(adjoint ? AdjointBlock(charge) : _matrix[charge], source[charge], result[charge], accumulate: false);
            else
                result.Clear(charge);
        }

        return result.ToTensor();
    }

    private MatrixView<T> AdjointBlock(Charge rowCharge) => _turned.Value[_matrix.ColumnCharge(rowCharge)].Conjugate;
}
