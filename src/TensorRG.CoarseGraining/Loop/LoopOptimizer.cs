using System.Numerics;
using TensorRG.Tensors;
using TensorRG.Tensors.Decompositions;

namespace TensorRG.CoarseGraining.Loop;

/// <summary>
/// Minimises the relative cost || ring(M) - ring(S) ||^2 / || ring(M) ||^2 over eight pieces S[left, outer, right], one at a time: with N the transfer
/// matrix of the other seven and W the part of the gradient that does not depend on S, (N + shift) D = W - N S gives the correction D. The step is over-relaxed,
/// S + omega D: for 0 &lt; omega &lt; 2 each step lowers the cost, by omega (2 - omega) of what the full step would at least.
/// </summary>
/// <remarks>Corrections, not new pieces, are solved for: what N hardly sees is left as it is instead of being lost.</remarks>
/// <typeparam name="T">Element type.</typeparam>
internal sealed class LoopOptimizer<T>
    where T : unmanaged, INumberBase<T>
{
    /// <summary>Plain steps crawl: of 1, 1.6, 1.7, 1.8 this reached the lowest costs in 40 sweeps.</summary>
    private const double Omega = 1.6;

    /// <summary>Shift relative to the largest element of N.</summary>
    private const double Shift = 1e-12;

    private readonly TensorAlgebra<T> _algebra;
    private readonly RingTransfers<T> _transfers;
    private readonly Tensor<T>[] _ring;
    private readonly Tensor<T>[] _pieces;
    private readonly Tensor<T>[] _own;
    private readonly Tensor<T>[] _mixed;
    private readonly double _target;

    /// <summary>Takes the pieces over: they are replaced as it goes.</summary>
    /// <param name="algebra">Contractions and kernels.</param>
    /// <param name="ring">M_0 to M_3.</param>
    /// <param name="pieces">S_0 to S_7; S_2i and S_(2i+1) stand for M_i.</param>
    public LoopOptimizer(TensorAlgebra<T> algebra, Tensor<T>[] ring, Tensor<T>[] pieces)
    {
        (_algebra, _ring, _pieces) = (algebra, ring, pieces);
        _transfers = new RingTransfers<T>(algebra);
        _own = Array.ConvertAll(pieces, _transfers.Own);
        _mixed = [.. Enumerable.Range(0, 4).Select(Mixed)];
        Tensor<T>[] whole = Array.ConvertAll(ring, _transfers.Whole);
        _target = _transfers.Closed(whole);
        foreach (Tensor<T> tensor in whole)
            tensor.Dispose();
    }

    /// <summary>The relative cost; round-off leaves it uncertain by some 1e-15.</summary>
    public double Cost() => (_target - (2 * _transfers.Closed(_mixed)) + _transfers.Closed(_own)) / _target;

    /// <summary>Corrects each piece once.</summary>
    /// <returns>How much the relative cost fell.</returns>
    public double Sweep()
    {
        double gain = 0;
        Tensor<T>?[] after = Suffixes(_own), mixedAfter = Suffixes(_mixed);
        Tensor<T>? before = null, mixedBefore = null;
        for (int k = 0; k < 8; k++)
        {
            int i = k / 2;
            using (Tensor<T> environment = _transfers.Join(after[k + 1], before))
            {
                using Tensor<T> mixed = _transfers.Join(mixedAfter[i + 1], mixedBefore);
                gain += Correct(k, environment, mixed);
            }

            Refresh(_own, k, _transfers.Own(_pieces[k]));
            before = Extended(before, _own[k]);
            if (k % 2 == 0)
                continue;
            Refresh(_mixed, i, Mixed(i));
            mixedBefore = Extended(mixedBefore, _mixed[i]);
        }

        foreach (Tensor<T>? tensor in (ReadOnlySpan<Tensor<T>?>)[before, mixedBefore, .. after, .. mixedAfter])
            tensor?.Dispose();
        return gain / _target;
    }

    /// <summary>From each factor to the last one; nothing past the end.</summary>
    private Tensor<T>?[] Suffixes(Tensor<T>[] factors)
    {
        var suffixes = new Tensor<T>?[factors.Length + 1];
        for (int k = factors.Length - 1; k > 0; k--)
            suffixes[k] = _transfers.Join(factors[k], suffixes[k + 1]);
        return suffixes;
    }

    private Tensor<T> Extended(Tensor<T>? before, Tensor<T> factor)
    {
        using Tensor<T>? old = before;
        return _transfers.Join(old, factor);
    }

    private Tensor<T> Mixed(int i) => _transfers.Mixed(_ring[i], _pieces[2 * i], _pieces[(2 * i) + 1]);

    private static void Refresh(Tensor<T>[] list, int k, Tensor<T> tensor)
    {
        list[k].Dispose();
        list[k] = tensor;
    }

    private double Correct(int k, Tensor<T> environment, Tensor<T> mixed)
    {
        using Tensor<T> wanted = Wanted(k, mixed), present = Applied(environment, _pieces[k]);
        using Tensor<T> residual = TensorAlgebra<T>.Add(wanted, present, -T.One);
        using Tensor<T> matrix = environment.Permute(3, 1, 2, 0);
        using Tensor<T> right = residual.Permute(0, 2, 1);
        double size = TensorAlgebra<T>.LargestMagnitude(matrix);
        if (!(size > 0))
            return 0;
        using Tensor<T> solved = GradedSolve.Positive(matrix, Shift * size, right);
        using Tensor<T> correction = solved.Permute(0, 2, 1), dual = correction.Conjugate();
        using Tensor<T> gain = _algebra.Contract(dual, [0, 1, 2], residual, [0, 1, 2]);
        Refresh(_pieces, k, TensorAlgebra<T>.Add(_pieces[k], correction, Scalar.FromReal<T>(Omega)));
        return Omega * (2 - Omega) * Scalar.RealPart(gain.Elements[0]);
    }

    /// <summary>W[l, o, r]: the ring of M with all pieces but one.</summary>
    private Tensor<T> Wanted(int k, Tensor<T> mixed)
    {
        Tensor<T> tensor = _ring[k / 2];
        if (k % 2 == 0)
        {
            using Tensor<T> next = _pieces[k + 1].Conjugate();
            using Tensor<T> open = _algebra.Contract(tensor, [2], next, [1]);
            return _algebra.Contract(mixed, [0, 1, 2], open, [2, 4, 0]);
        }

        using Tensor<T> previous = _pieces[k - 1].Conjugate();
        using Tensor<T> opened = _algebra.Contract(tensor, [1], previous, [1]);
        using Tensor<T> turned = _algebra.Contract(opened, [0, 2, 3], mixed, [2, 0, 3]);
        return turned.Permute(1, 0, 2);
    }

    /// <summary>(N S)[l, o, r] from N[r, r*, l, l*].</summary>
    private Tensor<T> Applied(Tensor<T> environment, Tensor<T> piece)
    {
        using Tensor<T> product = _algebra.Contract(environment, [2, 0], piece, [0, 2]);
        return product.Permute(1, 2, 0);
    }
}
