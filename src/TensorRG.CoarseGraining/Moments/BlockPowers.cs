using System.Collections.Immutable;
using System.Numerics;
using TensorRG.CoarseGraining.Higher;
using TensorRG.Tensors;

namespace TensorRG.CoarseGraining.Moments;

/// <summary>
/// T^(n) / N^n, n = 1 .. order: the tensor of a block of N sites with every configuration weighted with O^n, O being one observable's sum over the block.
/// Together with T^(0) = T they renormalise as a product: T'^(n) = 2^-n sum_k binom(n, k) join(T^(k), T^(n-k)).
/// </summary>
/// <typeparam name="T">Element type.</typeparam>
/// <param name="powers">T^(1) .. T^(order).</param>
internal sealed class BlockPowers<T>(ImmutableArray<Tensor<T>> powers) : IDisposable
    where T : unmanaged, INumberBase<T>
{
    /// <summary>T^(1) / N.</summary>
    public Tensor<T> First => powers[0];

    private int Order => powers.Length;

    /// <summary>Clones of the tensors of one vertex, divided by powers of its sites.</summary>
    public static BlockPowers<T> Begin(IReadOnlyList<Tensor<T>> insertions, double sites)
        => new([.. insertions.Select((t, i) => TensorAlgebra<T>.Scale(t, Scalar.FromReal<T>(Math.Pow(sites, -1 - i))))]);

    /// <inheritdoc/>
    public void Dispose()
    {
        foreach (Tensor<T> tensor in powers)
            tensor.Dispose();
    }

    /// <summary>The same tensors with their legs in another order.</summary>
    public BlockPowers<T> Permute(params int[] order) => new([.. powers.Select(t => t.Permute(order))]);

    /// <summary>The same tensors times a number.</summary>
    public BlockPowers<T> Scale(double factor) => new([.. powers.Select(t => TensorAlgebra<T>.Scale(t, Scalar.FromReal<T>(factor)))]);

    /// <summary>The powers of two blocks joined. One upper and one lower tensor of O(chi^5) elements are held at a time.</summary>
    public BlockPowers<T> Join(PairJoin<T> pair, Tensor<T> site, Tensor<T> isometry)
    {
        var sums = new Tensor<T>?[Order + 1];
        for (int k = 0; k <= Order; k++)
        {
            using Tensor<T> top = pair.Top(Power(site, k), isometry);
            for (int j = k == 0 ? 1 : 0; k + j <= Order; j++)
            {
                using Tensor<T> bottom = pair.Bottom(Power(site, j), isometry);
                Accumulate(ref sums[k + j], pair.Close(top, bottom), Binomial.Of(k + j, k) * Math.Pow(2, -k - j));
            }
        }

        return new([.. sums.Skip(1).Select(static t => t!)]);
    }

    /// <summary>
    /// The powers of O - N shift in place of O: sum_k binom(n, k) (-shift)^(n-k) T^(k). Exact, and keeps T^(2) from being the small difference of large
    /// tensors later on.
    /// </summary>
    public BlockPowers<T> Centre(Tensor<T> site, T shift)
    {
        if (T.IsZero(shift)) // T^(k) of an observable that changes the charge cannot be added to another one, and has no mean.
            return new([.. powers.Select(static t => t.Clone())]);
        var centred = new Tensor<T>?[Order];
        for (int n = 1; n <= Order; n++)
        {
            T factor = T.One;
            for (int k = n; k >= 0; k--, factor *= -shift)
            {
                using Tensor<T> term = TensorAlgebra<T>.Scale(Power(site, k), factor);
                Accumulate(ref centred[n - 1], term.Clone(), Binomial.Of(n, k));
            }
        }

        return new([.. centred.Select(static t => t!)]);
    }

    /// <summary>Tr T^(n), n = 1 .. order; zero by symmetry where T^(n) changes the charge.</summary>
    public T[] Traces() => [.. powers.Select(static t => t.Flux == Charge.Zero ? TensorAlgebra<T>.Trace(t, [0, 1], [2, 3]).Elements[0] : T.Zero)];

    private static void Accumulate(ref Tensor<T>? sum, Tensor<T> term, double factor)
    {
        using Tensor<T> owned = term;
        Tensor<T>? before = sum;
        sum = before is null ? TensorAlgebra<T>.Scale(owned, Scalar.FromReal<T>(factor)) : TensorAlgebra<T>.Add(before, owned, Scalar.FromReal<T>(factor));
        before?.Dispose();
    }

    private Tensor<T> Power(Tensor<T> site, int n) => n == 0 ? site : powers[n - 1];
}
