using System.Collections.Immutable;
using TensorRG.CoarseGraining.Higher;
using TensorRG.CoarseGraining.Plaquette;

namespace TensorRG.CoarseGraining;

/// <summary>All schemes, one line each.</summary>
public static class SchemeRegistry
{
    /// <summary>The schemes in the order they are listed to users.</summary>
    public static ImmutableArray<SchemeDefinition> All { get; } =
    [
        new BondWeightedDefinition(),
        new LevinNaveDefinition(),
        new HigherOrderDefinition(),
    ];

    /// <summary>The scheme used when none is named.</summary>
    public static SchemeDefinition Default => All[0];

    /// <summary>The scheme with a name, or null.</summary>
    /// <param name="name">Name on the command line.</param>
    public static SchemeDefinition? Find(string name) => All.FirstOrDefault(s => s.Name == name);
}
