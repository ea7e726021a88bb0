namespace TensorRG.Tensors.Decompositions;

/// <summary>Settings of the block subspace iteration; the defaults are what the schemes use.</summary>
public sealed record SubspaceOptions
{
    /// <summary>Vectors iterated beyond those expected to be kept, shared out over the sectors.</summary>
    public int Oversampling { get; init; } = 20;

    /// <summary>
    /// The same as a fraction of the bond dimension; the larger of the two counts. Spectra get flatter with the bond dimension: a fixed
    /// number of extra vectors would need ever more power steps.
    /// </summary>
    public double OversamplingFraction { get; init; } = 0.5;

    /// <summary>Fewest such vectors in a sector.</summary>
    public int MinOversampling { get; init; } = 8;

    /// <summary>Fewest power steps (one application of M^H and one of M each).</summary>
    public int MinPowerSteps { get; init; } = 2;

    /// <summary>Most power steps before falling through to a full decomposition.</summary>
    public int MaxPowerSteps { get; init; } = 8;

    /// <summary>
    /// Largest relative error of a kept singular value. The changes over half power steps shrink geometrically: what is left after two
    /// of them, d1 and then d2, is about d2 * d2 / d1. A quarter of the tolerance is asked of that, since the slowest
    /// part shrinks last.
    /// </summary>
    public double Tolerance { get; init; } = 1e-8;

    /// <summary>A kept value this close, in vectors, to the end of its sector's block makes the block grow.</summary>
    public int Margin { get; init; } = 4;

    /// <summary>Fraction of a sector's dimension above which the block is no cheaper than a full decomposition.</summary>
    public double DenseFraction { get; init; } = 0.5;

    /// <summary>Largest sector for which a full decomposition is used as fall-through.</summary>
    public int LargestDenseSector { get; init; } = 2500;
}
