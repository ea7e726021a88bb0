using System.Numerics;
using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics;

namespace TensorRG.Tensors.Kernels.Decompositions;

/// <summary>
/// Level-one operations on contiguous columns, in a fixed order of additions: eight real lanes, then four, then one.
/// A complex column is treated as pairs of reals; multiplication by i is a swap within pairs and a sign.
/// </summary>
internal static unsafe class ColumnOps
{
    private const int Width = 4;

    /// <summary>Sum of conj(x[i]) y[i].</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static T Dot<T>(T* x, T* y, int n)
        where T : unmanaged, INumberBase<T>
    {
        if (typeof(T) == typeof(double))
            return (T)(object)RealDot((double*)x, (double*)y, n);
        return (T)(object)ComplexDot((double*)x, (double*)y, 2 * n);
    }

    /// <summary>Sum of |x[i]|^2, without scaling.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static double NormSquared<T>(T* x, int n)
        where T : unmanaged, INumberBase<T>
        => RealDot((double*)x, (double*)x, n * (sizeof(T) / sizeof(double)));

    /// <summary>y += alpha x.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static void Axpy<T>(T alpha, T* x, T* y, int n)
        where T : unmanaged, INumberBase<T>
    {
        if (typeof(T) == typeof(double))
            RealAxpy((double)(object)alpha, (double*)x, (double*)y, n);
        else
            ComplexAxpy((Complex)(object)alpha, (double*)x, (double*)y, 2 * n);
    }

    /// <summary>x *= alpha.</summary>
    public static void Scale<T>(T alpha, T* x, int n)
        where T : unmanaged, INumberBase<T>
    {
        for (int i = 0; i < n; i++)
            x[i] *= alpha;
    }

    /// <summary>x' = c x - conj(s) y, y' = s x + c y.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static void Rotate<T>(T* x, T* y, int n, double c, T s)
        where T : unmanaged, INumberBase<T>
    {
        if (typeof(T) == typeof(double))
            RealRotate((double*)x, (double*)y, n, c, (double)(object)s);
        else
            ComplexRotate((double*)x, (double*)y, 2 * n, c, (Complex)(object)s);
    }

