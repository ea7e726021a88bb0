using System.Numerics;

namespace TensorRG.Models.Lattices.Bonds;

/// <summary>
/// The basis of a bond. Leg r (or d) of the raw vertex is contracted with Out[raw, k], leg l (or u) with In[k, raw]; Out In acts as the identity
/// between any two tensors that can meet on the bond.
/// </summary>
/// <param name="In">States of the bond by raw states.</param>
/// <param name="Out">Raw states by states of the bond.</param>
/// <param name="Charges">Charge of each state.</param>
internal sealed record LegBasis(Complex[,] In, Complex[,] Out, int[][] Charges)
{
    /// <summary>Number of states.</summary>
    public int Size => Charges.Length;
}
