using System.Numerics;
using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics;

namespace TensorRG.Tensors.Kernels.Decompositions;

/// <summary>Matrix times vector on matrices stored with contiguous columns, the level-two half of every reduction.</summary>
internal static unsafe class Panels
{
    private const int Width = 4;

    /// <summary>Elements from which a second thread is worth waking.</summary>
    private const int ThreadingSize = 1 << 16;

    /// <summary><see cref="AdjointTimes{T}(T*, nint, int, int, T*, T*)"/> on several threads, each with its own columns: the same bits.</summary>
    public static void AdjointTimes<T>(Workers workers, T* a, nint ld, int rows, int columns, T* x, T* y)
        where T : unmanaged, INumberBase<T>
    {
        int parts = Parts(workers, rows, columns);
        if (parts == 1)
        {
            AdjointTimes(a, ld, rows, columns, x, y);
            return;
        }

        workers.Run(parts, part =>
        {
            (int from, int to) = Share(columns, part, parts);
            AdjointTimes(a + (from * ld), ld, rows, to - from, x, y + from);
        });
    }

    /// <summary><see cref="AddTimes{T}(T*, nint, int, int, T*, T*)"/> on several threads, each with its own rows: the same bits.</summary>
    public static void AddTimes<T>(Workers workers, T* a, nint ld, int rows, int columns, T* x, T* y)
        where T : unmanaged, INumberBase<T>
    {
        int parts = Parts(workers, rows, columns);
        if (parts == 1)
        {
            AddTimes(a, ld, rows, columns, x, y);
            return;
        }

        workers.Run(parts, part =>
        {
            (int from, int to) = Share(rows, part, parts);
            AddTimes(a + from, ld, to - from, columns, x, y + from);
        });
    }

    /// <summary>
    /// y += A x for a Hermitian A on several threads. Each strip of columns has sums of its own, added in order; the strips
    /// follow from n alone, so the bits do not depend on the threads.
    /// </summary>
    public static void HermitianTimes<T>(Workers workers, T* a, nint ld, int n, T* x, T* y)
        where T : unmanaged, INumberBase<T>
    {
        int strips = n < 192 ? 1 : n < 512 ? 2 : 4;
        if (strips == 1)
        {
            HermitianTimes(a, ld, n, n, x, y);
            return;
        }

        using AlignedBuffer<T> sums = BufferPool.RentZeroed<T>((long)strips * n);
        T* partial = sums.Data;
        workers.Run(strips, strip =>
        {
            int from = StripStart(n, strip, strips), to = StripStart(n, strip + 1, strips);
            HermitianTimes(a + from + (from * ld), ld, n - from, to - from, x + from, partial + (strip * n) + from);
        });
        for (int strip = 0; strip < strips; strip++)
            VectorOps.AddScaled(T.One, partial + (strip * n), y, n);
    }

    /// <summary>y[j] = column_j^H x for every column.</summary>
    public static void AdjointTimes<T>(T* a, nint ld, int rows, int columns, T* x, T* y)
        where T : unmanaged, INumberBase<T>
    {
        int j = 0;
        if (typeof(T) == typeof(double))
        {
            for (; j <= columns - 4; j += 4)
                FourDots((double*)(a + (j * ld)), ld, rows, (double*)x, (double*)(y + j));
        }

        for (; j < columns; j++)
            y[j] = VectorOps.Dot(a + (j * ld), x, rows);
    }

    /// <summary>y += sum over j of x[j] column_j.</summary>
    public static void AddTimes<T>(T* a, nint ld, int rows, int columns, T* x, T* y)
        where T : unmanaged, INumberBase<T>
    {
        int j = 0;
        if (typeof(T) == typeof(double))
        {
            for (; j <= columns - 4; j += 4)
                FourAxpys((double*)(a + (j * ld)), ld, rows, (double*)(x + j), (double*)y);
        }

        for (; j < columns; j++)
            VectorOps.AddScaled(x[j], a + (j * ld), y, rows);
    }

    /// <summary>
    /// The part of y += A x, for a Hermitian A of which the lower triangle is stored, that the elements of the first
    /// columns of the triangle give.
    /// </summary>
    private static void HermitianTimes<T>(T* a, nint ld, int n, int columns, T* x, T* y)
        where T : unmanaged, INumberBase<T>
    {
        int j = 0;
        if (typeof(T) == typeof(double))
        {
            for (; j <= columns - 4; j += 4)
                FourSymmetricColumns((double*)(a + j + (j * ld)), ld, n - j, (double*)(x + j), (double*)(y + j));
        }

        for (; j < columns; j++)
        {
            T* column = a + j + (j * ld);
            y[j] += (Scalar.FromReal<T>(Scalar.RealPart(column[0])) * x[j]) + VectorOps.Dot(column + 1, x + j + 1, n - j - 1);
            VectorOps.AddScaled(x[j], column + 1, y + j + 1, n - j - 1);
        }
    }

    private static int Parts(Workers workers, int rows, int columns)
        => (long)rows * columns < ThreadingSize ? 1 : workers.Threads;

    /// <summary>A share in multiples of four, so that the same elements meet in the same vectors.</summary>
    private static (int From, int To) Share(int length, int part, int parts)
        => (length * part / parts / 4 * 4, part == parts - 1 ? length : length * (part + 1) / parts / 4 * 4);

