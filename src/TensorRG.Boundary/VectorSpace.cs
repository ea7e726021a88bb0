using System.Numerics;
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
        T s0 = T.Zero, s1 = T.Zero, s2 = T.Zero, s3 = T.Zero;
        int i = 0;
        for (; i + 4 <= x.Length; i += 4)
        {
            s0 += Scalar.Conjugate(x[i]) * y[i];
            s1 += Scalar.Conjugate(x[i + 1]) * y[i + 1];
            s2 += Scalar.Conjugate(x[i + 2]) * y[i + 2];
            s3 += Scalar.Conjugate(x[i + 3]) * y[i + 3];
        }

        for (; i < x.Length; i++)
            s0 += Scalar.Conjugate(x[i]) * y[i];
        return s0 + s1 + (s2 + s3);
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
        for (int i = 0; i < source.Length; i++)
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
    public static Tensor<T> Random<T>(IEnumerable<Leg> legs, RandomSequence random)
        where T : unmanaged, INumberBase<T>
    {
        Tensor<T> result = Tensor<T>.Zeros(legs);
        foreach (ref T element in result.Elements)
            element = Scalar.FromReal<T>(random.NextUnit());
        return result;
    }
}
