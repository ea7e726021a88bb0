using System.Numerics;
using TensorRG.Tensors;

namespace TensorRG.Boundary;

/// <summary>
/// Dominant eigenvectors by restarted Arnoldi iteration (W. E. Arnoldi, Q. Appl. Math. 9, 17 (1951)) from a good start,
/// with every basis vector orthogonalised twice.
/// </summary>
/// <typeparam name="T">Element type.</typeparam>
/// <param name="dimension">Most vectors before a restart.</param>
/// <param name="restarts">Most rounds.</param>
internal sealed class Arnoldi<T>(int dimension, int restarts)
    where T : unmanaged, INumberBase<T>
{
    /// <summary>A new direction below this fraction of its vector is round-off: the space is closed under the map.</summary>
    private const double RoundOff = 1e-15;

    /// <summary>The dominant eigenpair, to a relative residual or until the rounds are used up.</summary>
    public Ritz<T> Dominant(Func<Tensor<T>, Tensor<T>> apply, Tensor<T> start, double tolerance)
    {
        Tensor<T> vector = start.Clone();
        VectorSpace.Normalise(vector);
        int applications = 0;
        for (int round = 1; ; round++)
        {
            Ritz<T> ritz = Round(apply, vector, tolerance);
            applications += ritz.Applications;
            if (ritz.Residual <= tolerance || round >= restarts)
                return ritz with { Applications = applications };
            vector = ritz.Vector;
        }
    }

    /// <summary>One Krylov space; the start vector becomes part of it and is given back.</summary>
    private Ritz<T> Round(Func<Tensor<T>, Tensor<T>> apply, Tensor<T> start, double tolerance)
    {
        var basis = new List<Tensor<T>> { start };
        var h = new Complex[dimension + 1, dimension];
        try
        {
            for (int n = 1; ; n++)
            {
                Tensor<T> next = apply(basis[n - 1]);
                double before = VectorSpace.Norm(next), rest = Orthogonalise(next, basis, h, n - 1);
                basis.Add(next);
                bool isClosed = rest <= RoundOff * before;
                if (!isClosed && !IsChecked(n))
                {
                    VectorSpace.Scale(next, Scalar.FromReal<T>(1 / rest));
                    continue;
                }

                (Complex value, Complex[] y) = SmallEigen.Dominant(h, n, typeof(T) == typeof(double));
                double residual = value == Complex.Zero ? double.PositiveInfinity : rest * y[^1].Magnitude / value.Magnitude;
                if (residual <= tolerance || n == dimension || isClosed)
                    return new Ritz<T>(value, Combine(basis, y), residual, n);
                VectorSpace.Scale(next, Scalar.FromReal<T>(1 / rest));
            }
        }
        finally
        {
            foreach (Tensor<T> vector in basis)
                vector.Dispose();
        }
    }

    /// <summary>The small eigenvalue problem costs as much as an application, so it is solved at every third vector only, once there are some.</summary>
    private bool IsChecked(int n) => n <= 3 || n % 3 == 0 || n == dimension;

    private static double Orthogonalise(Tensor<T> next, List<Tensor<T>> basis, Complex[,] h, int column)
    {
        for (int pass = 0; pass < 2; pass++)
        {
            for (int i = 0; i <= column; i++)
            {
                T overlap = VectorSpace.Inner(basis[i], next);
                VectorSpace.AddTo(next, basis[i], -overlap);
                h[i, column] += Scalar.ToComplex(overlap);
            }
        }

        double rest = VectorSpace.Norm(next);
        h[column + 1, column] = rest;
        return rest;
    }

    /// <summary>sum y_i basis_i, normalised; of a real problem with a complex eigenvector the real part.</summary>
    private static Tensor<T> Combine(List<Tensor<T>> basis, Complex[] y)
    {
        Tensor<T> result = Tensor<T>.Zeros(basis[0].Legs, basis[0].Flux);
        Complex turn = y[0] == Complex.Zero ? Complex.One : Complex.Conjugate(y[0]) / y[0].Magnitude;
        for (int i = 0; i < y.Length; i++)
            VectorSpace.AddTo(result, basis[i], FromComplex(turn * y[i]));
        VectorSpace.Normalise(result);
        return result;
    }

    private static T FromComplex(Complex value)
        => typeof(T) == typeof(double) ? Scalar.FromReal<T>(value.Real) : (T)(object)value;
}
