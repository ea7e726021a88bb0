using System.Collections.Immutable;

namespace TensorRG.Models.Lattices;

/// <summary>What a network will be, without its elements: quick even where the tensor is large.</summary>
/// <param name="Form">The form; never <see cref="NetworkForm.Auto"/>.</param>
/// <param name="Choice">Why this form, in a sentence.</param>
/// <param name="Others">Other forms that hold all terms and fit in memory.</param>
/// <param name="Symmetry">The group that the charges carry and what it does to the states, in words; "none" without.</param>
/// <param name="GroupOrders">The group, one order for each factor: N for Z_N, 0 for U(1).</param>
/// <param name="VerticalBond">Basis of legs u and d.</param>
/// <param name="HorizontalBond">Basis of legs l and r.</param>
/// <param name="IsReal">True if every element is real.</param>
public sealed record NetworkPlan(
    NetworkForm Form,
    string Choice,
    ImmutableArray<NetworkForm> Others,
    string Symmetry,
    ImmutableArray<int> GroupOrders,
    ImmutableArray<BondState> VerticalBond,
    ImmutableArray<BondState> HorizontalBond,
    bool IsReal)
{
    /// <summary>Lattice sites that one vertex stands for.</summary>
    public required int SitesPerVertex { get; init; }

    /// <summary>
    /// Observables whose local terms change under the group: their mean vanishes in a symmetric state. Null where the symmetry is one of
    /// the tensor's elements that no permutation of the states gives; that says nothing of observables.
    /// </summary>
    public required ImmutableHashSet<string>? Breaking { get; init; }

    /// <summary>True if the network's elements come from formulas of the exact solution.</summary>
    public bool IsFromSolution { get; init; }
}
