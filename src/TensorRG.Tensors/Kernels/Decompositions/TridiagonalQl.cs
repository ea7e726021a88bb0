using System.Runtime.CompilerServices;

namespace TensorRG.Tensors.Kernels.Decompositions;

/// <summary>
/// Implicit QL iteration with Wilkinson shifts on a real symmetric tridiagonal matrix (Bowdler, Martin, Reinsch,
/// Wilkinson, Numer. Math. 11, 293 (1968)); the rotations are left to a <see cref="RotationBatch"/>.
/// </summary>
internal static class TridiagonalQl
{
    private const int MaxSweepsEach = 60;

    /// <summary>Sweeps on one eigenvalue after which the deflation floor doubles.</summary>
    private const int Patience = 6;

    /// <summary>
    /// Overwrites the diagonal d (n) with the eigenvalues, unordered, and destroys the off-diagonal e (n; e[n-1] unused).
    /// Row k of the batch becomes eigenvector k. The matrix should have its largest element near one.
    /// </summary>
    /// <exception cref="DecompositionException">An eigenvalue took more than 60 sweeps.</exception>
    public static void Solve(Span<double> d, Span<double> e, RotationBatch batch)
    {
        int n = d.Length;
        double floor = DeflationFloor(d, e);
        for (int low = 0; low < n; low++)
        {
            for (int sweep = 0; ; sweep++)
            {
                // Equal eigenvalues to round-off may stay above half an ulp: there e is the rounding of the sweeps.
                double negligible = Math.ScaleB(floor, sweep / Patience);
                int high = low;
                while (high < n - 1 && Math.Abs(e[high]) > negligible)
                    high++;
                if (high == low)
                    break;
                if (sweep == MaxSweepsEach)
                    throw new DecompositionException($"Eigenproblem of size {n}: eigenvalue {low} did not converge in {MaxSweepsEach} sweeps.");
                Sweep(d, e, low, high, batch.AddSweep(low, high - low, ascending: false));
            }
        }

        batch.Finish();
    }

    /// <summary>Half an ulp of the norm; a lower floor need not be reached in finite precision.</summary>
    private static double DeflationFloor(Span<double> d, Span<double> e)
    {
        double norm = 0;
        for (int i = 0; i < d.Length; i++)
        {
            double row = Math.Abs(d[i]) + (i > 0 ? Math.Abs(e[i - 1]) : 0) + (i < d.Length - 1 ? Math.Abs(e[i]) : 0);
            norm = Math.Max(norm, row);
        }

        return norm * Math.ScaleB(1, -53);
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private static void Sweep(Span<double> d, Span<double> e, int low, int high, Span<double> rotations)
    {
        double g = (d[low + 1] - d[low]) / (2 * e[low]);
        g = d[high] - d[low] + (e[low] / (g + Math.CopySign(double.Hypot(g, 1), g)));
        double s = 1, c = 1, p = 0;
        for (int i = high - 1; i >= low; i--)
        {
            double f = s * e[i], b = c * e[i];
            (c, s, e[i + 1]) = PlaneRotation.Generate(g, f);
            g = d[i + 1] - p;
            double r = ((d[i] - g) * s) + (2 * c * b);
            p = s * r;
            d[i + 1] = g + p;
            g = (c * r) - b;
            rotations[2 * (i - low)] = c;
            rotations[(2 * (i - low)) + 1] = s;
        }

        d[low] -= p;
        e[low] = g;
        e[high] = 0;
    }
}
