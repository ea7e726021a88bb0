using System.Collections.Immutable;

namespace TensorRG.Models.Lattices;

/// <summary>The network of a lattice system, with what a person wants to know of it.</summary>
/// <param name="Network">The vertex tensor; its SitesPerVertex counts the cells of a block.</param>
/// <param name="Impurities">One for each observable asked for, in that order.</param>
/// <param name="Form">The form that was built; never <see cref="NetworkForm.Auto"/>.</param>
/// <param name="Choice">Why this form, in a sentence.</param>
/// <param name="Symmetry">The group that the charges carry and what it does to the states, in words; "none" without.</param>
public sealed record ModelNetwork(
    VertexNetwork Network,
    ImmutableArray<Impurity> Impurities,
    NetworkForm Form,
    string Choice,
    string Symmetry);
