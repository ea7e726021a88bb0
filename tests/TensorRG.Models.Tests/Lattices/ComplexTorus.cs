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

    /// <summary>The contraction with one tensor put in at each place in turn.</summary>
    public Complex One(Complex[] impurity)
        => Places().Aggregate(Complex.Zero, (sum, p) => sum + Contract((x, y) => (x, y) == p ? impurity : Vertex));

    /// <summary>The same with two tensors at all pairs of different places.</summary>
    public Complex Two(Complex[] impurity)
        => Places().SelectMany(p => Places().Where(q => q != p).Select(q => (p, q)))
            .Aggregate(Complex.Zero, (sum, pair) => sum + Contract((x, y) => (x, y) == pair.p || (x, y) == pair.q ? impurity : Vertex));

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

    private IEnumerable<(int X, int Y)> Places() => Enumerable.Range(0, lx * ly).Select(i => (i % lx, i / lx));

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
