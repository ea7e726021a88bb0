using System.Numerics;

namespace TensorRG.Tensors.Kernels;

/// <summary>
/// Level-1 operations on contiguous vectors of <see cref="double"/> or <see cref="Complex"/>. Sums run in a fixed number
/// of lanes (16 real numbers, added pairwise at the end) with fused multiply-add, so the same input gives the same bits
/// on every CPU. Nothing is allocated; a length of 0 is allowed everywhere.
/// </summary>
public static unsafe class VectorOps
{
    /// <summary>The inner product sum_i conj(x_i) y_i.</summary>
    /// <typeparam name="T"><see cref="double"/> or <see cref="Complex"/>.</typeparam>
    /// <param name="x">n elements, conjugated.</param>
    /// <param name="y">n elements.</param>
    /// <param name="n">Length.</param>
    public static T Dot<T>(T* x, T* y, nint n)
        where T : unmanaged, INumberBase<T>
    {
        if (typeof(T) == typeof(double))
            return (T)(object)RealVector.Dot((double*)x, (double*)y, n);
        return (T)(object)ComplexVector.Dot((double*)x, (double*)y, n);
    }

    /// <summary>The sum of |x_i|^2. It overflows above 1e154 and loses accuracy below 1e-146; see <see cref="Norm"/>.</summary>
    /// <typeparam name="T"><see cref="double"/> or <see cref="Complex"/>.</typeparam>
    /// <param name="x">n elements.</param>
    /// <param name="n">Length.</param>
    public static double SumOfSquares<T>(T* x, nint n)
        where T : unmanaged, INumberBase<T>
        => RealVector.Dot((double*)x, (double*)x, n * Reals<T>());

    /// <summary>
    /// The Euclidean norm sqrt(sum_i |x_i|^2), without overflow or harmful underflow. NaN elements give NaN; an infinite
    /// element gives infinity.
    /// </summary>
    /// <typeparam name="T"><see cref="double"/> or <see cref="Complex"/>.</typeparam>
    /// <param name="x">n elements.</param>
    /// <param name="n">Length.</param>
    public static double Norm<T>(T* x, nint n)
        where T : unmanaged, INumberBase<T>
        => RealVector.Norm((double*)x, n * Reals<T>());

    /// <summary>
    /// The largest |x_i|, for complex elements the largest |Re x_i| or |Im x_i|; 0 for an empty vector, NaN if any element
    /// is NaN.
    /// </summary>
    /// <typeparam name="T"><see cref="double"/> or <see cref="Complex"/>.</typeparam>
    /// <param name="x">n elements.</param>
    /// <param name="n">Length.</param>
    public static double MaxAbs<T>(T* x, nint n)
        where T : unmanaged, INumberBase<T>
        => RealVector.MaxAbs((double*)x, n * Reals<T>());

    /// <summary>x := factor x, for a real factor.</summary>
    /// <typeparam name="T"><see cref="double"/> or <see cref="Complex"/>.</typeparam>
    /// <param name="factor">The real factor.</param>
    /// <param name="x">n elements, scaled in place.</param>
    /// <param name="n">Length.</param>
    public static void ScaleReal<T>(double factor, T* x, nint n)
        where T : unmanaged, INumberBase<T>
        => RealVector.ScaledCopy(factor, (double*)x, (double*)x, n * Reals<T>());

    /// <summary>x := factor x.</summary>
    /// <typeparam name="T"><see cref="double"/> or <see cref="Complex"/>.</typeparam>
    /// <param name="factor">The factor.</param>
    /// <param name="x">n elements, scaled in place.</param>
    /// <param name="n">Length.</param>
    public static void Scale<T>(T factor, T* x, nint n)
        where T : unmanaged, INumberBase<T>
        => ScaledCopy(factor, x, x, n);

    /// <summary>y := factor x. The vectors are the same or disjoint.</summary>
    /// <typeparam name="T"><see cref="double"/> or <see cref="Complex"/>.</typeparam>
    /// <param name="factor">The factor.</param>
    /// <param name="x">n elements.</param>
    /// <param name="y">n elements, overwritten.</param>
    /// <param name="n">Length.</param>
    public static void ScaledCopy<T>(T factor, T* x, T* y, nint n)
        where T : unmanaged, INumberBase<T>
    {
        if (typeof(T) == typeof(double))
            RealVector.ScaledCopy((double)(object)factor, (double*)x, (double*)y, n);
        else
            ComplexVector.ScaledCopy((Complex)(object)factor, (double*)x, (double*)y, n);
    }

    /// <summary>y := y + factor x. The vectors are the same or disjoint.</summary>
    /// <typeparam name="T"><see cref="double"/> or <see cref="Complex"/>.</typeparam>
    /// <param name="factor">The factor.</param>
    /// <param name="x">n elements.</param>
    /// <param name="y">n elements, updated.</param>
    /// <param name="n">Length.</param>
    public static void AddScaled<T>(T factor, T* x, T* y, nint n)
        where T : unmanaged, INumberBase<T>
    {
        if (typeof(T) == typeof(double))
            RealVector.AddScaled((double)(object)factor, (double*)x, (double*)y, n);
        else
            ComplexVector.AddScaled((Complex)(object)factor, (double*)x, (double*)y, n);
    }

    /// <summary>How many real numbers make one element.</summary>
    private static nint Reals<T>()
        where T : unmanaged
        => sizeof(T) / sizeof(double);
}
