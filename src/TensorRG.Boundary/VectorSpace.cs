using System.Numerics;
using System.Runtime.InteropServices;
using System.Runtime.Intrinsics;
using TensorRG.Tensors;

namespace TensorRG.Boundary;

/// <summary>Tensors with equal legs as vectors. Sums run in a fixed order, so that bits do not depend on threads.</summary>
internal static class VectorSpace
{
    /// <summary>sum conj(a) b.</summary>
    public static T Inner<T>(Tensor<T> a, Tensor<T> b)
        where T : unmanaged, INumberBase<T>
    {
        ReadOnlySpan<T> x = a.Elements, y = b.Elements[..x.Length];
        T sum = T.Zero;
        int done = typeof(T) == typeof(double) ? InnerWide(x, y, ref sum) : 0;
        for (int i = done; i < x.Length; i++)
            sum += Scalar.Conjugate(x[i]) * y[i];
        return sum;
    }

    /// <summary>The Euclidean norm.</summary>
    public static double Norm<T>(Tensor<T> a)
        where T : unmanaged, INumberBase<T>
        => Math.Sqrt(Scalar.RealPart(Inner(a, a)));

    /// <summary>y += factor x.</summary>
    public static void AddTo<T>(Tensor<T> y, Tensor<T> x, T factor)
        where T : unmanaged, INumberBase<T>
    {
        ReadOnlySpan<T> source = x.Elements;
        Span<T> target = y.Elements[..source.Length];
        int done = typeof(T) == typeof(double) ? AddWide(target, source, factor) : 0;
        for (int i = done; i < source.Length; i++)
            target[i] += factor * source[i];
    }

    /// <summary>y *= factor.</summary>
    public static void Scale<T>(Tensor<T> y, T factor)
        where T : unmanaged, INumberBase<T>
    {
        foreach (ref T element in y.Elements)
            element *= factor;
    }

    /// <summary>Brings the norm to 1.</summary>
    /// <exception cref="Tensors.Kernels.DecompositionException">The vector is zero, or holds NaN or infinity.</exception>
    public static void Normalise<T>(Tensor<T> y)
        where T : unmanaged, INumberBase<T>
    {
        double norm = Norm(y);
        if (!(norm > 0) || !double.IsFinite(norm))
            throw new Tensors.Kernels.DecompositionException("A boundary vector vanished or overflowed: the network may have no weight in the sector of the state.");
        Scale(y, Scalar.FromReal<T>(1 / norm));
    }

    /// <summary>A vector of random elements.</summary>
    public static Tensor<T> Random<T>(IEnumerable<Leg> legs, RandomSequence random, Charge flux = default)
        where T : unmanaged, INumberBase<T>
    {
        Tensor<T> result = Tensor<T>.Zeros(legs, flux);
        foreach (ref T element in result.Elements)
            element = Scalar.FromReal<T>(random.NextUnit());
        return result;
    }

    // Four lanes on every machine, whatever it has in hardware, so that bits agree.
    private static int InnerWide<T>(ReadOnlySpan<T> x, ReadOnlySpan<T> y, ref T sum)
        where T : unmanaged, INumberBase<T>
    {
        ReadOnlySpan<Vector256<double>> a = MemoryMarshal.Cast<T, Vector256<double>>(x), b = MemoryMarshal.Cast<T, Vector256<double>>(y);
        Vector256<double> s0 = default, s1 = default;
        int i = 0;
        for (; i + 2 <= a.Length; i += 2)
        {
            s0 += a[i] * b[i];
            s1 += a[i + 1] * b[i + 1];
        }

        if (i < a.Length)
            s0 += a[i] * b[i];
        sum = Scalar.FromReal<T>(Vector256.Sum(s0 + s1));
        return a.Length * Vector256<double>.Count;
    }

    private static int AddWide<T>(Span<T> y, ReadOnlySpan<T> x, T factor)
        where T : unmanaged, INumberBase<T>
    {
        Span<Vector256<double>> target = MemoryMarshal.Cast<T, Vector256<double>>(y);
        ReadOnlySpan<Vector256<double>> source = MemoryMarshal.Cast<T, Vector256<double>>(x);
        Vector256<double> times = Vector256.Create(Scalar.RealPart(factor));
        for (int i = 0; i < target.Length; i++)
            target[i] += times * source[i];
        return target.Length * Vector256<double>.Count;
    }
}
