using System.Numerics;
using TensorRG.Tensors;

namespace TensorRG.Boundary.Tests;

/// <summary>The slow oracle: the dominant eigenvalue of a row closed to a ring, by power iteration on the full vector.</summary>
internal static class Ring
{
    /// <summary>ln of the dominant eigenvalue, per vertex. The phase is that of the eigenvalue of the whole ring over its length.</summary>
    public static Complex LogPerVertex<T>(Tensor<T> site, int length)
        where T : unmanaged, INumberBase<T>
    {
        int dimension = site.Legs[0].Dimension;
        Complex[] elements = Elements(site, dimension);
        Complex[] vector = [.. Enumerable.Repeat(Complex.One, (int)Math.Pow(dimension, length))];
        Complex value = 0;
        for (int n = 0; n < 400; n++)
        {
            Complex[] image = Apply(elements, dimension, length, vector);
            Complex next = Dot(vector, image) / Dot(vector, vector);
            double norm = Math.Sqrt(Dot(image, image).Real);
            vector = Array.ConvertAll(image, x => x / norm);
            if ((next - value).Magnitude <= 1e-15 * next.Magnitude)
                return Complex.Log(next) / length;
            value = next;
        }

        throw new InvalidOperationException("The power iteration of the ring did not converge.");
    }

    private static Complex Dot(Complex[] a, Complex[] b)
    {
        Complex sum = 0;
        for (int i = 0; i < a.Length; i++)
            sum += Complex.Conjugate(a[i]) * b[i];
        return sum;
    }

    private static Complex[] Elements<T>(Tensor<T> site, int n)
        where T : unmanaged, INumberBase<T>
    {
        var all = new Complex[n * n * n * n];
        for (int i = 0; i < all.Length; i++)
            all[i] = Scalar.ToComplex(site.At(i / (n * n * n), i / (n * n) % n, i / n % n, i % n));
        return all;
    }

    /// <summary>One row: for each state of the closing bond the vertices one after another.</summary>
    private static Complex[] Apply(Complex[] a, int n, int length, Complex[] vector)
    {
        var result = new Complex[vector.Length];
        for (int closing = 0; closing < n; closing++)
        {
            // Index: state of the horizontal bond, then the vertical legs, first vertex slowest.
            var strip = new Complex[n * vector.Length];
            vector.CopyTo(strip, closing * vector.Length);
            int stride = vector.Length;
            for (int vertex = 0; vertex < length; vertex++)
                strip = Vertex(a, n, strip, vector.Length, stride /= n);
            for (int i = 0; i < result.Length; i++)
                result[i] += strip[(closing * result.Length) + i];
        }

        return result;
    }

    private static Complex[] Vertex(Complex[] a, int n, Complex[] strip, int size, int stride)
    {
        var next = new Complex[strip.Length];
        for (int rest = 0; rest < size; rest++)
        {
            if (rest / stride % n != 0)
                continue;
            for (int k = 0; k < a.Length; k++)
            {
                int u = k / (n * n * n), l = k / (n * n) % n, d = k / n % n, r = k % n;
                next[(r * size) + rest + (d * stride)] += a[k] * strip[(l * size) + rest + (u * stride)];
            }
        }

        return next;
    }
}
