using System.Numerics;
using TensorRG.Tensors;

namespace TensorRG.CoarseGraining.Plaquette;

/// <summary>Closes a ring of pieces on itself through two opposite outer legs, in memory of O(chi^3).</summary>
internal static class RingTrace
{
    /// <summary>Most elements of an intermediate.</summary>
    private const long BatchElements = 1 << 21;

    /// <summary>
    /// V[b, s3, s0] = sum over x, s1, s2 of A[x, s0, s1] B[b, s1, s2] C[x, s2, s3], in batches of x.
    /// </summary>
    public static Tensor<T> Close<T>(TensorAlgebra<T> algebra, Tensor<T> a, Tensor<T> b, Tensor<T> c)
        where T : unmanaged, INumberBase<T>
    {
        Leg x = a.Legs[0];
        long perState = (long)b.Legs[0].Dimension * b.Legs[1].Dimension * c.Legs[2].Dimension;
        int batch = (int)Math.Clamp(BatchElements / Math.Max(perState, 1), 1, int.MaxValue);
        if (x.Dimension <= batch)
            return Part(algebra, a, b, c);
        Tensor<T>? sum = null;
        for (int sector = 0; sector < x.Sectors.Length; sector++)
        {
            for (int start = 0; start < x.Sectors[sector].Dimension; start += batch)
            {
                int count = Math.Min(batch, x.Sectors[sector].Dimension - start);
                using Tensor<T> partA = a.Slice(0, sector, start, count);
                using Tensor<T> partC = c.Slice(0, sector, start, count);
                Tensor<T> part = Part(algebra, partA, b, partC);
                if (sum is null)
                {
                    sum = part;
                    continue;
                }

                using Tensor<T> previous = sum;
                sum = TensorAlgebra<T>.Add(previous, part, T.One);
                part.Dispose();
            }
        }

        return sum!;
    }

    private static Tensor<T> Part<T>(TensorAlgebra<T> algebra, Tensor<T> a, Tensor<T> b, Tensor<T> c)
        where T : unmanaged, INumberBase<T>
    {
        using Tensor<T> pair = algebra.Contract(b, [2], c, [1]);
        return algebra.Contract(pair, [1, 2], a, [2, 0]);
    }
}
