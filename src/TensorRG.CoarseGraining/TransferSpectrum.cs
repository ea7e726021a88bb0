using System.Collections.Immutable;
using System.Numerics;
using TensorRG.Tensors;
using TensorRG.Tensors.Decompositions;

namespace TensorRG.CoarseGraining;

/// <summary>What the transfer matrix of one tensor says.</summary>
internal static class TransferSpectrum
{
    /// <summary>Eigenvalues kept in a record.</summary>
    private const int Lines = 12;

    /// <summary>(Tr M)^2 / Tr M^2 (Z.-C. Gu, X.-G. Wen, Phys. Rev. B 80, 155131 (2009)); the real part for complex weights.</summary>
    public static double DegeneracyRatio<T>(Tensor<T> matrix, Complex trace)
        where T : unmanaged, INumberBase<T>
    {
        Complex square = Complex.Zero;
        int n = matrix.Legs[0].Dimension;
        for (int i = 0; i < n; i++)
        {
            for (int j = 0; j < n; j++)
                square += Scalar.ToComplex(matrix.At(i, j)) * Scalar.ToComplex(matrix.At(j, i));
        }

        return (trace * trace / square).Real;
    }

    /// <summary>The leading eigenvalues relative to the largest; zeros where all vanish.</summary>
    public static ImmutableArray<SpectrumLine> Leading<T>(Tensor<T> matrix)
        where T : unmanaged, INumberBase<T>
    {
        IReadOnlyList<(Charge Charge, Complex Value)> values = GeneralEigen.Values(matrix);
        AbelianGroup group = matrix.Legs[0].Group;
        Complex first = values.Count > 0 && values[0].Value != Complex.Zero ? values[0].Value : Complex.One;
        return [.. values.Take(Lines).Select(v => new SpectrumLine(
            group.Text(v.Charge),
            v.Value.Magnitude / first.Magnitude,
            (v.Value / first).Phase))];
    }
}
