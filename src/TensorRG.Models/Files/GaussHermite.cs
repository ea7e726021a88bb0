using System.Collections.Immutable;
using MathNet.Numerics.LinearAlgebra;

namespace TensorRG.Models.Files;

/// <summary>
/// Gauss-Hermite rules for integrals over the real line: int f(x) dx = sum_i W_i f(x_i), W_i = w_i exp(x_i^2), exact where
/// f(x) exp(x^2) is a polynomial of degree below 2n. The nodes are the eigenvalues of the Jacobi matrix (G. H. Golub and
/// J. H. Welsch, Math. Comp. 23, 221 (1969)), refined by Newton's method on the Hermite function psi_n; 1 / W_i is the sum of psi_k(x_i)^2 over k &lt; n.
/// </summary>
internal static class GaussHermite
{
    /// <summary>Nodes in ascending order, with ln W_i.</summary>
    /// <param name="count">Number of nodes, 1 to 256.</param>
    public static ImmutableArray<(double Node, double LogWeight)> Rule(int count)
    {
        double[] nodes = Eigenvalues(count);
        for (int i = 0; i < count; i++)
        {
            // The rule is symmetric: the upper half decides, so that the lower has the same bits.
            int mirror = count - 1 - i;
            nodes[i] = i < mirror ? nodes[i] : i == mirror ? 0 : -nodes[mirror];
            if (i < mirror)
                nodes[i] = Refine(count, nodes[i]);
        }
        return [.. nodes.Select(x => (x, -Math.Log(Functions(count, x).Take(count).Sum(p => p * p))))];
    }

    // The symmetric tridiagonal matrix with sqrt(k / 2) beside its diagonal of zeros.
    private static double[] Eigenvalues(int count)
    {
        Matrix<double> jacobi = Matrix<double>.Build.Dense(count, count, (i, j) => Math.Abs(i - j) == 1 ? Math.Sqrt(Math.Max(i, j) / 2.0) : 0);
        return [.. jacobi.Evd(Symmetricity.Symmetric).EigenValues.Select(e => e.Real).Order()];
    }

    private static double Refine(int count, double x)
    {
        for (int step = 0; step < 3; step++)
        {
            double[] psi = Functions(count, x);
            double slope = (Math.Sqrt(2.0 * count) * psi[count - 1]) - (x * psi[count]);
            x -= psi[count] / slope;
        }
        return x;
    }

    // psi_0 .. psi_n at x: sqrt((k + 1) / 2) psi_(k+1) = x psi_k - sqrt(k / 2) psi_(k-1).
    private static double[] Functions(int count, double x)
    {
        double[] psi = new double[count + 1];
        psi[0] = Math.Pow(Math.PI, -0.25) * Math.Exp(-x * x / 2);
        for (int k = 0; k < count; k++)
            psi[k + 1] = ((x * psi[k]) - (k == 0 ? 0 : Math.Sqrt(k / 2.0) * psi[k - 1])) / Math.Sqrt((k + 1) / 2.0);
        return psi;
    }
}
