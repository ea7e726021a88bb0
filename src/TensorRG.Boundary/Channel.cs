using System.Numerics;
using TensorRG.Tensors;

namespace TensorRG.Boundary;

/// <summary>
/// Maps between the cuts of a strip: an upper tensor M[a, p, b], a row A[u, l, d, r] or none, a lower tensor N[x, q, y] whose
/// legs face those of M. Left environments are FL[x, a, l] or GL[x, a], right ones FR[r, b, y] or GR[b, y].
/// Cost O(chi^3 D^2).
/// </summary>
/// <typeparam name="T">Element type.</typeparam>
/// <param name="algebra">Contractions.</param>
internal sealed class Channel<T>(TensorAlgebra<T> algebra)
    where T : unmanaged, INumberBase<T>
{
    /// <summary>FL'[y, b, r] = FL[x, a, l] M[a, p, b] A[p, l, q, r] N[x, q, y].</summary>
    public Tensor<T> Left(Tensor<T> left, Tensor<T> upper, Tensor<T> row, Tensor<T> lower)
    {
        using Tensor<T> half = Descend(left, upper, row);
        return algebra.Contract(lower, [0, 1], half, [0, 2]);
    }

    /// <summary>FR'[l, a, x] = M[a, p, b] A[p, l, q, r] N[x, q, y] FR[r, b, y].</summary>
    public Tensor<T> Right(Tensor<T> right, Tensor<T> upper, Tensor<T> row, Tensor<T> lower)
    {
        using Tensor<T> top = algebra.Contract(upper, [2], right, [1]);
        using Tensor<T> half = algebra.Contract(row, [0, 3], top, [1, 2]);
        return algebra.Contract(half, [1, 3], lower, [1, 2]);
    }

    /// <summary>GL'[y, b] = GL[x, a] M[a, p, b] N[x, p, y].</summary>
    public Tensor<T> Left(Tensor<T> left, Tensor<T> upper, Tensor<T> lower)
    {
        using Tensor<T> half = algebra.Contract(left, [1], upper, [0]);
        return algebra.Contract(lower, [0, 1], half, [0, 1]);
    }

    /// <summary>GR'[a, x] = M[a, p, b] N[x, p, y] GR[b, y].</summary>
    public Tensor<T> Right(Tensor<T> right, Tensor<T> upper, Tensor<T> lower)
    {
        using Tensor<T> half = algebra.Contract(upper, [2], right, [0]);
        return algebra.Contract(half, [1, 2], lower, [1, 2]);
    }

    /// <summary>AC'[x, q, y] = FL[x, a, l] AC[a, p, b] A[p, l, q, r] FR[r, b, y].</summary>
    public Tensor<T> Center(Tensor<T> left, Tensor<T> center, Tensor<T> row, Tensor<T> right)
    {
        using Tensor<T> half = Descend(left, center, row);
        return algebra.Contract(half, [1, 3], right, [1, 0]);
    }

    /// <summary>C'[x, y] = FL[x, a, l] C[a, b] FR[l, b, y].</summary>
    public Tensor<T> Bond(Tensor<T> left, Tensor<T> bond, Tensor<T> right)
    {
        using Tensor<T> half = algebra.Contract(left, [1], bond, [0]);
        return algebra.Contract(half, [1, 2], right, [0, 1]);
    }

    /// <summary>AC2[x, q, q', y]: two neighbouring vertices under the row, from AC and AR.</summary>
    public Tensor<T> TwoVertices(Tensor<T> left, Tensor<T> center, Tensor<T> next, Tensor<T> row, Tensor<T> right)
    {
        using Tensor<T> half = Descend(left, center, row);
        using Tensor<T> wide = algebra.Contract(half, [1], next, [0]);
        using Tensor<T> under = algebra.Contract(wide, [3, 2], row, [0, 1]);
        return algebra.Contract(under, [2, 4], right, [1, 0]);
    }

    /// <summary>X[x, b, q, r] = FL[x, a, l] M[a, p, b] A[p, l, q, r].</summary>
    private Tensor<T> Descend(Tensor<T> left, Tensor<T> upper, Tensor<T> row)
    {
        using Tensor<T> top = algebra.Contract(left, [1], upper, [0]);
        return algebra.Contract(top, [2, 1], row, [0, 1]);
    }
}
