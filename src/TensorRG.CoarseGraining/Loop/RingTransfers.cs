using System.Numerics;
using TensorRG.Tensors;

namespace TensorRG.CoarseGraining.Loop;

/// <summary>Transfer matrices E[l, l*, r, r*] along a ring: a tensor with the conjugate of another one, joined over the outer legs. Cost O(chi^6).</summary>
/// <typeparam name="T">Element type.</typeparam>
/// <param name="algebra">Contractions and kernels.</param>
internal sealed class RingTransfers<T>(TensorAlgebra<T> algebra)
    where T : unmanaged, INumberBase<T>
{
    /// <summary>Of a piece S[l, o, r] with itself.</summary>
    public Tensor<T> Own(Tensor<T> piece)
    {
        using Tensor<T> dual = piece.Conjugate();
        using Tensor<T> joined = algebra.Contract(piece, [1], dual, [1]);
        return joined.Permute(0, 2, 1, 3);
    }

    /// <summary>Of a tensor M[l, o, o', r] with itself.</summary>
    public Tensor<T> Whole(Tensor<T> tensor) => Whole(tensor, tensor);

    /// <summary>Of a tensor M[l, o, o', r] with another one that has the same outer legs.</summary>
    public Tensor<T> Whole(Tensor<T> tensor, Tensor<T> other)
    {
        using Tensor<T> dual = other.Conjugate();
        return OfWhole(tensor, dual);
    }

    /// <summary>Of a tensor M[l, o, o', r] with the pair of pieces that stands for it.</summary>
    public Tensor<T> Mixed(Tensor<T> tensor, Tensor<T> first, Tensor<T> second)
    {
        using Tensor<T> firstDual = first.Conjugate(), secondDual = second.Conjugate();
        using Tensor<T> pair = algebra.Contract(firstDual, [2], secondDual, [0]);
        return OfWhole(tensor, pair);
    }

    /// <summary>One after the other.</summary>
    public Tensor<T> Product(Tensor<T> a, Tensor<T> b) => algebra.Contract(a, [2, 3], b, [0, 1]);

    /// <summary>One after the other, where either may be missing but not both; the caller owns what it gets.</summary>
    public Tensor<T> Join(Tensor<T>? a, Tensor<T>? b) => a is null ? b!.Clone() : b is null ? a.Clone() : Product(a, b);

    /// <summary>The real part of the trace of a product round the ring.</summary>
    public double Closed(IReadOnlyList<Tensor<T>> factors) => Scalar.RealPart(Trace(factors));

    /// <summary>The trace of a product round the ring.</summary>
    public T Trace(IReadOnlyList<Tensor<T>> factors)
    {
        int half = factors.Count / 2;
        using Tensor<T> left = Chain(factors.Take(half)), right = Chain(factors.Skip(half));
        using Tensor<T> number = algebra.Contract(left, [2, 3, 0, 1], right, [0, 1, 2, 3]);
        return number.Elements[0];
    }

    private Tensor<T> Chain(IEnumerable<Tensor<T>> factors)
    {
        Tensor<T>? chain = null;
        foreach (Tensor<T> factor in factors)
        {
            using Tensor<T>? before = chain;
            chain = Join(before, factor);
        }

        return chain!;
    }

    private Tensor<T> OfWhole(Tensor<T> tensor, Tensor<T> dual)
    {
        using Tensor<T> joined = algebra.Contract(tensor, [1, 2], dual, [1, 2]);
        return joined.Permute(0, 2, 1, 3);
    }
}
