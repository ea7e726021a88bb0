namespace TensorRG.Models.Lattices;

/// <summary>
/// The lattices. Cells sit at (x, y), x to the right and y downward; a cell has one site on the square and the triangular lattice,
/// two on the honeycomb (a, b), three on the kagome (a, b, c).
/// </summary>
public enum LatticeKind
{
    /// <summary>One site a cell, neighbours to the right and below.</summary>
    Square,

    /// <summary>One site a cell; the square lattice with the diagonal from (x, y) to (x + 1, y + 1).</summary>
    Triangular,

    /// <summary>Site a of a cell meets b of the same cell, of the cell to the left and of the cell above.</summary>
    Honeycomb,

    /// <summary>Up-triangles (a, b, c) within a cell; down-triangles of a(x, y), b(x - 1, y), c(x, y - 1).</summary>
    Kagome,
}
