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
    /// <summary>Most elements of the largest intermediate of a batch of vectors.</summary>
    private const long BatchElements = 1 << 21;

    private readonly TensorAlgebra<T> _algebra;
    private readonly Tensor<T>[] _pieces;
    private readonly Tensor<T>[] _conjugates;
    private readonly Tensor<T>[] _turned;
    private readonly Tensor<T>[] _turnedConjugates;

    public RingMap(TensorAlgebra<T> algebra, Tensor<T> a, Tensor<T> b, Tensor<T> c, Tensor<T> d)
    {
        _algebra = algebra;
        _pieces = [a, b, c, d];
        _conjugates = Array.ConvertAll(_pieces, static p => p.Conjugate());
        _turned = [a.Permute(0, 2, 1), d.Permute(2, 1, 0)];
        _turnedConjugates = [_conjugates[2].Permute(0, 2, 1), _conjugates[1].Permute(2, 1, 0)];
        RowLegs = [a.Legs[0], b.Legs[0]];
        ColumnLegs = [c.Legs[0], d.Legs[0]];
    }

    public ImmutableArray<Leg> RowLegs { get; }

    public ImmutableArray<Leg> ColumnLegs { get; }

    public Tensor<T> Apply(Tensor<T> block)
        => Batched(block, RowLegs, batch => Ring(_turned, _pieces[1], _pieces[2], batch));

    public Tensor<T> ApplyAdjoint(Tensor<T> block)
        => Batched(
            block,
            [ColumnLegs[0].Dual, ColumnLegs[1].Dual],
            batch => Ring(_turnedConjugates, _conjugates[3], _conjugates[0], batch));

    public Tensor<T> ToTensor()
    {
        using Tensor<T> left = _algebra.Contract(_pieces[0], [2], _pieces[1], [1]);
        using Tensor<T> right = _algebra.Contract(_pieces[2], [2], _pieces[3], [1]);
        return _algebra.Contract(left, [1, 3], right, [3, 1]);
    }

    public void Dispose()
    {
        foreach (Tensor<T> own in (Tensor<T>[])[.. _conjugates, .. _turned, .. _turnedConjugates])
            own.Dispose();
    }

    /// <summary>
    /// [a, b, x] from [c*, d*, x]. The first and last piece come as [a, s1, s0] and [s0, s3, d], in the order in which their inner legs
    /// lie in what they multiply, so that the large intermediates are read where they are.
    /// </summary>
    private Tensor<T> Ring(Tensor<T>[] turned, Tensor<T> b, Tensor<T> c, Tensor<T> block)
    {
        using Tensor<T> first = _algebra.Contract(c, [0], block, [0]);
        using Tensor<T> second = _algebra.ContractMiddle(turned[1], first);
        using Tensor<T> third = _algebra.Contract(b, [2], second, [0]);
        using Tensor<T> fourth = _algebra.ContractMiddle(turned[0], third);
        return fourth.Permute(1, 0, 2);
    }

    private Tensor<T> Batched(Tensor<T> block, ImmutableArray<Leg> rows, Func<Tensor<T>, Tensor<T>> apply)
    {
        Leg vectors = block.Legs[2];
        long perVector = (long)_pieces.Max(static p => p.Legs[1].Dimension) * _pieces.Max(static p => p.Legs[2].Dimension) * _pieces.Max(static p => p.Legs[0].Dimension);
        int batch = (int)Math.Clamp(BatchElements / Math.Max(perVector, 1), 8, int.MaxValue);
        if (vectors.Dimension <= batch)
            return apply(block);
        Tensor<T> result = Tensor<T>.Zeros([.. rows, vectors]);
        for (int sector = 0; sector < vectors.Sectors.Length; sector++)
        {
            for (int start = 0; start < vectors.Sectors[sector].Dimension; start += batch)
            {
                int count = Math.Min(batch, vectors.Sectors[sector].Dimension - start);
                using Tensor<T> slice = block.Slice(2, sector, start, count);
                using Tensor<T> moved = apply(slice);
                result.Assign(2, sector, start, moved);
            }
        }

        return result;
    }
}
