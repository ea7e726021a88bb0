using System.Numerics;
using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics;

namespace TensorRG.Tensors.Kernels.Decompositions;

/// <summary>
/// A plane rotation of two contiguous columns. A complex column is treated as pairs of reals; multiplication by i is a
/// swap within pairs and a sign.
/// </summary>
internal static unsafe class ColumnRotation
{
    private const int Width = 4;

    /// <summary>x' = c x - conj(s) y, y' = s x + c y.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static void Apply<T>(T* x, T* y, int n, double c, T s)
        where T : unmanaged, INumberBase<T>
    {
        if (typeof(T) == typeof(double))
            RealRotate((double*)x, (double*)y, n, c, (double)(object)s);
        else
            ComplexRotate((double*)x, (double*)y, 2 * n, c, (Complex)(object)s);
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
