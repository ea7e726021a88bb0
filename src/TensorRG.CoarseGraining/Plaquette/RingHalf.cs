using System.Numerics;
using TensorRG.Tensors;

namespace TensorRG.CoarseGraining.Plaquette;

/// <summary>
/// Half a ring, R[p, n, x] = sum over k, l, m of N[n, k, l] P[p, k, m] Y[m, l, x], in chunks of p: the intermediate of a chunk
/// stays in cache, where it is read as it was written, and chunks share out over the threads.
/// </summary>
/// <typeparam name="T">Element type.</typeparam>
internal sealed class RingHalf<T> : IDisposable
    where T : unmanaged, INumberBase<T>
{
    /// <summary>Most elements of the intermediate of a chunk: 4 MB of doubles.</summary>
    private const double ChunkElements = 1 << 19;

    private readonly TensorAlgebra<T> _algebra;
    private readonly Tensor<T> _last;
    private readonly Leg _outer;
    private readonly List<(int Sector, int Start, Tensor<T> Slice)> _chunks = [];

    /// <summary>Cuts the first piece into chunks.</summary>
    /// <param name="algebra">Contractions and kernels.</param>
    /// <param name="first">P[p, k, m].</param>
    /// <param name="last">N[n, k, l].</param>
    /// <param name="batch">How many vectors x come at a time.</param>
    public RingHalf(TensorAlgebra<T> algebra, Tensor<T> first, Tensor<T> last, int batch)
    {
        _algebra = algebra;
        _last = last.Clone();
        _outer = first.Legs[0];
        double perState = (double)first.Legs[1].Dimension * last.Legs[2].Dimension * batch / _outer.Sectors.Length;
        int most = (int)Math.Max(1, ChunkElements / perState);
        for (int sector = 0; sector < _outer.Sectors.Length; sector++)
        {
            for (int start = 0; start < _outer.Sectors[sector].Dimension; start += most)
            {
                int count = Math.Min(most, _outer.Sectors[sector].Dimension - start);
                _chunks.Add((sector, start, first.Slice(0, sector, start, count)));
            }
        }
    }

    /// <summary>R[p, n, x].</summary>
    /// <param name="block">Y[m, l, x].</param>
    public Tensor<T> Apply(Tensor<T> block)
    {
        Tensor<T> result = Tensor<T>.Zeros([_outer, _last.Legs[0], block.Legs[2]]);
        _algebra.Kernels.RunEach(_chunks.Count, i =>
        {
            (int sector, int start, Tensor<T> slice) = _chunks[i];
            using Tensor<T> inner = _algebra.Contract(slice, [2], block, [0]);
            using Tensor<T> part = _algebra.ContractMiddle(_last, inner);
            result.Assign(0, sector, start, part);
        });
        return result;
    }

    public void Dispose()
    {
        _last.Dispose();
        foreach ((_, _, Tensor<T> slice) in _chunks)
            slice.Dispose();
    }
}
