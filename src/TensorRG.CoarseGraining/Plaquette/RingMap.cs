using System.Collections.Immutable;
using System.Numerics;
using TensorRG.Tensors;
using TensorRG.Tensors.Decompositions;

namespace TensorRG.CoarseGraining.Plaquette;

/// <summary>
/// The matrix (a b) -> (c d) of four three-leg pieces closed to a ring, T[a, b, c, d] = sum over s of
/// A[a, s0, s1] B[b, s1, s2] C[c, s2, s3] D[d, s3, s0], without ever forming T: each vector costs O(chi^4), in memory of
/// O(chi^3) (S. Morita, R. Igarashi, H.-H. Zhao, N. Kawashima, Phys. Rev. E 97, 033310 (2018)).
/// </summary>
/// <typeparam name="T">Element type.</typeparam>
internal sealed class RingMap<T> : ILinearMap<T>, IDisposable
    where T : unmanaged, INumberBase<T>
{
    /// <summary>Vectors that go round the ring together.</summary>
    private const int Batch = 32;

    private readonly RingHalf<T>[] _forward;
    private readonly RingHalf<T>[] _backward;
    private readonly Func<Tensor<T>> _toTensor;

    public RingMap(TensorAlgebra<T> algebra, Tensor<T> a, Tensor<T> b, Tensor<T> c, Tensor<T> d)
    {
        RowLegs = [a.Legs[0], b.Legs[0]];
        ColumnLegs = [c.Legs[0], d.Legs[0]];
        using Tensor<T> conjugateA = a.Conjugate(), conjugateB = b.Conjugate(), conjugateC = c.Conjugate(), conjugateD = d.Conjugate();
        _forward = Halves(algebra, a, b, c, d);
        _backward = Halves(algebra, conjugateC, conjugateD, conjugateA, conjugateB);
        _toTensor = () => Close(algebra, a, b, c, d);
    }

    public ImmutableArray<Leg> RowLegs { get; }

    public ImmutableArray<Leg> ColumnLegs { get; }

    public Tensor<T> Apply(Tensor<T> block) => Batched(block, RowLegs, _forward);

    public Tensor<T> ApplyAdjoint(Tensor<T> block) => Batched(block, [ColumnLegs[0].Dual, ColumnLegs[1].Dual], _backward);

    public Tensor<T> ToTensor() => _toTensor();

    public void Dispose()
    {
        foreach (RingHalf<T> half in (RingHalf<T>[])[.. _forward, .. _backward])
            half.Dispose();
    }

    /// <summary>From [c*, d*, x] over C and D to [s2, s0, x], then over B and A to [b, a, x].</summary>
    private static RingHalf<T>[] Halves(TensorAlgebra<T> algebra, Tensor<T> a, Tensor<T> b, Tensor<T> c, Tensor<T> d)
    {
        using Tensor<T> first = c.Permute(1, 2, 0), last = d.Permute(2, 1, 0), closing = a.Permute(0, 2, 1);
        return [new RingHalf<T>(algebra, first, last, Batch), new RingHalf<T>(algebra, b, closing, Batch)];
    }

    private static Tensor<T> Close(TensorAlgebra<T> algebra, Tensor<T> a, Tensor<T> b, Tensor<T> c, Tensor<T> d)
    {
        using Tensor<T> left = algebra.Contract(a, [2], b, [1]);
        using Tensor<T> right = algebra.Contract(c, [2], d, [1]);
        return algebra.Contract(left, [1, 3], right, [3, 1]);
    }

    private static Tensor<T> Batched(Tensor<T> block, ImmutableArray<Leg> rows, RingHalf<T>[] halves)
    {
        Leg vectors = block.Legs[2];
        Tensor<T> result = Tensor<T>.Zeros([.. rows, vectors]);
        for (int sector = 0; sector < vectors.Sectors.Length; sector++)
        {
            for (int start = 0; start < vectors.Sectors[sector].Dimension; start += Batch)
            {
                int count = Math.Min(Batch, vectors.Sectors[sector].Dimension - start);
                using Tensor<T> slice = block.Slice(2, sector, start, count);
                using Tensor<T> middle = halves[0].Apply(slice);
                using Tensor<T> end = halves[1].Apply(middle);
                using Tensor<T> moved = end.Permute(1, 0, 2);
                result.Assign(2, sector, start, moved);
            }
        }

        return result;
    }
}
