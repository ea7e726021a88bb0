using MathNet.Numerics.LinearAlgebra;

namespace TensorRG.Models.Tests.Solutions;

/// <summary>
/// The oracle of the exact solutions: ln of the largest eigenvalue of a transfer matrix from row to row, dense, by power iteration.
/// Off criticality it converges exponentially with the width; at criticality as a series in 1/width^2 (I. Affleck, Phys. Rev. Lett. 56, 746, 1986).
/// </summary>
internal static class Strip
{
    /// <summary>ln of the largest eigenvalue of a matrix with elements that are not negative.</summary>
    public static double LogLargest(IReadOnlyList<int> rows, Func<int, int, double> weight)
    {
        double[][] matrix = [.. rows.Select(next => rows.Select(row => weight(row, next)).ToArray())];
        return LogLargest(rows.Count, v => [.. matrix.Select(line => Dot(line, v))]);
    }

    /// <summary>ln of the largest eigenvalue of a map. Pairs of steps, since +- the largest may both be eigenvalues.</summary>
    public static double LogLargest(int count, Func<double[], double[]> map)
    {
        double[] vector = [.. Enumerable.Repeat(1.0, count)];
        double value = 0;
        for (int i = 0; i < 3000; i++)
        {
            double[] image = map(map(vector));
            double norm = Math.Sqrt(Dot(image, image) / Dot(vector, vector)), before = value;
            (vector, value) = ([.. image.Select(x => x / norm)], norm);
            if (Math.Abs(value - before) < 1e-13 * value)
                return Math.Log(value) / 2;
        }
        throw new InvalidOperationException("The power iteration did not converge.");
    }

    /// <summary>All rows of L variables with two states.</summary>
    public static int[] Rows(int width) => [.. Enumerable.Range(0, 1 << width)];

    /// <summary>Spin +1 or -1 of a site, periodic.</summary>
    public static int Spin(int row, int x, int width) => 1 - (2 * Bit(row, x, width));

    /// <summary>0 or 1 of a site, periodic.</summary>
    public static int Bit(int row, int x, int width) => (row >> ((x + width) % width)) & 1;

    /// <summary>ln of the largest eigenvalue for a vertex model with two states on every edge.</summary>
    /// <param name="width">Columns.</param>
    /// <param name="weight">Weight from up, left, down, right.</param>
    public static double Vertex(int width, Func<int, int, int, int, double> weight)
        => LogLargest(1 << width, v => RowOfVertices(width, weight, v));

    /// <summary>Trace of the product along a row of 2 x 2 matrices.</summary>
    public static double Ring(int width, Func<int, int, int, double> element)
    {
        double trace = 0;
        for (int first = 0; first < 2; first++)
        {
            (double zero, double one) = first == 0 ? (1.0, 0.0) : (0, 1);
            for (int x = 0; x < width; x++)
                (zero, one) = ((zero * element(x, 0, 0)) + (one * element(x, 1, 0)), (zero * element(x, 0, 1)) + (one * element(x, 1, 1)));
            trace += first == 0 ? zero : one;
        }
        return trace;
    }

    /// <summary>f of f(L) = f + A/L^2 + B/L^4 + ... through all widths given.</summary>
    public static double Extrapolate(IReadOnlyList<int> widths, Func<int, double> perSite)
    {
        Matrix<double> system = Matrix<double>.Build.Dense(widths.Count, widths.Count, (i, j) => Math.Pow(widths[i], -2 * j));
        return system.Solve(Vector<double>.Build.Dense([.. widths.Select(perSite)]))[0];
    }

    // One vertex after the other; the state carries the left leg of the next vertex beside the row, and the first left leg is fixed.
    private static double[] RowOfVertices(int width, Func<int, int, int, int, double> weight, double[] vector)
    {
        var result = new double[vector.Length];
        for (int first = 0; first < 2; first++)
        {
            double[][] now = first == 0 ? [vector, new double[vector.Length]] : [new double[vector.Length], vector];
            for (int x = 0; x < width; x++)
                now = Step(x, weight, now);
            for (int i = 0; i < result.Length; i++)
                result[i] += now[first][i];
        }
        return result;
    }

    private static double[][] Step(int x, Func<int, int, int, int, double> weight, double[][] now)
    {
        double[][] next = [new double[now[0].Length], new double[now[0].Length]];
        for (int legs = 0; legs < 16; legs++)
        {
            (int u, int l, int d, int r) = (legs & 1, (legs >> 1) & 1, (legs >> 2) & 1, (legs >> 3) & 1);
            double w = weight(u, l, d, r);
            for (int row = 0; w != 0 && row < now[l].Length; row++)
            {
                if (((row >> x) & 1) == u)
                    next[r][row ^ ((u ^ d) << x)] += w * now[l][row];
            }
        }
        return next;
    }

    private static double Dot(double[] a, double[] b)
    {
        double sum = 0;
        for (int i = 0; i < a.Length; i++)
            sum += a[i] * b[i];
        return sum;
    }
}
