using System.Numerics;
using MathNet.Numerics.LinearAlgebra;
using TensorRG.Tensors.Decompositions;
using TensorRG.Tensors.Tests.Graded;

namespace TensorRG.Tensors.Tests.Decompositions;

/// <summary>Matrices for decompositions, and the dense oracle for their values.</summary>
internal static class GradedMatrices
{
    /// <summary>
    /// M[rows, columns] with given singular values in each sector, between random orthonormal vectors. Sector i has
    /// charge i of a cyclic group.
    /// </summary>
    public static Tensor<T> WithSpectrum<T>(TensorAlgebra<T> algebra, RandomCase random, AbelianGroup group, int[] rows, int[] columns, double[][] values)
        where T : unmanaged, INumberBase<T>
    {
        Leg row = Graded(group, Arrow.In, rows), column = Graded(group, Arrow.Out, columns);
        Leg bond = Graded(group, Arrow.Out, [.. values.Select(static v => v.Length)]);
        using Tensor<T> left = Basis(algebra, random, row, bond), right = Basis(algebra, random, column.Dual, bond);
        using Tensor<T> scaled = TensorAlgebra<T>.ScaleLeg(left, 1, new BondWeights(bond, [.. values]));
        using Tensor<T> adjoint = right.Conjugate();
        return algebra.Contract(scaled, [1], adjoint, [1]);
    }

    public static Leg Graded(AbelianGroup group, Arrow arrow, params int[] dimensions)
        => new(group, arrow, dimensions.Select(static (d, i) => new Sector(new Charge(i), d)));

    /// <summary>Singular values of the whole dense matrix, charges ignored, descending (Math.NET).</summary>
    public static double[] DenseSingularValues<T>(NaiveTensor<T> tensor, int rowAxes)
        where T : unmanaged, INumberBase<T>
    {
        int rows = tensor.Dimensions[..rowAxes].Aggregate(1, static (x, y) => x * y);
        Complex[] flat = [.. tensor.Positions.Select(p => Scalar.ToComplex(tensor[p]))];
        if (flat.Length == 0)
            return [];
        return [.. Matrix<Complex>.Build.DenseOfRowMajor(rows, flat.Length / rows, flat).Svd(computeVectors: false).S.Select(static s => s.Real).OrderDescending()];
    }

    /// <summary>All values of a bond, descending over its sectors.</summary>
    public static double[] Descending(BondWeights weights) => [.. weights.Values.SelectMany(static v => v).OrderDescending()];

    /// <summary>U s V.</summary>
    public static Tensor<T> Product<T>(TensorAlgebra<T> algebra, TruncatedSvd<T> svd)
        where T : unmanaged, INumberBase<T>
    {
        using Tensor<T> scaled = TensorAlgebra<T>.ScaleLeg(svd.U, svd.U.Rank - 1, svd.Weights);
        return algebra.Contract(scaled, [svd.U.Rank - 1], svd.V, [0]);
    }

    /// <summary>The columns of V^H, which lies in the result with its bond last.</summary>
    public static Tensor<T> RightVectors<T>(TruncatedSvd<T> svd)
        where T : unmanaged, INumberBase<T>
    {
        using Tensor<T> conjugate = svd.V.Conjugate();
        return conjugate.Permute([.. Enumerable.Range(1, svd.V.Rank - 1), 0]);
    }

    private static Tensor<T> Basis<T>(TensorAlgebra<T> algebra, RandomCase random, Leg row, Leg bond)
        where T : unmanaged, INumberBase<T>
    {
        using Tensor<T> start = random.Tensor<T>([row, bond]);
        (Tensor<T> q, Tensor<T> r) = GradedQr.Compute(algebra.Kernels, start, [0], [1]);
        r.Dispose();
        return q;
    }
}
