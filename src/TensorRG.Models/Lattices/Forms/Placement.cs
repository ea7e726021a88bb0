namespace TensorRG.Models.Lattices.Forms;

/// <summary>One term of one vertex of the network: which variables it takes and how much of it this vertex holds.</summary>
/// <param name="Cluster">Whose table.</param>
/// <param name="Variables">The vertex's variables, in the order of the table.</param>
/// <param name="Weight">This vertex's part of the logarithm of the weight; over all vertices that hold the term they add up to 1.</param>
/// <param name="Observable">This vertex's part of an observable, likewise.</param>
/// <param name="Sign">Sign of a staggered term here, relative to the sign of the vertex.</param>
/// <param name="Owns">True for one of the vertices that hold the term: it takes all of a sign, which has no half.</param>
internal sealed record Placement(Cluster Cluster, int[] Variables, double Weight, double Observable, int Sign, bool Owns = true);
