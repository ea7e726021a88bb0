using System.Numerics;

namespace TensorRG.Boundary;

/// <summary>What a search for the dominant eigenvector of a row ends with.</summary>
/// <typeparam name="T">Element type.</typeparam>
/// <param name="State">The eigenvector.</param>
/// <param name="Residual">The larger of |AC - AL C| and |AC - C AR|.</param>
/// <param name="Iterations">Rounds, over all bond dimensions.</param>
/// <param name="IsConverged">Whether the residual reached the tolerance.</param>
internal sealed record FixedPoint<T>(UniformState<T> State, double Residual, int Iterations, bool IsConverged)
    where T : unmanaged, INumberBase<T>;
