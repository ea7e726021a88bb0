using System.Numerics;
using TensorRG.Tensors;
using TensorRG.Tensors.Decompositions;

namespace TensorRG.CoarseGraining.Loop;

/// <summary>Both sublattice tensors after filtering.</summary>
/// <param name="A">A[u, l, d, r].</param>
/// <param name="B">B[u, l, d, r].</param>
/// <param name="Weights">For each bond of the ring the singular values of L R, the largest being 1.</param>
internal sealed record FilteredPair<T>(Tensor<T> A, Tensor<T> B, BondWeights[] Weights)
    where T : unmanaged, INumberBase<T>;
