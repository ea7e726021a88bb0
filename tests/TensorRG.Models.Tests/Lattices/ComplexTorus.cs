using System.Numerics;

namespace TensorRG.Models.Tests.Lattices;

/// <summary>Contracts a torus of vertex tensors, each possibly another one, site by site over a row of states. Nothing is cut.</summary>
internal sealed class ComplexTorus
{
    private readonly int vertical;
    private readonly int horizontal;
    private readonly int lx;
    private readonly int ly;

    public ComplexTorus(VertexNetwork network, int lx, int ly)
    {
        vertical = network.VerticalBond.Length;
        horizontal = network.HorizontalBond.Length;
        this.lx = lx;
        this.ly = ly;
        Vertex = Dense(network.Element);
    }

    public Complex[] Vertex { get; }

    public Complex[] Dense(Func<int, int, int, int, Complex> element)
    {
        var values = new Complex[vertical * horizontal * vertical * horizontal];
        for (int i = 0; i < values.Length; i++)
            values[i] = element(i / (horizontal * vertical * horizontal), i / (vertical * horizontal) % horizontal, i / horizontal % vertical, i % horizontal);
        return values;
    }

    /// <summary>The contraction with these tensors at (x, y).</summary>
    public Complex Contract(Func<int, int, Complex[]> at)
    {
        Complex[,] product = Row(at, 0);
        for (int y = 1; y < ly; y++)
            product = Multiply(product, Row(at, y));
        Complex trace = 0;
        for (int i = 0; i < product.GetLength(0); i++)
            trace += product[i, i];
        return trace;
    }

    /// <summary>
    /// The contraction with the n-th power of a sum of local terms, (o_1 + o_2 + ...)^n = sum of n! / (n_1! n_2! ...) o_1^n_1 o_2^n_2 ...
    /// </summary>
    /// <param name="powers">The tensor itself, and with o, o^2, ... put in.</param>
    /// <param name="n">The power.</param>
    public Complex Moment(Complex[][] powers, int n)
    {
        Complex sum = 0;
        foreach (int[] split in Splits(n, lx * ly))
            sum += split.Aggregate(Factorial(n), static (w, k) => w / Factorial(k)) * Contract((x, y) => powers[split[(y * lx) + x]]);
        return sum;
    }

    private static double Factorial(int n) => n < 2 ? 1 : n * Factorial(n - 1);

    // All ways to write n as a sum of that many whole numbers from 0.
    private static IEnumerable<int[]> Splits(int n, int parts)
        => parts == 1 ? [[n]] : Enumerable.Range(0, n + 1).SelectMany(first => Splits(n - first, parts - 1).Select(rest => (int[])[first, .. rest]));

    private static Complex[,] Multiply(Complex[,] a, Complex[,] b)
    {
        int n = a.GetLength(0);
        var c = new Complex[n, n];
        for (int i = 0; i < n; i++)
        {
            for (int k = 0; k < n; k++)
            {
                Complex factor = a[i, k];
                for (int j = 0; j < n && factor != 0; j++)
                    c[i, j] += factor * b[k, j];
            }
        }
        return c;
    }

    // The transfer matrix [upper, lower] of one row, built up column by column as [start, upper, lower, right].
    private Complex[,] Row(Func<int, int, Complex[]> at, int y)
    {
        int size = 1;
        Complex[] row = [.. Enumerable.Range(0, horizontal * horizontal).Select(i => i / horizontal == i % horizontal ? Complex.One : 0)];
        for (int x = 0; x < lx; x++, size *= vertical)
            row = Append(row, size, at(x, y));
        var matrix = new Complex[size, size];
        for (int i = 0; i < row.Length; i++)
        {
            if (i / (size * size * horizontal) == i % horizontal)
                matrix[i / (size * horizontal) % size, i / horizontal % size] += row[i];
        }
        return matrix;
    }

    private Complex[] Append(Complex[] row, int size, Complex[] tensor)
    {
        int next = size * vertical;
        var result = new Complex[horizontal * next * next * horizontal];
        for (int i = 0; i < row.Length; i++)
        {
            if (row[i] == 0)
                continue;
            (int start, int upper, int lower, int l) = (i / (size * size * horizontal), i / (size * horizontal) % size, i / horizontal % size, i % horizontal);
            for (int u = 0; u < vertical; u++)
            {
                for (int d = 0; d < vertical; d++)
                {
                    int to = ((((start * next) + (upper * vertical) + u) * next) + (lower * vertical) + d) * horizontal;
                    int from = ((((u * horizontal) + l) * vertical) + d) * horizontal;
                    for (int r = 0; r < horizontal; r++)
                        result[to + r] += row[i] * tensor[from + r];
                }
            }
        }
        return result;
    }
}