    /// <summary>First column of a strip; strips of a triangle have about equal areas.</summary>
    private static int StripStart(int n, int strip, int strips)
        => strip == strips ? n : (int)(n * (1 - Math.Sqrt(1 - ((double)strip / strips)))) / 4 * 4;

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private static void FourDots(double* a, nint ld, int n, double* x, double* y)
    {
        double* b = a + ld, c = b + ld, d = c + ld;
        Vector256<double> s = default, t = default, u = default, v = default;
        int i = 0;
        for (; i <= n - Width; i += Width)
        {
            Vector256<double> p = Vector256.Load(x + i);
            s = Vector256.FusedMultiplyAdd(p, Vector256.Load(a + i), s);
            t = Vector256.FusedMultiplyAdd(p, Vector256.Load(b + i), t);
            u = Vector256.FusedMultiplyAdd(p, Vector256.Load(c + i), u);
            v = Vector256.FusedMultiplyAdd(p, Vector256.Load(d + i), v);
        }

        double s1 = Vector256.Sum(s), t1 = Vector256.Sum(t), u1 = Vector256.Sum(u), v1 = Vector256.Sum(v);
        for (; i < n; i++)
        {
            s1 = Math.FusedMultiplyAdd(x[i], a[i], s1);
            t1 = Math.FusedMultiplyAdd(x[i], b[i], t1);
            u1 = Math.FusedMultiplyAdd(x[i], c[i], u1);
            v1 = Math.FusedMultiplyAdd(x[i], d[i], v1);
        }

        y[0] = s1;
        y[1] = t1;
        y[2] = u1;
        y[3] = v1;
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private static void FourAxpys(double* a, nint ld, int n, double* x, double* y)
    {
        double* b = a + ld, c = b + ld, d = c + ld;
        Vector256<double> s = Vector256.Create(x[0]), t = Vector256.Create(x[1]), u = Vector256.Create(x[2]), v = Vector256.Create(x[3]);
        int i = 0;
        for (; i <= n - Width; i += Width)
        {
            Vector256<double> sum = Vector256.FusedMultiplyAdd(s, Vector256.Load(a + i), Vector256.Load(y + i));
            sum = Vector256.FusedMultiplyAdd(t, Vector256.Load(b + i), sum);
            sum = Vector256.FusedMultiplyAdd(u, Vector256.Load(c + i), sum);
            Vector256.Store(Vector256.FusedMultiplyAdd(v, Vector256.Load(d + i), sum), y + i);
        }

        for (; i < n; i++)
        {
            double sum = Math.FusedMultiplyAdd(x[0], a[i], y[i]);
            sum = Math.FusedMultiplyAdd(x[1], b[i], sum);
            sum = Math.FusedMultiplyAdd(x[2], c[i], sum);
            y[i] = Math.FusedMultiplyAdd(x[3], d[i], sum);
        }
    }

    /// <summary>The first four columns of a symmetric product: every stored element serves its row and its column.</summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private static void FourSymmetricColumns(double* a, nint ld, int n, double* x, double* y)
    {
        double* b = a + ld, c = b + ld, d = c + ld;
        double x0 = x[0], x1 = x[1], x2 = x[2], x3 = x[3];
        Vector256<double> s = default, t = default, u = default, v = default;
        Vector256<double> f = Vector256.Create(x0), g = Vector256.Create(x1), h = Vector256.Create(x2), k = Vector256.Create(x3);
        int i = 4;
        for (; i <= n - Width; i += Width)
        {
            Vector256<double> p = Vector256.Load(x + i), sum = Vector256.Load(y + i);
            Vector256<double> va = Vector256.Load(a + i), vb = Vector256.Load(b + i);
            sum = Vector256.FusedMultiplyAdd(f, va, sum);
            s = Vector256.FusedMultiplyAdd(p, va, s);
            sum = Vector256.FusedMultiplyAdd(g, vb, sum);
            t = Vector256.FusedMultiplyAdd(p, vb, t);
            Vector256<double> vc = Vector256.Load(c + i), vd = Vector256.Load(d + i);
            sum = Vector256.FusedMultiplyAdd(h, vc, sum);
            u = Vector256.FusedMultiplyAdd(p, vc, u);
            sum = Vector256.FusedMultiplyAdd(k, vd, sum);
            v = Vector256.FusedMultiplyAdd(p, vd, v);
            Vector256.Store(sum, y + i);
        }

        double y0 = Vector256.Sum(s), y1 = Vector256.Sum(t), y2 = Vector256.Sum(u), y3 = Vector256.Sum(v);
        for (; i < n; i++)
        {
            y[i] += (a[i] * x0) + (b[i] * x1) + (c[i] * x2) + (d[i] * x3);
            y0 += a[i] * x[i];
            y1 += b[i] * x[i];
            y2 += c[i] * x[i];
            y3 += d[i] * x[i];
        }

        y[0] += y0 + (a[0] * x0) + (a[1] * x1) + (a[2] * x2) + (a[3] * x3);
        y[1] += y1 + (a[1] * x0) + (b[1] * x1) + (b[2] * x2) + (b[3] * x3);
        y[2] += y2 + (a[2] * x0) + (b[2] * x1) + (c[2] * x2) + (c[3] * x3);
        y[3] += y3 + (a[3] * x0) + (b[3] * x1) + (c[3] * x2) + (d[3] * x3);
    }
}
