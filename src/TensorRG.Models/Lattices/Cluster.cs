namespace TensorRG.Models.Lattices;

/// <summary>Where a term of the Hamiltonian sits, and in which order it takes the variables there.</summary>
public enum Cluster
{
    /// <summary>(i): one site; on every site of the cell.</summary>
    Site,

    /// <summary>
    /// (i, j). Square, triangular: (x, y), (x + 1, y). Honeycomb: a, b of one cell. Kagome: a, b of one cell, and b(x, y), a(x + 1, y).
    /// </summary>
    Bond1,

    /// <summary>
    /// (i, j). Square, triangular: (x, y), (x, y + 1). Honeycomb: a(x + 1, y), b(x, y). Kagome: a, c of one cell, and c(x, y), a(x, y + 1).
    /// </summary>
    Bond2,

    /// <summary>
    /// (i, j). Triangular: (x, y), (x + 1, y + 1). Honeycomb: a(x, y + 1), b(x, y). Kagome: b, c of one cell, and b(x - 1, y), c(x, y - 1).
    /// </summary>
    Bond3,

    /// <summary>(i, j), square: (x, y), (x + 1, y + 1).</summary>
    Diagonal,

    /// <summary>(i, j), square: (x + 1, y), (x, y + 1).</summary>
    Antidiagonal,

    /// <summary>(i, j, k, l), square, clockwise: (x, y), (x + 1, y), (x + 1, y + 1), (x, y + 1).</summary>
    Face,

    /// <summary>(i, j, k). Triangular: (x, y), (x, y + 1), (x + 1, y + 1). Kagome: a, b, c of one cell.</summary>
    UpTriangle,

    /// <summary>(i, j, k). Triangular: (x, y), (x + 1, y), (x + 1, y + 1). Kagome: a(x, y), b(x - 1, y), c(x, y - 1).</summary>
    DownTriangle,

    /// <summary>
    /// Variables on the edges. Square: (up, left, down, right) of one vertex. Honeycomb: the edges in the directions of bonds 1, 2, 3, on both vertices of the cell.
    /// </summary>
    Vertex,
}
