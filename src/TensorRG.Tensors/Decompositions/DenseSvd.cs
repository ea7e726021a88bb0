using System.Numerics;
using TensorRG.Tensors.Kernels;

namespace TensorRG.Tensors.Decompositions;

/// <summary>Truncated singular value decomposition by a full decomposition of every sector.</summary>
public static class DenseSvd
{
    /// <summary>
    /// Decomposes a tensor between some of its legs and the rest. Signs follow a fixed convention; ties between charges
    /// go to the smaller one.
    /// </summary>
    /// <typeparam name="T">Element type.</typeparam>
    /// <param name="kernels">Dense kernels.</param>
    /// <param name="tensor">A tensor without flux.</param>
    /// <param name="rowAxes">Legs that make the rows, in the order U will have them.</param>
    /// <param name="columnAxes">The other legs, in the order V will have them.</param>
    /// <param name="rule">How many values to keep.</param>
    /// <exception cref="ArgumentException">The tensor has flux.</exception>
    /// <exception cref="DecompositionException">NaN or infinity, or no convergence, or the tensor is zero.</exception>
    public static TruncatedSvd<T> Compute<T>(
        IKernels<T> kernels, Tensor<T> tensor, ReadOnlySpan<int> rowAxes, ReadOnlySpan<int> columnAxes, CutRule rule)
        where T : unmanaged, INumberBase<T>
    {
        ArgumentNullException.ThrowIfNull(kernels);
        ArgumentNullException.ThrowIfNull(tensor);
        ArgumentNullException.ThrowIfNull(rule);
        if (tensor.Flux != Charge.Zero)
            throw new ArgumentException("Only a tensor without flux can be decomposed.", nameof(tensor));
        using BlockMatrix<T> matrix = BlockMatrix<T>.From(tensor, rowAxes, columnAxes);
        return Compute(kernels, matrix, rule);
    }

    internal static TruncatedSvd<T> Compute<T>(IKernels<T> kernels, BlockMatrix<T> matrix, CutRule rule)
        where T : unmanaged, INumberBase<T>
    {
        var factors = new Dictionary<Charge, Factors<T>>();
        try
        {
            foreach (Charge charge in matrix.Charges)
            {
                MatrixView<T> block = matrix[charge];
                var f = new Factors<T>(block.Rows, block.Columns, Math.Min(block.Rows, block.Columns));
                factors.Add(charge, f);
                kernels.SingularValues(block, f.U, f.S, f.V);
                PhaseConvention.Apply(f.U, f.V);
            }

            Dictionary<Charge, double[]> values = factors.ToDictionary(static p => p.Key, static p => p.Value.S);
            Dictionary<Charge, int> counts = SectorCut.Counts(values, rule, out bool cuts);
            if (counts.Values.Sum() == 0)
                throw new DecompositionException("The tensor is zero: it has no singular value to keep.");
            double kept = values.Sum(p => SectorCut.SquaredSum(p.Value.AsSpan(0, counts[p.Key])));
            double lost = values.Sum(p => SectorCut.SquaredSum(p.Value.AsSpan(counts[p.Key])));
            return SvdAssembly.Build(matrix.Rows, matrix.Columns, factors, counts, new Truncation(kept, lost, cuts));
        }
        finally
        {
            foreach (Factors<T> f in factors.Values)
                f.Dispose();
        }
    }
}
