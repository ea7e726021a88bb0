namespace TensorRG.Models.Lattices.Forms;

/// <summary>
/// How a vertex of the network is made of variables: the outer ones fix the states of the legs, the inner ones are summed within the vertex.
/// Variables are numbered outer first.
/// </summary>
internal sealed record VertexForm
{
    /// <summary>Which form.</summary>
    public required NetworkForm Form { get; init; }

    /// <summary>Lattice sites (or vertices with variables on the edges) of one vertex of the network.</summary>
    public required int Sites { get; init; }

    /// <summary>Number of variables that legs carry.</summary>
    public required int Outer { get; init; }

    /// <summary>Number of variables summed within the vertex.</summary>
    public int Inner { get; init; }

    /// <summary>Variables of the leg u, the first one slowest; those of d in the same order.</summary>
    public required int[] Up { get; init; }

    /// <summary>Variables of the leg l; those of r in the same order.</summary>
    public required int[] Left { get; init; }

    /// <summary>Variables of the leg d.</summary>
    public required int[] Down { get; init; }

    /// <summary>Variables of the leg r.</summary>
    public required int[] Right { get; init; }

    /// <summary>The terms.</summary>
    public required Placement[] Placements { get; init; }

    /// <summary>In the bond form the terms of W, the weight between the state on leg u (variable 0) and this vertex (variable 1); null in other forms.</summary>
    public Placement[]? VerticalWeight { get; init; }

    /// <summary>The same for leg l.</summary>
    public Placement[]? HorizontalWeight { get; init; }

    /// <summary>All variables.</summary>
    public int Variables => Outer + Inner;
}