    /// <summary>Sum of x[i] y[i].</summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public static double RealDot(double* x, double* y, int n)
    {
        Vector256<double> a = default, b = default;
        int i = 0;
        for (; i <= n - (2 * Width); i += 2 * Width)
        {
            a = Vector256.FusedMultiplyAdd(Vector256.Load(x + i), Vector256.Load(y + i), a);
            b = Vector256.FusedMultiplyAdd(Vector256.Load(x + i + Width), Vector256.Load(y + i + Width), b);
        }

        if (i <= n - Width)
        {
            a = Vector256.FusedMultiplyAdd(Vector256.Load(x + i), Vector256.Load(y + i), a);
            i += Width;
        }

        double sum = Vector256.Sum(a + b);
        for (; i < n; i++)
            sum = Math.FusedMultiplyAdd(x[i], y[i], sum);
        return sum;
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private static Complex ComplexDot(double* x, double* y, int n)
    {
        Vector256<double> direct = default, crossed = default;
        int i = 0;
        for (; i <= n - Width; i += Width)
        {
            Vector256<double> p = Vector256.Load(x + i), q = Vector256.Load(y + i);
            direct = Vector256.FusedMultiplyAdd(p, q, direct);
            crossed = Vector256.FusedMultiplyAdd(p, SwapPairs(q), crossed);
        }

        double re = Vector256.Sum(direct);
        double im = (crossed[0] - crossed[1]) + (crossed[2] - crossed[3]);
        for (; i < n; i += 2)
        {
            re = Math.FusedMultiplyAdd(x[i], y[i], Math.FusedMultiplyAdd(x[i + 1], y[i + 1], re));
            im = Math.FusedMultiplyAdd(x[i], y[i + 1], Math.FusedMultiplyAdd(-x[i + 1], y[i], im));
        }

        return new Complex(re, im);
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private static void RealAxpy(double alpha, double* x, double* y, int n)
    {
        Vector256<double> a = Vector256.Create(alpha);
        int i = 0;
        for (; i <= n - Width; i += Width)
            Vector256.Store(Vector256.FusedMultiplyAdd(a, Vector256.Load(x + i), Vector256.Load(y + i)), y + i);
        for (; i < n; i++)
            y[i] = Math.FusedMultiplyAdd(alpha, x[i], y[i]);
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private static void ComplexAxpy(Complex alpha, double* x, double* y, int n)
    {
        double re = alpha.Real, im = alpha.Imaginary;
        Vector256<double> a = Vector256.Create(re), b = Vector256.Create(-im, im, -im, im);
        int i = 0;
        for (; i <= n - Width; i += Width)
        {
            Vector256<double> p = Vector256.Load(x + i);
            Vector256<double> sum = Vector256.FusedMultiplyAdd(b, SwapPairs(p), Vector256.Load(y + i));
            Vector256.Store(Vector256.FusedMultiplyAdd(a, p, sum), y + i);
        }

        for (; i < n; i += 2)
        {
            double p = x[i], q = x[i + 1];
            y[i] = Math.FusedMultiplyAdd(re, p, Math.FusedMultiplyAdd(-im, q, y[i]));
            y[i + 1] = Math.FusedMultiplyAdd(re, q, Math.FusedMultiplyAdd(im, p, y[i + 1]));
        }
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private static void RealRotate(double* x, double* y, int n, double c, double s)
    {
        Vector256<double> vc = Vector256.Create(c), vs = Vector256.Create(s);
        int i = 0;
        for (; i <= n - Width; i += Width)
        {
            Vector256<double> p = Vector256.Load(x + i), q = Vector256.Load(y + i);
            Vector256.Store(Vector256.FusedMultiplyAdd(vc, p, -(vs * q)), x + i);
            Vector256.Store(Vector256.FusedMultiplyAdd(vc, q, vs * p), y + i);
        }

        for (; i < n; i++)
        {
            double p = x[i], q = y[i];
            x[i] = Math.FusedMultiplyAdd(c, p, -(s * q));
            y[i] = Math.FusedMultiplyAdd(c, q, s * p);
        }
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private static void ComplexRotate(double* x, double* y, int n, double c, Complex s)
    {
        double re = s.Real, im = s.Imaginary;
        Vector256<double> vc = Vector256.Create(c), vr = Vector256.Create(re), vi = Vector256.Create(-im, im, -im, im);
        int i = 0;
        for (; i <= n - Width; i += Width)
        {
            Vector256<double> p = Vector256.Load(x + i), q = Vector256.Load(y + i);
            Vector256<double> left = Vector256.FusedMultiplyAdd(vr, q, -(vi * SwapPairs(q)));
            Vector256<double> right = Vector256.FusedMultiplyAdd(vr, p, vi * SwapPairs(p));
            Vector256.Store(Vector256.FusedMultiplyAdd(vc, p, -left), x + i);
            Vector256.Store(Vector256.FusedMultiplyAdd(vc, q, right), y + i);
        }

        for (; i < n; i += 2)
        {
            double pr = x[i], pi = x[i + 1], qr = y[i], qi = y[i + 1];
            x[i] = Math.FusedMultiplyAdd(c, pr, -Math.FusedMultiplyAdd(re, qr, im * qi));
            x[i + 1] = Math.FusedMultiplyAdd(c, pi, -Math.FusedMultiplyAdd(re, qi, -(im * qr)));
            y[i] = Math.FusedMultiplyAdd(c, qr, Math.FusedMultiplyAdd(re, pr, -(im * pi)));
            y[i + 1] = Math.FusedMultiplyAdd(c, qi, Math.FusedMultiplyAdd(re, pi, im * pr));
        }
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static Vector256<double> SwapPairs(Vector256<double> v) => Vector256.Shuffle(v, Vector256.Create(1L, 0, 3, 2));
}
