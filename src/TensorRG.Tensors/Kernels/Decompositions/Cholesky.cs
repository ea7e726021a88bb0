using System.Numerics;
using System.Runtime.InteropServices;

namespace TensorRG.Tensors.Kernels.Decompositions;

/// <summary>
/// Systems with a Hermitian positive matrix by its Cholesky factor H = U^H U. All loops run along rows, element by element in a fixed order, so that
/// the bits do not depend on the width of vectors.
/// </summary>
internal static unsafe class Cholesky
{
    /// <summary>Replaces B by (H + shift)^-1 B; H is overwritten. Both are row-major.</summary>
    public static void Solve<T>(MatrixView<T> h, double shift, MatrixView<T> b)
        where T : unmanaged, INumberBase<T>
    {
        double[] inverse = Factor(h, shift);
        int n = h.Rows;
        for (int i = 0; i < n; i++)
        {
            Scale(Row(b, i, 0), inverse[i]);
            for (int j = i + 1; j < n; j++)
                Subtract(Row(b, j, 0), Row(b, i, 0), Scalar.Conjugate(h[i, j]));
        }

        for (int i = n - 1; i >= 0; i--)
        {
            for (int j = i + 1; j < n; j++)
                Subtract(Row(b, i, 0), Row(b, j, 0), h[i, j]);
            Scale(Row(b, i, 0), inverse[i]);
        }
    }

    /// <summary>U in the upper triangle of H; the inverses of its diagonal.</summary>
    private static double[] Factor<T>(MatrixView<T> h, double shift)
        where T : unmanaged, INumberBase<T>
    {
        int n = h.Rows;
        double[] inverse = new double[n];
        for (int k = 0; k < n; k++)
        {
            // The shift is part of every pivot: what elimination leaves of H itself is never negative but for round-off.
            double pivot = Math.Max(Scalar.RealPart(h[k, k]), 0) + shift;
            inverse[k] = 1 / Math.Sqrt(pivot);
            h[k, k] = Scalar.FromReal<T>(Math.Sqrt(pivot));
            Scale(Row(h, k, k + 1), inverse[k]);
            for (int i = k + 1; i < n; i++)
                Subtract(Row(h, i, i), Row(h, k, i), Scalar.Conjugate(h[k, i]));
        }

        return inverse;
    }

    private static Span<T> Row<T>(MatrixView<T> m, int row, int column)
        where T : unmanaged, INumberBase<T>
        => new(m.Data + (row * m.RowStride) + column, m.Columns - column);

    private static void Scale<T>(Span<T> row, double factor)
        where T : unmanaged, INumberBase<T>
    {
        T f = Scalar.FromReal<T>(factor);
        for (int i = 0; i < row.Length; i++)
            row[i] *= f;
    }

    /// <summary>target -= factor * source.</summary>
    private static void Subtract<T>(Span<T> target, Span<T> source, T factor)
        where T : unmanaged, INumberBase<T>
    {
        int done = 0;
        if (typeof(T) == typeof(double))
        {
            Span<Vector<double>> t = MemoryMarshal.Cast<T, Vector<double>>(target), s = MemoryMarshal.Cast<T, Vector<double>>(source);
            var f = new Vector<double>((double)(object)factor);
            for (int i = 0; i < t.Length; i++)
                t[i] -= s[i] * f;
            done = t.Length * Vector<double>.Count;
        }

        for (int i = done; i < target.Length; i++)
            target[i] -= source[i] * factor;
    }
}
