using System.Numerics;
using TensorRG.Models.Lattices.Forms;

namespace TensorRG.Models.Lattices.Bonds;

/// <summary>The vectors over the raw states of an ingoing leg that a vertex can send into its bond: one for each setting of its other legs.</summary>
internal sealed class BondColumns
{
    private readonly int[] ingoing;
    private readonly int[] column;
    private readonly int[] outgoing;
    private readonly int[] members;

    /// <summary>Sorts the positions of a raw vertex by their other legs.</summary>
    /// <param name="raw">The vertex.</param>
    /// <param name="vertical">True for leg u, false for leg l.</param>
    public BondColumns(RawVertex raw, bool vertical)
    {
        States = vertical ? raw.Vertical : raw.Horizontal;
        ingoing = new int[raw.Positions];
        column = new int[raw.Positions];
        outgoing = new int[raw.Positions];
        var numbers = new Dictionary<(int, int, int), int>();
        for (int p = 0; p < raw.Positions; p++)
        {
            (int u, int l, int d, int r) = raw.Legs(p);
            (ingoing[p], outgoing[p]) = vertical ? (u, d) : (l, r);
            (int, int, int) key = vertical ? (l, d, r) : (u, d, r);
            if (!numbers.TryGetValue(key, out int number))
                numbers.Add(key, number = numbers.Count);
            column[p] = number;
        }
        members = new int[numbers.Count];
        foreach (int c in column)
            members[c]++;
    }

    /// <summary>Number of raw states.</summary>
    public int States { get; }

    /// <summary>
    /// The vectors as columns. Those with a single entry are put together, row by row: the products of rows, all that matters, stay the same.
    /// </summary>
    public Complex[,] Matrix(Complex[] values)
    {
        var number = new int[members.Length];
        int count = 0;
        for (int c = 0; c < members.Length; c++)
            number[c] = members[c] > 1 ? count++ : -1;
        bool anySingle = members.Any(static m => m == 1);
        var matrix = new Complex[States, count + (anySingle ? States : 0)];
        for (int p = 0; p < values.Length; p++)
        {
            if (number[column[p]] >= 0)
                matrix[ingoing[p], number[column[p]]] = values[p];
            else
                AddSquare(ref matrix[ingoing[p], count + ingoing[p]], values[p]);
        }
        return matrix;
    }

    /// <summary>Root of the sum of squares over positions, for each state of the ingoing leg.</summary>
    public double[] IngoingNorms(Complex[] values) => Norms(ingoing, values);

    /// <summary>The same for the outgoing leg.</summary>
    public double[] OutgoingNorms(Complex[] values) => Norms(outgoing, values);

    private static void AddSquare(ref Complex sum, Complex value) => sum = double.Hypot(sum.Real, Complex.Abs(value));

    private double[] Norms(int[] leg, Complex[] values)
    {
        var norms = new double[States];
        for (int p = 0; p < values.Length; p++)
            norms[leg[p]] = double.Hypot(norms[leg[p]], Complex.Abs(values[p]));
        return norms;
    }
}
