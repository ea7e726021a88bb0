using System.Collections.Immutable;
using TensorRG.Models.Lattices;

namespace TensorRG.Models.Files;

/// <summary>What a model file says, checked and compiled.</summary>
internal sealed record ModelContent
{
    /// <summary>Name of the model.</summary>
    public required string Name { get; init; }

    /// <summary>Title.</summary>
    public required string Title { get; init; }

    /// <summary>Description.</summary>
    public required string Description { get; init; }

    /// <summary>The lattice.</summary>
    public required LatticeKind Lattice { get; init; }

    /// <summary>True if the variables sit on the edges.</summary>
    public required bool OnEdges { get; init; }

    /// <summary>Parameters and constants.</summary>
    public required Globals Globals { get; init; }

    /// <summary>Variables of a site, or the one of an edge.</summary>
    public required ImmutableArray<SiteVariable> Variables { get; init; }

    /// <summary>Terms of the energy.</summary>
    public required ImmutableArray<LocalTerm> Energy { get; init; }

    /// <summary>Factors of the weight.</summary>
    public required ImmutableArray<LocalTerm> Weight { get; init; }

    /// <summary>Hard constraints.</summary>
    public required ImmutableArray<LocalTerm> Require { get; init; }

    /// <summary>Table of vertex weights, or null.</summary>
    public required ImmutableArray<VertexRow>? Rows { get; init; }

    /// <summary>Observables.</summary>
    public required ImmutableArray<FileObservable> Observables { get; init; }

    /// <summary>Form of the network.</summary>
    public required NetworkForm Form { get; init; }

    /// <summary>Critical temperature, or null.</summary>
    public required CriticalRule? Critical { get; init; }

    /// <summary>Published values.</summary>
    public required ImmutableArray<FileReference> References { get; init; }

    /// <summary>The built-in solution, or null.</summary>
    public required IKnownSolution? Solution { get; init; }

    /// <summary>The whole file.</summary>
    public required Node Root { get; init; }
}
