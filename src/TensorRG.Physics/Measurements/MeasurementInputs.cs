using System.Collections.Immutable;
using TensorRG.Models;
using TensorRG.Models.Lattices;

namespace TensorRG.Physics.Measurements;

/// <summary>Everything that determines the numbers of one measurement.</summary>
public sealed record MeasurementInputs
{
    /// <summary>The model's parameters.</summary>
    public required ParameterSet Parameters { get; init; }

    /// <summary>
    /// Names of what to measure: ln-z, free-energy, energy, entropy, specific-heat, susceptibility, any observable of the model; with a torus length also
    /// NAME^2, NAME^4 and binder. Checked against the model by the measurer.
    /// </summary>
    public required ImmutableArray<string> Quantities { get; init; }

    /// <summary>Method: <c>boundary</c> (infinite lattice, from the fixed points of the row-to-row transfer matrix) or <c>blocks</c> (HOTRG with impurity tensors).</summary>
    public string Method { get; init; } = "boundary";

    /// <summary>Largest bond dimension chi.</summary>
    public int BondDimension { get; init; } = 32;

    /// <summary>Linear size of a torus in network vertices, a power of two; null for the infinite lattice.</summary>
    public int? TorusLength { get; init; }

    /// <summary>Form of the network.</summary>
    public NetworkForm Form { get; init; } = NetworkForm.Auto;

    /// <summary>Seed of starting states.</summary>
    public long Seed { get; init; } = 1;
}
