using System.Numerics;
using TensorRG.Tensors;

namespace TensorRG.CoarseGraining;

/// <summary>The square network that a flow starts from: one four-leg tensor on every vertex.</summary>
/// <typeparam name="T">Element type.</typeparam>
/// <param name="Site">
/// A[u, l, d, r]: up and left are ingoing, down and right outgoing; down matches up and right matches left.
/// </param>
/// <param name="SitesPerTensor">Lattice sites per network vertex, positive.</param>
/// <param name="LogPrefactor">Logarithm of a factor taken out of every vertex tensor.</param>
public sealed record InitialNetwork<T>(Tensor<T> Site, double SitesPerTensor, double LogPrefactor)
    where T : unmanaged, INumberBase<T>;
