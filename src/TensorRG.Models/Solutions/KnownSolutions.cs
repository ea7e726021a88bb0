namespace TensorRG.Models.Solutions;

/// <summary>Placeholder: replaced by the branch with the exact solutions.</summary>
public static class KnownSolutions
{
    /// <summary>The names.</summary>
    public static IReadOnlyList<string> Names => [];

    /// <summary>The solution of that name, or null.</summary>
    /// <param name="name">Name in model files.</param>
    public static IKnownSolution? Find(string name) => null;
}
