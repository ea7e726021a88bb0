namespace TensorRG.Models.Lattices;

/// <summary>Placeholder: replaced by the branch that builds networks.</summary>
public static class NetworkBuilder
{
    /// <summary>Placeholder.</summary>
    /// <param name="system">The model as tables.</param>
    /// <param name="options">What to build.</param>
    /// <exception cref="NotSupportedException">Always.</exception>
    public static ModelNetwork Build(LatticeSystem system, NetworkOptions options)
        => throw new NotSupportedException("Networks of lattice systems come from another branch.");
}
