namespace TensorRG.Boundary;

/// <summary>The user's choices for a boundary fixed point.</summary>
public sealed record BoundarySettings
{
    /// <summary>Most states kept on a bond of the boundary (chi).</summary>
    public required int BondDimension { get; init; }

    /// <summary>Norm of the fixed-point residual at which a state counts as converged.</summary>
    public double Tolerance { get; init; } = 1e-13;

    /// <summary>Most iterations at the largest bond dimension; beyond it the state is returned with its residual and counts as not converged.</summary>
    public int MaxIterations { get; init; } = 1000;

    /// <summary>Seed of the starting state.</summary>
    public long Seed { get; init; } = 1;
}
