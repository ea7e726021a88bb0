using System.Numerics;
using TensorRG.Tensors.Kernels;

namespace TensorRG.Tensors.Decompositions;

/// <summary>QR decomposition of a graded tensor, sector by sector.</summary>
public static class GradedQr
{
    /// <summary>
    /// M[rows, columns] = Q[rows, bond] R[bond, columns] with orthonormal columns of Q. In each sector the bond has
    /// min(rows, columns) states; it leaves Q. R is upper triangular with non-negative diagonal where there are no more columns than rows.
    /// </summary>
    /// <typeparam name="T">Element type.</typeparam>
    /// <param name="kernels">Dense kernels.</param>
    /// <param name="tensor">A tensor without flux.</param>
    /// <param name="rowAxes">Legs that make the rows.</param>
    /// <param name="columnAxes">The other legs.</param>
    /// <exception cref="ArgumentException">The tensor has flux.</exception>
    public static (Tensor<T> Q, Tensor<T> R) Compute<T>(
        IKernels<T> kernels, Tensor<T> tensor, ReadOnlySpan<int> rowAxes, ReadOnlySpan<int> columnAxes)
        where T : unmanaged, INumberBase<T>
    {
        ArgumentNullException.ThrowIfNull(kernels);
        ArgumentNullException.ThrowIfNull(tensor);
        if (tensor.Flux != Charge.Zero)
            throw new ArgumentException("Only a tensor without flux can be decomposed.", nameof(tensor));
        using BlockMatrix<T> matrix = BlockMatrix<T>.From(tensor, rowAxes, columnAxes, copy: true);
        AbelianGroup group = matrix.Rows.Group;
        var bond = new Leg(group, Arrow.Out, matrix.Charges.Select(q => new Sector(q, Math.Min(matrix[q].Rows, matrix[q].Columns))));
        using BlockMatrix<T> left = BlockMatrix<T>.Allocate(matrix.Rows, new FusedSpace(group, [bond]), Charge.Zero);
        using BlockMatrix<T> right = BlockMatrix<T>.Allocate(new FusedSpace(group, [bond.Dual]), matrix.Columns, Charge.Zero);
        foreach (Charge charge in matrix.Charges)
            Factor(kernels, matrix[charge], left[charge], right[charge]);
        return (left.ToTensor(), right.ToTensor());
    }

    /// <summary>
    /// Replaces the vectors of a block (leading legs: components; last leg: vectors) by an orthonormal basis of their
    /// span, sector by sector, and returns the triangular factors. Every sector needs at least as many components as vectors.
    /// </summary>
    internal static (Tensor<T> Basis, BlockMatrix<T> Triangles) Orthonormalize<T>(IKernels<T> kernels, Tensor<T> block)
        where T : unmanaged, INumberBase<T>
    {
        int last = block.Rank - 1;
        using BlockMatrix<T> matrix = BlockMatrix<T>.From(block, [.. Enumerable.Range(0, last)], [last], copy: true);
        Leg vectors = block.Legs[last];
        var outgoing = new FusedSpace(vectors.Group, [vectors]);
        var ingoing = new FusedSpace(vectors.Group, [vectors.Dual]);
        BlockMatrix<T> triangles = BlockMatrix<T>.Allocate(ingoing, outgoing, Charge.Zero);
        foreach (Charge charge in matrix.Charges)
            kernels.OrthogonalFactor(matrix[charge], triangles[charge]);
        return (matrix.ToTensor(), triangles);
    }

    private static void Factor<T>(IKernels<T> kernels, MatrixView<T> a, MatrixView<T> q, MatrixView<T> r)
        where T : unmanaged, INumberBase<T>
    {
        SvdAssembly.CopyColumns(a.Slice(0, 0, a.Rows, q.Columns), q);
        if (a.Rows >= a.Columns)
        {
            kernels.OrthogonalFactor(q, r);
            return;
        }

        kernels.OrthogonalFactor(q, r.Slice(0, 0, q.Columns, q.Columns));
        kernels.Multiply(q.Adjoint, a, r, accumulate: false);
    }
}
