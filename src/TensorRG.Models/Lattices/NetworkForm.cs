namespace TensorRG.Models.Lattices;

/// <summary>The equally valid ways to write a lattice model as a square network of one tensor.</summary>
public enum NetworkForm
{
    /// <summary>The tool chooses.</summary>
    Auto,

    /// <summary>A tensor on every cell; the weight of each bond split into two factors, one for either end. Sites and nearest neighbours only.</summary>
    Bond,

    /// <summary>A tensor on every face, legs carry the two sites of an edge, the energy of an edge is shared by its two faces: any term on a face; keeps reflections and relieves frustration.</summary>
    Face,

    /// <summary>A tensor on every face, vertical legs carry one site and horizontal legs two: any term on a face, smaller but not symmetric.</summary>
    Row,

    /// <summary>A tensor on every pair of an up- and a down-triangle of the kagome lattice; legs carry the shared sites.</summary>
    Triangles,

    /// <summary>The table of vertex weights, with the variables on the legs.</summary>
    Vertex,
}
