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

    /// <summary>Root of the sum of squares of a state's entries in <see cref="In"/>, for each state.</summary>
    public double[] InNorms() => [.. Enumerable.Range(0, Size).Select(k => Norm(In.GetLength(1), i => In[k, i]))];

    /// <summary>The same in <see cref="Out"/>.</summary>
    public double[] OutNorms() => [.. Enumerable.Range(0, Size).Select(k => Norm(Out.GetLength(0), i => Out[i, k]))];

    private static double Norm(int count, Func<int, Complex> entry)
        => Enumerable.Range(0, count).Aggregate(0.0, (norm, i) => double.Hypot(norm, Complex.Abs(entry(i))));
}
