using System.Numerics;
using TensorRG.Tensors;

namespace TensorRG.CoarseGraining.Loop;

/// <summary>Vectors made of several tensors.</summary>
internal static class Blocks
{
    public static Tensor<T>[] Combine<T>(Tensor<T>[] a, Tensor<T>[] b, double factor)
        where T : unmanaged, INumberBase<T>
        => [.. a.Zip(b, (x, y) => TensorAlgebra<T>.Add(x, y, Scalar.FromReal<T>(factor)))];

    public static Tensor<T>[] Scale<T>(Tensor<T>[] a, double factor)
        where T : unmanaged, INumberBase<T>
        => [.. a.Select(x => TensorAlgebra<T>.Scale(x, Scalar.FromReal<T>(factor)))];

    public static double Dot<T>(Tensor<T>[] a, Tensor<T>[] b)
        where T : unmanaged, INumberBase<T>
    {
        double sum = 0;
        for (int k = 0; k < a.Length; k++)
        {
            ReadOnlySpan<T> x = a[k].Elements, y = b[k].Elements;
            for (int i = 0; i < x.Length; i++)
                sum += Scalar.RealPart(Scalar.Conjugate(x[i]) * y[i]);
        }

        return sum;
    }
}
