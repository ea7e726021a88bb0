using System.Numerics;
using MathNet.Numerics.LinearAlgebra;
using TensorRG.Tensors.Kernels;

namespace TensorRG.Tensors.Decompositions;

/// <summary>Eigenvalues of square graded matrices without symmetry, sector by sector, through Math.NET.</summary>
public static class GeneralEigen
{
    /// <summary>All eigenvalues with their charges, by descending magnitude.</summary>
    /// <typeparam name="T">Element type.</typeparam>
    /// <param name="matrix">A tensor of two legs, the second the dual of the first, without flux.</param>
    /// <exception cref="ArgumentException">Not such a tensor.</exception>
    /// <exception cref="DecompositionException">NaN or infinity in the matrix, or no convergence.</exception>
    public static IReadOnlyList<(Charge Charge, Complex Value)> Values<T>(Tensor<T> matrix)
        where T : unmanaged, INumberBase<T>
    {
        ArgumentNullException.ThrowIfNull(matrix);
        if (matrix.Rank != 2 || matrix.Flux != Charge.Zero || !matrix.Legs[0].Matches(matrix.Legs[1]))
            throw new ArgumentException("Eigenvalues need two dual legs and no flux.", nameof(matrix));
        if (!double.IsFinite(TensorAlgebra<T>.LargestMagnitude(matrix)))
            throw new DecompositionException("Eigenvalues: the matrix holds NaN or infinity.");
        using BlockMatrix<T> blocks = BlockMatrix<T>.From(matrix, [0], [1]);
        var result = new List<(Charge, Complex)>();
        foreach (Sector sector in matrix.Legs[0].Sectors)
        {
            Charge rows = matrix.Legs[0].SignedCharge(matrix.Legs[0].IndexOf(sector.Charge));
            result.AddRange(OfBlock(blocks[rows]).Select(value => (sector.Charge, value)));
        }

        return [.. result
            .OrderByDescending(static x => x.Item2.Magnitude)
            .ThenBy(static x => x.Item1)
            .ThenByDescending(static x => x.Item2.Imaginary)];
    }

    private static IEnumerable<Complex> OfBlock<T>(MatrixView<T> block)
        where T : unmanaged, INumberBase<T>
    {
        if (IsZero(block))
            return new Complex[block.Rows]; // The iteration of a zero matrix does not end.
        try
        {
            if (typeof(T) == typeof(double))
            {
                Matrix<double> real = Matrix<double>.Build.Dense(block.Rows, block.Columns, (i, j) => Scalar.RealPart(block[i, j]));
                return real.Evd(Symmetricity.Asymmetric).EigenValues;
            }

            Matrix<Complex> complex = Matrix<Complex>.Build.Dense(block.Rows, block.Columns, (i, j) => Scalar.ToComplex(block[i, j]));
            return complex.Evd(Symmetricity.Asymmetric).EigenValues;
        }
        catch (MathNet.Numerics.NonConvergenceException e)
        {
            throw new DecompositionException($"Eigenvalues of a {block.Rows} x {block.Columns} matrix did not converge.", e);
        }
    }

    private static bool IsZero<T>(MatrixView<T> block)
        where T : unmanaged, INumberBase<T>
    {
        for (int i = 0; i < block.Rows; i++)
        {
            for (int j = 0; j < block.Columns; j++)
            {
                if (!T.IsZero(block[i, j]))
                    return false;
            }
        }

        return true;
    }
}
