using TensorRG.Tensors.Decompositions;

namespace TensorRG.CoarseGraining;

/// <summary>What a user chooses about a scheme.</summary>
/// <param name="Cut">How many states a bond keeps, and where the cut may fall.</param>
public sealed record SchemeSettings(CutRule Cut)
{
    /// <summary>Exponent k of the bond weights; only the bond-weighted scheme reads it.</summary>
    public double BondExponent { get; init; } = -0.5;

    /// <summary>How singular values are found.</summary>
    public DecompositionMode Decomposition { get; init; }

    /// <summary>Seed of the random blocks.</summary>
    public long Seed { get; init; } = 1;
}
