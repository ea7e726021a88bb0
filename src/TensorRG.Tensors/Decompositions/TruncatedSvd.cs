using System.Numerics;

namespace TensorRG.Tensors.Decompositions;

/// <summary>
/// M[rows, columns] = sum over the bond of U[rows, bond] s[bond] V[bond, columns], with orthonormal columns of U and
/// rows of V. The bond leaves U and enters V; its sectors carry the total charge of the rows.
/// </summary>
/// <typeparam name="T">Element type.</typeparam>
/// <param name="U">Row legs, then the bond (outgoing).</param>
/// <param name="Weights">Singular values, descending in each sector.</param>
/// <param name="V">The bond (ingoing), then the column legs: already the adjoint of the right singular vectors.</param>
/// <param name="Truncation">What was kept and dropped.</param>
public sealed record TruncatedSvd<T>(Tensor<T> U, BondWeights Weights, Tensor<T> V, Truncation Truncation)
    where T : unmanaged, INumberBase<T>;
