using System.Numerics;
using TensorRG.Tensors.Kernels.Decompositions;

namespace TensorRG.Tensors.Decompositions;

/// <summary>Linear systems with Hermitian positive graded matrices, sector by sector, by Cholesky factors.</summary>
public static class GradedSolve
{
    /// <summary>
    /// X with (H + shift) X = B. A pivot that round-off leaves below the shift is taken to be the shift.
    /// </summary>
    /// <typeparam name="T">Element type.</typeparam>
    /// <param name="matrix">H[rows, columns], Hermitian and positive semidefinite but for round-off, without flux; the second half of its legs are the duals of the first.</param>
    /// <param name="shift">A positive number, well above the round-off of H.</param>
    /// <param name="right">B: the row legs of H, then one more leg; without flux.</param>
    /// <returns>X, with the legs of B.</returns>
    /// <exception cref="ArgumentException">The legs do not fit or the shift is not positive.</exception>
    public static Tensor<T> Positive<T>(Tensor<T> matrix, double shift, Tensor<T> right)
        where T : unmanaged, INumberBase<T>
    {
        ArgumentNullException.ThrowIfNull(matrix);
        ArgumentNullException.ThrowIfNull(right);
        int half = matrix.Rank / 2;
        if (matrix.Flux != Charge.Zero || right.Flux != Charge.Zero || right.Rank != half + 1
            || !Enumerable.Range(0, half).All(i => matrix.Legs[i].Matches(matrix.Legs[half + i]) && matrix.Legs[i].Equals(right.Legs[i])))
            throw new ArgumentException($"A matrix {matrix} and a right-hand side {right} do not make a system.", nameof(right));
        if (!(shift > 0))
            throw new ArgumentException($"The shift must be positive, not {shift}.", nameof(shift));
        int[] rows = [.. Enumerable.Range(0, half)];
        using BlockMatrix<T> h = BlockMatrix<T>.From(matrix, rows, [.. Enumerable.Range(half, half)], copy: true);
        using BlockMatrix<T> x = BlockMatrix<T>.From(right, rows, [half], copy: true);
        foreach (Charge charge in x.Charges)
            Cholesky.Solve(h[charge], shift, x[charge]);
        return x.ToTensor();
    }
}
