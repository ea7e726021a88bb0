using System.Numerics;

namespace TensorRG.Models.Lattices.Bonds;

/// <summary>The elements of a four-leg tensor, divided by a scale.</summary>
internal sealed class Elements
{
    // What the step of basis leaves of forbidden elements is round-off; more than this, or than the legs explain, would be a wrong symmetry.
    private const double RoundOff = 1e-9;

    private readonly Complex[] values;
    private readonly int vertical;
    private readonly int horizontal;

    /// <summary>Takes over the values A[u, l, d, r], row-major.</summary>
    public Elements(Complex[] values, int vertical, int horizontal, double scale)
    {
        for (int i = 0; i < values.Length; i++)
            values[i] /= scale;
        this.values = values;
        this.vertical = vertical;
        this.horizontal = horizontal;
    }

    /// <summary>One element.</summary>
    public Complex At(int u, int l, int d, int r) => values[(((((u * horizontal) + l) * vertical) + d) * horizontal) + r];

    /// <summary>The real part of one element.</summary>
    public double RealAt(int u, int l, int d, int r) => At(u, l, d, r).Real;

    /// <summary>Makes elements that break a charge, and imaginary parts of a real tensor, exactly zero.</summary>
    /// <param name="network">Its charges.</param>
    /// <param name="isReal">True if imaginary parts are round-off.</param>
    /// <param name="noise">Round-off that the legs u, l, d, r may leave.</param>
    /// <exception cref="InvalidOperationException">They were not small: the symmetry is wrong.</exception>
    public void Conserve(VertexNetwork network, bool isReal, Func<int, int, int, int, double> noise)
    {
        for (int i = 0; i < values.Length; i++)
        {
            (int u, int l, int d, int r) = (i / (horizontal * vertical * horizontal), i / (vertical * horizontal) % horizontal, i / horizontal % vertical, i % horizontal);
            Complex kept = !network.ConservesCharge(u, l, d, r) ? 0 : isReal ? values[i].Real : values[i];
            if (Complex.Abs(kept - values[i]) > RoundOff && Complex.Abs(kept - values[i]) > noise(u, l, d, r))
                throw new InvalidOperationException($"Element ({u}, {l}, {d}, {r}) is {values[i]} where the symmetry wants {kept}.");
            values[i] = kept;
        }
    }
}
