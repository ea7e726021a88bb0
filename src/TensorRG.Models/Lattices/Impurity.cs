using System.Numerics;

namespace TensorRG.Models.Lattices;

/// <summary>
/// The vertex tensor with an observable put in. With o the sum of the observable's terms that belong to one vertex,
/// element (n; u, l, d, r) is the vertex tensor with the weight of each configuration multiplied by o^n, in the basis and with the prefactor of the
/// network it comes with. Every term of the lattice belongs to exactly one vertex.
/// It may break the conservation of charge: the part that does vanishes in a symmetric state.
/// </summary>
/// <param name="Name">Name of the observable.</param>
/// <param name="Element">The element from power n (1 to 4), u, l, d, r.</param>
public sealed record Impurity(string Name, Func<int, int, int, int, int, Complex> Element);
