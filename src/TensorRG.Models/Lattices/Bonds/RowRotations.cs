using System.Numerics;

namespace TensorRG.Models.Lattices.Bonds;

/// <summary>
/// Left singular vectors by plane rotations of the rows until they are orthogonal (one-sided Jacobi; M. R. Hestenes, J. SIAM 6, 51 (1958)):
/// small singular values of matrices with rows of very different size come out right, and a real matrix stays real.
/// </summary>
internal static class RowRotations
{
    private const int MaxSweeps = 60;

    /// <summary>M = U S V^H; U and S, values descending.</summary>
    /// <param name="matrix">M; it is overwritten.</param>
    public static (Complex[,] U, double[] S) Decompose(Complex[][] matrix)
    {
        int n = matrix.Length;
        Complex[][] turned = [.. Enumerable.Range(0, n).Select(i => Unit(i, n))];
        for (int sweep = 0; sweep < MaxSweeps && Sweep(matrix, turned); sweep++)
        {
        }
        double[] norms = [.. matrix.Select(static r => Math.Sqrt(r.Sum(Square)))];
        int[] order = [.. Enumerable.Range(0, n).OrderByDescending(i => norms[i])];
        var u = new Complex[n, n];
        for (int k = 0; k < n; k++)
            SetColumn(u, k, turned[order[k]]);
        return (u, [.. order.Select(i => norms[i])]);
    }

    private static double Square(Complex x) => (x.Real * x.Real) + (x.Imaginary * x.Imaginary);

    private static Complex[] Unit(int i, int n)
    {
        var row = new Complex[n];
        row[i] = 1;
        return row;
    }

    // The rotations J satisfy J M = S V^H, so U = J^H. The first component of largest magnitude is made real and positive.
    private static void SetColumn(Complex[,] u, int k, Complex[] row)
    {
        double largest = row.Max(static x => Complex.Abs(x));
        Complex pivot = row.First(x => Complex.Abs(x) > 0.999999 * largest);
        Complex phase = pivot / Complex.Abs(pivot);
        for (int i = 0; i < row.Length; i++)
            u[i, k] = Complex.Conjugate(row[i]) * phase;
    }

    private static bool Sweep(Complex[][] rows, Complex[][] turned)
    {
        bool changed = false;
        for (int i = 0; i < rows.Length; i++)
        {
            for (int j = i + 1; j < rows.Length; j++)
                changed |= Rotate(rows, turned, i, j);
        }
        return changed;
    }

    private static bool Rotate(Complex[][] rows, Complex[][] turned, int i, int j)
    {
        double a = 0, b = 0;
        Complex overlap = 0;
        for (int k = 0; k < rows[i].Length; k++)
        {
            a += Square(rows[i][k]);
            b += Square(rows[j][k]);
            overlap += rows[i][k] * Complex.Conjugate(rows[j][k]);
        }
        double size = Complex.Abs(overlap);
        if (size == 0 || size <= 1e-15 * Math.Sqrt(a) * Math.Sqrt(b))
            return false;
        Complex phase = overlap / size;
        double zeta = (b - a) / (2 * size);
        double t = (zeta >= 0 ? 1 : -1) / (Math.Abs(zeta) + Math.Sqrt(1 + (zeta * zeta)));
        double c = 1 / Math.Sqrt(1 + (t * t));
        Turn(rows[i], rows[j], phase, c, c * t);
        Turn(turned[i], turned[j], phase, c, c * t);
        return true;
    }

    private static void Turn(Complex[] x, Complex[] y, Complex phase, double c, double s)
    {
        for (int k = 0; k < x.Length; k++)
        {
            Complex right = phase * y[k];
            y[k] = (s * x[k]) + (c * right);
            x[k] = (c * x[k]) - (s * right);
        }
    }
}
