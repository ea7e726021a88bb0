using System.Numerics;
using TensorRG.Tensors;

namespace TensorRG.Boundary;

/// <summary>An approximate dominant eigenpair.</summary>
/// <typeparam name="T">Element type.</typeparam>
/// <param name="Value">Eigenvalue.</param>
/// <param name="Vector">Eigenvector of norm 1.</param>
/// <param name="Residual">|M v - value v| / |value|.</param>
/// <param name="Applications">How often the matrix was applied.</param>
internal sealed record Ritz<T>(Complex Value, Tensor<T> Vector, double Residual, int Applications)
    where T : unmanaged, INumberBase<T>;
