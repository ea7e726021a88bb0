using System.Numerics;
using TensorRG.Tensors;
using TensorRG.Tensors.Decompositions;

namespace TensorRG.Boundary;

/// <summary>The isometric factor of a polar decomposition.</summary>
internal static class UnitaryFactor
{
    /// <summary>Keeps every singular value, zeros included: an isometry must not lose a column.</summary>
    public static readonly CutRule KeepAll = new(int.MaxValue, MultipletGap: 0, RelativeFloor: -1);

    /// <summary>U V for M = U s V: the isometry nearest to M, with the legs of M in the order rows, columns.</summary>
    public static Tensor<T> Of<T>(TensorAlgebra<T> algebra, Tensor<T> tensor, ReadOnlySpan<int> rows, ReadOnlySpan<int> columns)
        where T : unmanaged, INumberBase<T>
    {
        TruncatedSvd<T> svd = DenseSvd.Compute(algebra.Kernels, tensor, rows, columns, KeepAll);
        using Tensor<T> u = svd.U, v = svd.V;
        return algebra.Contract(u, [rows.Length], v, [0]);
    }
}
