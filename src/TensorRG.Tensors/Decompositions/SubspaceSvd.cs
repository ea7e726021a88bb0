using System.Numerics;

namespace TensorRG.Tensors.Decompositions;

/// <summary>
/// Truncated singular value decomposition of a matrix known only by its action: block subspace iteration from a random
/// block (N. Halko, P. G. Martinsson, J. A. Tropp, SIAM Rev. 53, 217 (2011), algorithm 4.4), with a residual test, blocks that grow where a
/// sector turns out to hold more of the spectrum than expected, and a full decomposition where that is cheaper or the spectrum too slow.
/// </summary>
/// <typeparam name="T">Element type.</typeparam>
/// <param name="algebra">Contractions and kernels.</param>
/// <param name="options">Settings of the iteration.</param>
public sealed class SubspaceSvd<T>(TensorAlgebra<T> algebra, SubspaceOptions options)
    where T : unmanaged, INumberBase<T>
{
    /// <summary>Decomposes the matrix.</summary>
    /// <param name="map">The matrix.</param>
    /// <param name="rule">How many singular values to keep.</param>
    /// <param name="random">Source of the random block.</param>
    /// <param name="expected">How many values each charge (total of the rows) is expected to keep; charges not named get a share by size.</param>
    /// <exception cref="Kernels.DecompositionException">NaN or infinity, or the matrix is zero.</exception>
    public TruncatedSvd<T> Compute(ILinearMap<T> map, CutRule rule, RandomSequence random, IReadOnlyDictionary<Charge, int>? expected = null)
    {
        ArgumentNullException.ThrowIfNull(map);
        ArgumentNullException.ThrowIfNull(rule);
        ArgumentNullException.ThrowIfNull(random);
        var iteration = new SubspaceIteration<T>(algebra, options, map, rule, random);
        iteration.SizeBlocks(expected);
        if (iteration.IsDenseCheaper || !iteration.Run())
            return Dense(map, rule);
        return iteration.Result();
    }

    private TruncatedSvd<T> Dense(ILinearMap<T> map, CutRule rule)
    {
        if (map is TensorMap<T> explicitly)
            return explicitly.Decompose(rule);
        using Tensor<T> tensor = map.ToTensor();
        int rows = map.RowLegs.Length;
        return DenseSvd.Compute(
            algebra.Kernels, tensor, [.. Enumerable.Range(0, rows)], [.. Enumerable.Range(rows, tensor.Rank - rows)], rule);
    }
}
