using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics;
using V = System.Runtime.Intrinsics.Vector256;

namespace TensorRG.Tensors.Kernels;

/// <summary>
/// The level-1 loops on real numbers behind <see cref="VectorOps"/>. Four accumulators of four lanes hide the latency of
/// the multiply-add; remainders go to the first accumulator, then one by one, always in the same order.
/// </summary>
internal static unsafe class RealVector
{
    private const int Width = 4;
    private const int Block = 4 * Width;

    /// <summary>Squares between these bounds sum without overflow or loss (n below 1e90 elements).</summary>
    private const double SafeSmall = 1e-140;
    private const double SafeLarge = 1e140;

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    internal static double Dot(double* x, double* y, nint n)
    {
        Vector256<double> s0 = default, s1 = default, s2 = default, s3 = default;
        nint i = 0;
        for (; i <= n - Block; i += Block)
        {
            s0 = V.FusedMultiplyAdd(V.Load(x + i), V.Load(y + i), s0);
            s1 = V.FusedMultiplyAdd(V.Load(x + i + 4), V.Load(y + i + 4), s1);
            s2 = V.FusedMultiplyAdd(V.Load(x + i + 8), V.Load(y + i + 8), s2);
            s3 = V.FusedMultiplyAdd(V.Load(x + i + 12), V.Load(y + i + 12), s3);
        }

        for (; i <= n - Width; i += Width)
            s0 = V.FusedMultiplyAdd(V.Load(x + i), V.Load(y + i), s0);
        double sum = Total((s0 + s1) + (s2 + s3));
        for (; i < n; i++)
            sum = Math.FusedMultiplyAdd(x[i], y[i], sum);
        return sum;
    }

    internal static double Norm(double* x, nint n)
    {
        double largest = MaxAbs(x, n);
        if (largest is 0 or double.PositiveInfinity || double.IsNaN(largest))
            return largest;
        if (largest is > SafeSmall and < SafeLarge)
            return Math.Sqrt(Dot(x, x, n));
        return ScaledNorm(x, n, largest);
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    internal static double MaxAbs(double* x, nint n)
    {
        Vector256<double> m0 = default, m1 = default;
        nint i = 0;
        for (; i <= n - (2 * Width); i += 2 * Width)
        {
            m0 = V.Max(m0, V.Abs(V.Load(x + i)));
            m1 = V.Max(m1, V.Abs(V.Load(x + i + Width)));
        }

        m0 = V.Max(m0, m1);
        double largest = Math.Max(Math.Max(m0[0], m0[1]), Math.Max(m0[2], m0[3]));
        for (; i < n; i++)
            largest = Math.Max(largest, Math.Abs(x[i]));
        return largest;
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    internal static void ScaledCopy(double factor, double* x, double* y, nint n)
    {
        Vector256<double> f = V.Create(factor);
        nint i = 0;
        for (; i <= n - (2 * Width); i += 2 * Width)
        {
            Vector256<double> low = V.Load(x + i) * f;
            Vector256<double> high = V.Load(x + i + Width) * f;
            low.Store(y + i);
            high.Store(y + i + Width);
        }

        for (; i < n; i++)
            y[i] = x[i] * factor;
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    internal static void AddScaled(double factor, double* x, double* y, nint n)
    {
        Vector256<double> f = V.Create(factor);
        nint i = 0;
        for (; i <= n - (2 * Width); i += 2 * Width)
        {
            Vector256<double> low = V.FusedMultiplyAdd(f, V.Load(x + i), V.Load(y + i));
            Vector256<double> high = V.FusedMultiplyAdd(f, V.Load(x + i + Width), V.Load(y + i + Width));
            low.Store(y + i);
            high.Store(y + i + Width);
        }

        for (; i < n; i++)
            y[i] = Math.FusedMultiplyAdd(factor, x[i], y[i]);
    }

    /// <summary>The four lanes added pairwise, in a fixed order.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    internal static double Total(Vector256<double> v) => (v[0] + v[2]) + (v[1] + v[3]);

    private static double ScaledNorm(double* x, nint n, double largest)
    {
        // Two factors: for a subnormal maximum the single factor 1/largest would overflow.
        double power = Math.ILogB(largest);
        double half = Math.ScaleB(1, -(int)power / 2);
        double rest = Math.ScaleB(1, -(int)power - (-(int)power / 2));
        double sum = 0;
        for (nint i = 0; i < n; i++)
        {
            double scaled = x[i] * half * rest;
            sum = Math.FusedMultiplyAdd(scaled, scaled, sum);
        }

        return Math.Sqrt(sum) / half / rest;
    }
}
