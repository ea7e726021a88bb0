using System.Numerics;
using TensorRG.Models.Lattices.Forms;

namespace TensorRG.Models.Lattices.Bonds;

/// <summary>Brings numbers on the configurations of a raw vertex to the bases of its bonds.</summary>
internal sealed class DenseVertex
{
    private readonly RawVertex raw;
    private readonly LegBasis vertical;
    private readonly LegBasis horizontal;
    private readonly int[] order;

    /// <summary>A vertex with its bases.</summary>
    public DenseVertex(RawVertex raw, LegBasis vertical, LegBasis horizontal)
    {
        this.raw = raw;
        this.vertical = vertical;
        this.horizontal = horizontal;
        order = [.. Enumerable.Range(0, raw.Positions).OrderBy(p => raw.Legs(p).L).ThenBy(p => raw.Legs(p).R)];
    }

    /// <summary>A[u, l, d, r], row-major.</summary>
    public Complex[] Contract(Complex[] values)
    {
        int v = vertical.Size, h = horizontal.Size;
        var result = new Complex[v * h * v * h];
        for (int start = 0; start < order.Length;)
        {
            int left = raw.Legs(order[start]).L;
            var partial = new Complex[h * v * v];
            int end = start;
            while (end < order.Length && raw.Legs(order[end]).L == left)
                end = AddRight(values, end, left, partial);
            AddLeft(left, partial, result);
            start = end;
        }
        return result;
    }

    // Positions with one l and one r: the matrix of u and d, then leg r. partial is [r, u, d].
    private int AddRight(Complex[] values, int start, int left, Complex[] partial)
    {
        int v = vertical.Size, right = raw.Legs(order[start]).R, end = start;
        var block = new Complex[v * v];
        for (; end < order.Length && raw.Legs(order[end]).R == right && raw.Legs(order[end]).L == left; end++)
        {
            if (values[order[end]] != 0)
                AddPosition(values[order[end]], raw.Legs(order[end]), block);
        }
        for (int r = 0; r < horizontal.Size; r++)
        {
            Complex factor = horizontal.Out[right, r];
            for (int k = 0; k < block.Length && factor != 0; k++)
                partial[(r * block.Length) + k] += factor * block[k];
        }
        return end;
    }

    private void AddPosition(Complex value, (int U, int L, int D, int R) legs, Complex[] block)
    {
        int v = vertical.Size;
        for (int u = 0; u < v; u++)
        {
            Complex factor = vertical.In[u, legs.U] * value;
            for (int d = 0; d < v && factor != 0; d++)
                block[(u * v) + d] += factor * vertical.Out[legs.D, d];
        }
    }

    private void AddLeft(int left, Complex[] partial, Complex[] result)
    {
        int v = vertical.Size, h = horizontal.Size;
        for (int l = 0; l < h; l++)
        {
            Complex factor = horizontal.In[l, left];
            if (factor == 0)
                continue;
            for (int u = 0; u < v; u++)
            {
                for (int d = 0; d < v; d++)
                {
                    int to = ((((u * h) + l) * v) + d) * h;
                    for (int r = 0; r < h; r++)
                        result[to + r] += factor * partial[(((r * v) + u) * v) + d];
                }
            }
        }
    }
}
