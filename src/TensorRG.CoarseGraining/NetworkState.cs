using System.Collections.Immutable;
using System.Numerics;
using TensorRG.Tensors;
using TensorRG.Tensors.Decompositions;

namespace TensorRG.CoarseGraining;

/// <summary>
/// The uniform network between two steps, as a scheme keeps it: tensors and bond weights by name. Only the scheme knows
/// what the names mean; the flow saves and restores them as they are.
/// </summary>
/// <typeparam name="T">Element type.</typeparam>
/// <param name="Tensors">Tensors by name.</param>
/// <param name="Weights">Diagonal weights by name.</param>
public sealed record NetworkState<T>(
    ImmutableSortedDictionary<string, Tensor<T>> Tensors,
    ImmutableSortedDictionary<string, BondWeights> Weights)
    where T : unmanaged, INumberBase<T>
{
    /// <summary>A state of one tensor without weights.</summary>
    /// <param name="name">Its name.</param>
    /// <param name="tensor">The tensor.</param>
    public static NetworkState<T> Of(string name, Tensor<T> tensor)
        => new(
            ImmutableSortedDictionary.Create<string, Tensor<T>>(StringComparer.Ordinal).Add(name, tensor),
            ImmutableSortedDictionary.Create<string, BondWeights>(StringComparer.Ordinal));

    /// <summary>A tensor by name.</summary>
    /// <param name="name">Its name.</param>
    /// <exception cref="SnapshotException">There is none.</exception>
    public Tensor<T> this[string name]
        => Tensors.TryGetValue(name, out Tensor<T>? tensor) ? tensor : throw new SnapshotException($"The state has no tensor '{name}'.");

    /// <summary>The state with one tensor replaced by a multiple of itself, which multiplies the whole network tensor.</summary>
    /// <param name="name">Which tensor.</param>
    /// <param name="factor">The factor.</param>
    public NetworkState<T> Rescaled(string name, double factor)
        => this with { Tensors = Tensors.SetItem(name, TensorAlgebra<T>.Scale(this[name], Scalar.FromReal<T>(factor))) };
}
