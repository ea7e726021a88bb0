using System.Numerics;
using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics;
using V = System.Runtime.Intrinsics.Vector256;

namespace TensorRG.Tensors.Kernels;

/// <summary>
/// The level-1 loops on complex numbers behind <see cref="VectorOps"/>, on the interleaved memory of
/// <see cref="Complex"/> (re, im, re, im, ...). Lengths count complex elements.
/// </summary>
internal static unsafe class ComplexVector
{
    private const int Width = 4;

    /// <summary>
    /// sum conj(x) y. Straight products x_k y_k hold the real part; products with re and im of y exchanged hold
    /// Re x Im y in even and Im x Re y in odd lanes, whose difference is the imaginary part.
    /// </summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    internal static Complex Dot(double* x, double* y, nint n)
    {
        Vector256<double> r0 = default, r1 = default, i0 = default, i1 = default;
        nint end = 2 * n, p = 0;
        for (; p <= end - (2 * Width); p += 2 * Width)
        {
            Vector256<double> x0 = V.Load(x + p), x1 = V.Load(x + p + Width);
            Vector256<double> y0 = V.Load(y + p), y1 = V.Load(y + p + Width);
            r0 = V.FusedMultiplyAdd(x0, y0, r0);
            r1 = V.FusedMultiplyAdd(x1, y1, r1);
            i0 = V.FusedMultiplyAdd(x0, Exchange(y0), i0);
            i1 = V.FusedMultiplyAdd(x1, Exchange(y1), i1);
        }

        Vector256<double> cross = i0 + i1;
        double real = RealVector.Total(r0 + r1);
        double even = cross[0] + cross[2], odd = cross[1] + cross[3];
        for (; p < end; p += 2)
        {
            real = Math.FusedMultiplyAdd(x[p + 1], y[p + 1], Math.FusedMultiplyAdd(x[p], y[p], real));
            even = Math.FusedMultiplyAdd(x[p], y[p + 1], even);
            odd = Math.FusedMultiplyAdd(x[p + 1], y[p], odd);
        }

        return new Complex(real, even - odd);
    }

    /// <summary>y := factor x.</summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    internal static void ScaledCopy(Complex factor, double* x, double* y, nint n)
    {
        Vector256<double> re = V.Create(factor.Real);
        Vector256<double> im = V.Create(-factor.Imaginary, factor.Imaginary, -factor.Imaginary, factor.Imaginary);
        nint end = 2 * n, p = 0;
        for (; p <= end - Width; p += Width)
        {
            Vector256<double> v = V.Load(x + p);
            V.FusedMultiplyAdd(re, v, im * Exchange(v)).Store(y + p);
        }

        for (; p < end; p += 2)
        {
            double a = x[p], b = x[p + 1];
            y[p] = Math.FusedMultiplyAdd(factor.Real, a, -factor.Imaginary * b);
            y[p + 1] = Math.FusedMultiplyAdd(factor.Real, b, factor.Imaginary * a);
        }
    }

    /// <summary>y := y + factor x.</summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    internal static void AddScaled(Complex factor, double* x, double* y, nint n)
    {
        Vector256<double> re = V.Create(factor.Real);
        Vector256<double> im = V.Create(-factor.Imaginary, factor.Imaginary, -factor.Imaginary, factor.Imaginary);
        nint end = 2 * n, p = 0;
        for (; p <= end - Width; p += Width)
        {
            Vector256<double> v = V.Load(x + p);
            V.FusedMultiplyAdd(re, v, V.FusedMultiplyAdd(im, Exchange(v), V.Load(y + p))).Store(y + p);
        }

        for (; p < end; p += 2)
        {
            double a = x[p], b = x[p + 1];
            y[p] = Math.FusedMultiplyAdd(factor.Real, a, Math.FusedMultiplyAdd(-factor.Imaginary, b, y[p]));
            y[p + 1] = Math.FusedMultiplyAdd(factor.Real, b, Math.FusedMultiplyAdd(factor.Imaginary, a, y[p + 1]));
        }
    }

    /// <summary>(re, im, re, im) to (im, re, im, re).</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    internal static Vector256<double> Exchange(Vector256<double> v) => V.Shuffle(v, V.Create(1L, 0L, 3L, 2L));
}
