using System.Numerics;

namespace TensorRG.Tensors.Tests.Kernels;

/// <summary>
/// Identities of decompositions, evaluated with plain loops on matrices scaled to largest element one. All are relative
/// errors; NaN anywhere makes them NaN.
/// </summary>
internal static unsafe class Residuals
{
    /// <summary>
    /// Largest |(Q^H Q - 1)_ij|, summed in pairs: the plain sum of two hundred equal squares is itself wrong by 1e-14.
    /// </summary>
    public static double Orthogonality<T>(T[] q, int m, int n)
        where T : unmanaged, INumberBase<T>
    {
        double worst = 0;
        for (int i = 0; i < n; i++)
        {
            for (int j = 0; j <= i; j++)
            {
                T sum = Overlap(q, n, i, j, 0, m) - (i == j ? T.One : T.Zero);
                worst = Larger(worst, Scalar.Magnitude(sum));
            }
        }

        return worst;
    }

    private static T Overlap<T>(T[] q, int n, int i, int j, int from, int to)
        where T : unmanaged, INumberBase<T>
    {
        if (to - from <= 8)
        {
            T sum = T.Zero;
            for (int k = from; k < to; k++)
                sum += Scalar.Conjugate(q[(k * n) + i]) * q[(k * n) + j];
            return sum;
        }

        int middle = (from + to) / 2;
        return Overlap(q, n, i, j, from, middle) + Overlap(q, n, i, j, middle, to);
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
        int exponent = largest == 0 ? 0 : Math.ILogB(largest);
        Scale(a, -exponent);
        return exponent;
    }

    /// <summary>a := 2^exponent a.</summary>
    public static void Scale<T>(T[] a, int exponent)
        where T : unmanaged, INumberBase<T>
    {
        // In two steps: 2^1074 is not a double.
        T half = Scalar.FromReal<T>(Math.ScaleB(1, exponent / 2)), rest = Scalar.FromReal<T>(Math.ScaleB(1, exponent - (exponent / 2)));
        for (int i = 0; i < a.Length; i++)
            a[i] = a[i] * half * rest;
    }

    /// <summary>The larger of two, NaN if either is.</summary>
    public static double Larger(double x, double y) => Math.Max(x, y);
}
