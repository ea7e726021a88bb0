using System.Numerics;
using MathNet.Numerics.LinearAlgebra;
using TensorRG.Tensors.Kernels;

namespace TensorRG.Boundary;

/// <summary>The dominant eigenpair of the small matrix of an Arnoldi iteration.</summary>
internal static class SmallEigen
{
    /// <summary>Eigenvalues count as equal in magnitude within this fraction; the one with the larger real part is then taken.</summary>
    private const double Tie = 1e-7;

    private const double Shift = 1e-15;
    private const int Attempts = 6;

    /// <summary>The eigenvalue of largest magnitude with its eigenvector of norm 1, of the leading n x n part.</summary>
    /// <exception cref="DecompositionException">No convergence.</exception>
    public static (Complex Value, Complex[] Vector) Dominant(Complex[,] matrix, int n, bool isReal)
    {
        if (n == 1)
            return (matrix[0, 0], [Complex.One]);
        (Complex[] values, Func<int, Complex[]> vector) = isReal ? OfReal(matrix, n) : OfComplex(matrix, n);
        int best = Best(values);
        Complex[] result = vector(best);
        double norm = Math.Sqrt(result.Sum(static x => (x.Real * x.Real) + (x.Imaginary * x.Imaginary)));
        return (values[best], Array.ConvertAll(result, x => x / norm));
    }

    private static int Best(Complex[] values)
    {
        double largest = values.Max(static x => x.Magnitude);
        int best = -1;
        for (int i = 0; i < values.Length; i++)
        {
            if (values[i].Magnitude >= largest * (1 - Tie) && (best < 0 || values[i].Real > values[best].Real))
                best = i;
        }

        return best >= 0 ? best : throw new DecompositionException("The eigenvalues of a boundary iteration are not finite.");
    }

    private static (Complex[] Values, Func<int, Complex[]> Vector) OfReal(Complex[,] matrix, int n)
    {
        var evd = Guarded(shift => Matrix<double>.Build.Dense(n, n, (i, j) => matrix[i, j].Real + (i == j ? i * shift : 0)).Evd(Symmetricity.Asymmetric), Size(matrix, n));
        Complex[] values = [.. evd.EigenValues];
        Matrix<double> v = evd.EigenVectors;
        return (values, Column);

        // A conjugate pair has its real and imaginary parts in two neighbouring columns.
        Complex[] Column(int j)
        {
            double sign = Math.Sign(values[j].Imaginary);
            int real = sign < 0 ? j - 1 : j;
            return [.. Enumerable.Range(0, n).Select(i => new Complex(v[i, real], sign == 0 ? 0 : sign * v[i, real + 1]))];
        }
    }

    private static (Complex[] Values, Func<int, Complex[]> Vector) OfComplex(Complex[,] matrix, int n)
    {
        var evd = Guarded(shift => Matrix<Complex>.Build.Dense(n, n, (i, j) => matrix[i, j] + (i == j ? i * shift : 0)).Evd(Symmetricity.Asymmetric), Size(matrix, n));
        return ([.. evd.EigenValues], j => [.. evd.EigenVectors.Column(j)]);
    }

    private static double Size(Complex[,] matrix, int n)
        => Enumerable.Range(0, n).Max(i => Enumerable.Range(0, n).Max(j => matrix[i, j].Magnitude));

    /// <summary>The library's iteration now and then circles on a matrix; the next of a few shifts of the diagonal by round-off sets it free.</summary>
    private static E Guarded<E>(Func<double, E> evd, double size)
    {
        for (int attempt = 0; ; attempt++)
        {
            try
            {
                return evd(attempt * Shift * size);
            }
            catch (MathNet.Numerics.NonConvergenceException e) when (attempt == Attempts)
            {
                throw new DecompositionException("The small eigenvalue problem of a boundary iteration did not converge.", e);
            }
            catch (MathNet.Numerics.NonConvergenceException)
            {
                // The next shift.
            }
        }
    }
}
