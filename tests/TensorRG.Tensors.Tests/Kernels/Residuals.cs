using System.Numerics;

namespace TensorRG.Tensors.Tests.Kernels;

/// <summary>
/// Identities of decompositions, evaluated with plain loops on matrices scaled to largest element one. All are relative
/// errors; NaN anywhere makes them NaN.
/// </summary>
internal static unsafe class Residuals
{
    /// <summary>Largest |(Q^H Q - 1)_ij|.</summary>
    public static double Orthogonality<T>(T[] q, int m, int n)
        where T : unmanaged, INumberBase<T>
    {
        double worst = 0;
        for (int i = 0; i < n; i++)
        {
            for (int j = 0; j <= i; j++)
            {
                T sum = i == j ? -T.One : T.Zero;
                for (int k = 0; k < m; k++)
                    sum += Scalar.Conjugate(q[(k * n) + i]) * q[(k * n) + j];
                worst = Larger(worst, Scalar.Magnitude(sum));
            }
        }

        return worst;
    }

    /// <summary>||A - B C||_F / ||A||_F, or ||B C||_F where A is zero. B is m x k, C is k x n, all row-major.</summary>
    public static double Product<T>(T[] a, T[] b, T[] c, int m, int k, int n)
        where T : unmanaged, INumberBase<T>
    {
        double error = 0, norm = 0;
        for (int i = 0; i < m; i++)
        {
            T[] row = new T[n];
            for (int p = 0; p < k; p++)
            {
                for (int j = 0; j < n; j++)
                    row[j] += b[(i * k) + p] * c[(p * n) + j];
            }

            for (int j = 0; j < n; j++)
            {
                error += Scalar.SquaredMagnitude(a[(i * n) + j] - row[j]);
                norm += Scalar.SquaredMagnitude(a[(i * n) + j]);
            }
        }

        return norm == 0 ? Math.Sqrt(error) : Math.Sqrt(error / norm);
    }

    /// <summary>Multiplies by the power of two that brings the largest part of A near one; returns the exponent taken out.</summary>
    public static int Normalise<T>(T[] a)
        where T : unmanaged, INumberBase<T>
    {
        double largest = 0;
        foreach (T x in a)
            largest = Larger(largest, Math.Max(Math.Abs(Scalar.RealPart(x)), Math.Abs(Scalar.ToComplex(x).Imaginary)));
        int exponent = largest == 0 ? 0 : Math.Clamp(Math.ILogB(largest), -1020, 1020);
        Scale(a, -exponent);
        return exponent;
    }

    /// <summary>a := 2^exponent a.</summary>
    public static void Scale<T>(T[] a, int exponent)
        where T : unmanaged, INumberBase<T>
    {
        T factor = Scalar.FromReal<T>(Math.ScaleB(1, exponent));
        for (int i = 0; i < a.Length; i++)
            a[i] *= factor;
    }

    /// <summary>The larger of two, NaN if either is.</summary>
    public static double Larger(double x, double y) => Math.Max(x, y);
}
