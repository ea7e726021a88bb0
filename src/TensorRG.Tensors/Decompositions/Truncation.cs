namespace TensorRG.Tensors.Decompositions;

/// <summary>What a truncated decomposition dropped.</summary>
/// <param name="KeptWeight">Sum of the squared singular values kept.</param>
/// <param name="DiscardedWeight">Sum of the squared singular values dropped, exact or, from an iterative decomposition, estimated from its random block, with a scatter of about ten per cent.</param>
/// <param name="CutsMultiplet">Whether the cut fell inside a multiplet.</param>
/// <param name="IsUnsettled">Whether an iterative decomposition ended before its kept values settled.</param>
public readonly record struct Truncation(double KeptWeight, double DiscardedWeight, bool CutsMultiplet, bool IsUnsettled = false)
{
    /// <summary>Discarded over total weight, in [0, 1]; 0 where the total is 0.</summary>
    public double DiscardedFraction
        => KeptWeight + DiscardedWeight > 0 ? DiscardedWeight / (KeptWeight + DiscardedWeight) : 0;

    /// <summary>What a user should know about the cut, in words.</summary>
    public IEnumerable<string> Notices
    {
        get
        {
            if (CutsMultiplet)
                yield return "the cut falls inside a multiplet";
            if (IsUnsettled)
                yield return "the singular values had not settled when the iteration ended";
        }
    }
}
