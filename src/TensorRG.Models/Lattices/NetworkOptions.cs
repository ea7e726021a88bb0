using System.Collections.Immutable;

namespace TensorRG.Models.Lattices;

/// <summary>What to build of a lattice system.</summary>
public sealed record NetworkOptions
{
    /// <summary>Which form of network.</summary>
    public NetworkForm Form { get; init; } = NetworkForm.Auto;

    /// <summary>False leaves the legs without charges; the basis is the same.</summary>
    public bool Graded { get; init; } = true;

    /// <summary>Names of the observables that need an impurity. One that is staggered makes the vertex stand for a block of 2 x 2 cells where it must.</summary>
    public ImmutableArray<string> Observables { get; init; } = [];

    /// <summary>True makes the vertex stand for a block of 2 x 2 cells, so that a uniform state can hold an order of period two; no effect on the honeycomb lattice.</summary>
    public bool InBlocks { get; init; }

    /// <summary>Fields: every configuration's weight is multiplied by exp(strength * O). The symmetry is that of the weights with the fields.</summary>
    public ImmutableArray<(string Observable, double Strength)> Fields { get; init; } = [];
}
