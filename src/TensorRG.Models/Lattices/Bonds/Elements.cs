using System.Numerics;

namespace TensorRG.Models.Lattices.Bonds;

/// <summary>The elements of a four-leg tensor, divided by a scale.</summary>
internal sealed class Elements
{
    // What the change of basis leaves of forbidden elements is round-off; more than this, or more than this share of what it magnifies, would be a wrong symmetry.
    private const double RoundOff = 1e-9;
    private const double RelativeRoundOff = 1e-12;
    private const double Epsilon = 4e-16;

    private readonly Complex[] values;
    private readonly int vertical;
    private readonly int horizontal;
    private readonly double scale;

    /// <summary>Takes over the values A[u, l, d, r], row-major.</summary>
    public Elements(Complex[] values, int vertical, int horizontal, double scale)
    {
        for (int i = 0; i < values.Length; i++)
            values[i] /= scale;
        this.values = values;
        this.vertical = vertical;
        this.horizontal = horizontal;
        this.scale = scale;
    }

    /// <summary>One element.</summary>
    public Complex At(int u, int l, int d, int r) => values[(((((u * horizontal) + l) * vertical) + d) * horizontal) + r];

    /// <summary>The real part of one element.</summary>
    public double RealAt(int u, int l, int d, int r) => At(u, l, d, r).Real;

    /// <summary>
    /// Makes elements exactly zero that are no more than round-off of the raw weights, magnified by the bases. Left in place they would look as important
    /// as any other element, although the neighbours of such states weigh next to nothing.
    /// </summary>
    /// <param name="magnified">How much the bases magnify the round-off of the raw weights in element u, l, d, r.</param>
    public void DropRoundOff(Func<int, int, int, int, double> magnified)
    {
        for (int i = 0; i < values.Length; i++)
        {
            (int u, int l, int d, int r) = (i / (horizontal * vertical * horizontal), i / (vertical * horizontal) % horizontal, i / horizontal % vertical, i % horizontal);
            if (Complex.Abs(values[i]) < Epsilon * magnified(u, l, d, r) / scale)
                values[i] = 0;
        }
    }

    /// <summary>Makes elements that break a charge, and imaginary parts of a real tensor, exactly zero.</summary>
    /// <param name="network">The network with its charges.</param>
    /// <param name="isReal">True for a real tensor.</param>
    /// <param name="magnified">How much the bases magnify the round-off of the raw weights in element u, l, d, r.</param>
    /// <exception cref="InvalidOperationException">They were not small: the symmetry is wrong.</exception>
    public void Conserve(VertexNetwork network, bool isReal, Func<int, int, int, int, double> magnified)
    {
        for (int i = 0; i < values.Length; i++)
        {
            (int u, int l, int d, int r) = (i / (horizontal * vertical * horizontal), i / (vertical * horizontal) % horizontal, i / horizontal % vertical, i % horizontal);
            Complex kept = !network.ConservesCharge(u, l, d, r) ? 0 : isReal ? values[i].Real : values[i];
            if (Complex.Abs(kept - values[i]) > Math.Max(RoundOff, RelativeRoundOff * magnified(u, l, d, r) / scale))
                throw new InvalidOperationException($"Element ({u}, {l}, {d}, {r}) is {values[i]} where the symmetry wants {kept}.");
            values[i] = kept;
        }
    }
}
