using System.Numerics;

namespace TensorRG.Tensors.Decompositions;

/// <summary>The leading eigenpairs of a Hermitian positive matrix between a group of legs and their duals.</summary>
/// <typeparam name="T">Element type.</typeparam>
/// <param name="Vectors">Row legs, then the bond (outgoing): an isometry.</param>
/// <param name="Values">Eigenvalues, descending in each sector.</param>
/// <param name="Truncation">Kept and dropped sums of eigenvalues; an eigenvalue is a squared singular value of whatever the matrix is the square of.</param>
public sealed record TruncatedEigen<T>(Tensor<T> Vectors, BondWeights Values, Truncation Truncation)
    where T : unmanaged, INumberBase<T>;
