namespace TensorRG.Tensors.Decompositions;

/// <summary>What a truncated decomposition dropped.</summary>
/// <param name="KeptWeight">Sum of the squared singular values kept.</param>
/// <param name="DiscardedWeight">Sum of the squared singular values dropped, exact or, from an iterative decomposition, estimated from its random block within about ten per cent.</param>
/// <param name="CutsMultiplet">Whether the cut fell inside a multiplet.</param>
public readonly record struct Truncation(double KeptWeight, double DiscardedWeight, bool CutsMultiplet)
{
    /// <summary>Discarded over total weight, in [0, 1]; 0 where the total is 0.</summary>
    public double DiscardedFraction
        => KeptWeight + DiscardedWeight > 0 ? DiscardedWeight / (KeptWeight + DiscardedWeight) : 0;
}
