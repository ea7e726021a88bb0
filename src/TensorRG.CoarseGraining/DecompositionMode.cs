namespace TensorRG.CoarseGraining;

/// <summary>How a scheme finds the singular values it keeps.</summary>
public enum DecompositionMode
{
    /// <summary>By whichever way costs least. Where the kept values are set apart from the rest the ways agree to round-off; without a gap at the cut they agree to the weight that is discarded.</summary>
    Auto,

    /// <summary>By block subspace iteration, on rings of three-leg pieces; a four-leg tensor is formed only where it is small or the spectrum too slow.</summary>
    Iterative,

    /// <summary>By full decompositions of the explicit tensors: slow, the reference for the others.</summary>
    Full,
}
