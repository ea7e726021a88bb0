using System.Numerics;
using TensorRG.Tensors;

namespace TensorRG.CoarseGraining.Tests;

/// <summary>
/// Z of a torus of site tensors by plain loops over a row-to-row transfer matrix: Lx columns, Ly rows, and going up
/// through all rows shifts by some columns.
/// </summary>
/// <remarks>
/// A plaquette step turns the basis vectors of the lattice (1,0), (0,1) into (1,1), (1,-1). One tensor after n steps,
/// closed on itself, is the torus of the vectors M^n (1,0), M^n (0,1) with M = [[1,1],[1,-1]]: for even n = 2k that is 2^k x 2^k; for odd
/// n = 2k+1 the vectors (2^k, 2^k), (2^k, -2^k), which span the same lattice as (2^(k+1), 0), (2^k, 2^k): 2^(k+1) columns, 2^k rows, shift 2^k.
/// </remarks>
/// <param name="Columns">Lx.</param>
/// <param name="Rows">Ly.</param>
/// <param name="Shift">Columns that the identification of top and bottom shifts by.</param>
internal sealed record Torus(int Columns, int Rows, int Shift)
{
    public int Vertices => Columns * Rows;

    /// <summary>The torus that one tensor of a scheme stands for after some steps.</summary>
    public static Torus After(int step, double aspectRatio)
    {
        int side = 1 << (step / 2);
        if (step % 2 == 0)
        {
            Assert.Equal(1, aspectRatio);
            return new Torus(side, side, 0);
        }

        return aspectRatio switch
        {
            1 => new Torus(2 * side, side, side),
            2 => new Torus(side, 2 * side, 0),
            0.5 => new Torus(2 * side, side, 0),
            _ => throw new InvalidOperationException($"No torus is known for aspect ratio {aspectRatio} at step {step}."),
        };
    }

    /// <summary>Z, and the same sum over |elements|: the scale of its rounding error.</summary>
    public (Complex Value, double Scale) Z<T>(Tensor<T> site)
        where T : unmanaged, INumberBase<T>
        => (Sum(site, Scalar.ToComplex), Sum(site, static x => Scalar.Magnitude(x)).Real);

    private Complex Sum<T>(Tensor<T> site, Func<T, Complex> value)
        where T : unmanaged, INumberBase<T>
    {
        int v = site.Legs[0].Dimension, h = site.Legs[1].Dimension;
        var a = new Complex[v, h, v, h];
        for (int i = 0; i < a.Length; i++)
        {
            (int u, int l, int d, int r) = (i / (h * v * h), i / (v * h) % h, i / h % v, i % h);
            a[u, l, d, r] = value(site.At(u, l, d, r));
        }

        int size = (int)Math.Pow(v, Columns);
        Complex[,] row = RowMatrix(a, size);
        Complex total = Complex.Zero;
        for (int top = 0; top < size; top++)
        {
            var vector = new Complex[size];
            vector[top] = 1;
            for (int y = 0; y < Rows; y++)
                vector = Multiply(vector, row);
            total += vector[Shifted(top, v)];
        }

        return total;
    }

    private static Complex[] Multiply(Complex[] vector, Complex[,] matrix)
    {
        var result = new Complex[vector.Length];
        for (int i = 0; i < vector.Length; i++)
        {
            for (int j = 0; j < vector.Length && vector[i] != 0; j++)
                result[j] += vector[i] * matrix[i, j];
        }

        return result;
    }

    /// <summary>[upper, lower] of configurations numbered with the first column as the fastest digit.</summary>
    private Complex[,] RowMatrix(Complex[,,,] a, int size)
    {
        var matrix = new Complex[size, size];
        for (int upper = 0; upper < size; upper++)
        {
            for (int lower = 0; lower < size; lower++)
                matrix[upper, lower] = RowElement(a, upper, lower);
        }

        return matrix;
    }

    private Complex RowElement(Complex[,,,] a, int upper, int lower)
    {
        int v = a.GetLength(0), h = a.GetLength(1);
        Complex sum = Complex.Zero;
        for (int start = 0; start < h; start++)
        {
            var line = new Complex[h];
            line[start] = 1;
            for ((int x, int u, int d) = (0, upper, lower); x < Columns; x++, u /= v, d /= v)
            {
                var next = new Complex[h];
                for (int l = 0; l < h; l++)
                {
                    for (int r = 0; r < h; r++)
                        next[r] += line[l] * a[u % v, l, d % v, r];
                }

                line = next;
            }

            sum += line[start];
        }

        return sum;
    }

    private int Shifted(int configuration, int v)
    {
        int low = (int)Math.Pow(v, Shift), high = (int)Math.Pow(v, Columns - Shift);
        return (configuration / low) + (configuration % low * high);
    }
}
