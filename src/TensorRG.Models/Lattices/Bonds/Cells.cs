using System.Numerics;
using TensorRG.Models.Lattices.Forms;

namespace TensorRG.Models.Lattices.Bonds;

/// <summary>The tensors of the network in the final basis: one vertex or a block of 2 x 2, with or without an observable put in.</summary>
internal sealed class Cells
{
    private readonly RawVertex raw;
    private readonly DenseVertex dense;
    private readonly VertexTerms terms;
    private readonly LegBasis vertical;
    private readonly LegBasis horizontal;

    /// <summary>A vertex with the bases of its bonds.</summary>
    /// <exception cref="ModelException">The tensor would be too large.</exception>
    public Cells(RawVertex raw, VertexTerms terms, LegBasis vertical, LegBasis horizontal)
    {
        this.raw = raw;
        this.terms = terms;
        this.vertical = vertical;
        this.horizontal = horizontal;
        RequireSize(vertical, horizontal, terms.NeedsBlock);
        dense = new DenseVertex(raw, vertical, horizontal);
    }

    /// <summary>Checks that the tensor fits.</summary>
    /// <param name="vertical">Basis of u and d.</param>
    /// <param name="horizontal">Basis of l and r.</param>
    /// <param name="needsBlock">True for a block of 2 x 2 cells.</param>
    /// <exception cref="ModelException">It does not.</exception>
    public static void RequireSize(LegBasis vertical, LegBasis horizontal, bool needsBlock)
    {
        double elements = Math.Pow((double)vertical.Size * horizontal.Size, 2);
        if (elements > FormChoice.MaxElements)
            throw FormChoice.TooLarge("The network's tensor", elements, "use fewer states, or another form");
        if (needsBlock && elements * elements > FormChoice.MaxElements)
            throw FormChoice.TooLarge("The tensor of a block of 2 x 2 cells, which an alternating sign takes,", elements * elements, "use fewer states, or leave out the staggered quantity");
    }

    /// <summary>Charges of the states of the legs u and d of a cell.</summary>
    public int[][] Vertical(IReadOnlyList<int> orders) => Legs(vertical, orders);

    /// <summary>Charges of the states of the legs l and r of a cell.</summary>
    public int[][] Horizontal(IReadOnlyList<int> orders) => Legs(horizontal, orders);

    /// <summary>A cell as the weights have it.</summary>
    public Complex[] Weights()
    {
        Complex[][] vertices = [.. terms.Signs.Select(s => dense.Contract(raw.Weights(s)))];
        return terms.NeedsBlock
            ? new BlockVertex(vertical.Size, horizontal.Size).Power(_ => vertices[0], _ => vertices[^1], 0)
            : vertices[0];
    }

    /// <summary>A cell with the weight of each configuration multiplied by a power of the cell's part of an observable.</summary>
    public Complex[] Weighted(LocalObservable observable, int power)
    {
        if (!terms.NeedsBlock)
            return dense.Contract(raw.Weighted(observable, power, 1));
        Complex[][] even = Powers(1), odd = Powers(-1);
        return new BlockVertex(vertical.Size, horizontal.Size).Power(n => even[n], n => odd[n], power);

        Complex[][] Powers(int sign) => [.. Enumerable.Range(0, power + 1).Select(n => dense.Contract(raw.Weighted(observable, n, sign)))];
    }

    /// <summary>The product of the norms of the four basis vectors of an element: states of small weight have large ones on the ingoing legs.</summary>
    public Func<int, int, int, int, double> Magnification()
    {
        double[] up = Pairs(vertical.InNorms()), left = Pairs(horizontal.InNorms()), down = Pairs(vertical.OutNorms()), right = Pairs(horizontal.OutNorms());
        return (u, l, d, r) => up[u] * left[l] * down[d] * right[r];
    }

    private double[] Pairs(double[] norms) => terms.NeedsBlock ? [.. norms.SelectMany(a => norms.Select(b => a * b))] : norms;

    private int[][] Legs(LegBasis leg, IReadOnlyList<int> orders)
        => terms.NeedsBlock ? [.. leg.Charges.SelectMany(a => leg.Charges.Select(b => Sum(a, b, orders)))] : leg.Charges;

    private static int[] Sum(int[] a, int[] b, IReadOnlyList<int> orders)
        => [.. a.Zip(b, static (x, y) => x + y).Zip(orders, static (sum, n) => n == 0 ? sum : sum % n)];
}
