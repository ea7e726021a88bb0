using System.Numerics;

namespace TensorRG.Models.Lattices.Forms;

/// <summary>A sum of terms as a function of the variables of a vertex, laid out for fast enumeration.</summary>
internal sealed class LocalSum
{
    private readonly List<(Complex[] Values, int[] Variables)> terms = [];
    private readonly int states;

    /// <summary>A sum without terms, for q states.</summary>
    public LocalSum(int states) => this.states = states;

    /// <summary>Adds a table that takes these variables, with separate factors for the real and the imaginary part.</summary>
    public void Add(Complex[] values, int[] variables, double real, double imaginary)
    {
        Complex[] scaled = [.. values.Select(v => new Complex(
            double.IsInfinity(v.Real) ? v.Real : real * v.Real,
            imaginary * v.Imaginary))];
        terms.Add((scaled, variables));
    }

    /// <summary>The value in a configuration.</summary>
    public Complex At(ReadOnlySpan<int> configuration)
    {
        double real = 0, imaginary = 0;
        foreach ((Complex[] values, int[] variables) in terms)
        {
            int index = 0;
            foreach (int v in variables)
                index = (index * states) + configuration[v];
            real += values[index].Real;
            imaginary += values[index].Imaginary;
        }
        return new Complex(real, imaginary);
    }
}
