namespace TensorRG.CoarseGraining;

/// <summary>How a scheme finds the singular values it keeps.</summary>
public enum DecompositionMode
{
    /// <summary>By whichever way costs least; the results agree to round-off.</summary>
    Auto,

    /// <summary>By block subspace iteration, never forming a four-leg tensor where the scheme can avoid it.</summary>
    Iterative,

    /// <summary>By full decompositions of the explicit tensors: slow, the reference for the others.</summary>
    Full,
}
