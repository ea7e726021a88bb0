using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics;
using System.Runtime.Intrinsics.X86;
using V = System.Runtime.Intrinsics.Vector256;

namespace TensorRG.Tensors.Kernels;

/// <summary>
/// Copies a strided matrix to one with contiguous rows: vector copies where the source rows are contiguous, transposes
/// in registers where its columns are, single elements otherwise.
/// </summary>
internal static unsafe class PanelCopy
{
    /// <summary>target[i * targetRow + j] = source[i * row + j * column].</summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    internal static void Run<T>(T* source, nint row, nint column, nint rows, nint columns, T* target, nint targetRow)
        where T : unmanaged
    {
        if (column == 1)
            CopyRows((double*)source, row * Reals<T>(), rows, columns * Reals<T>(), (double*)target, targetRow * Reals<T>());
        else if (row == 1 && sizeof(T) == sizeof(double))
            Transpose((double*)source, column, rows, columns, (double*)target, targetRow);
        else
            CopyElements(source, row, column, rows, columns, target, targetRow);
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private static void CopyRows(double* source, nint row, nint rows, nint columns, double* target, nint targetRow)
    {
        for (; rows > 0; rows--)
        {
            nint j = 0;
            for (; j <= columns - 4; j += 4)
                V.Load(source + j).Store(target + j);
            for (; j < columns; j++)
                target[j] = source[j];
            source += row;
            target += targetRow;
        }
    }

    /// <summary>Source columns are contiguous: blocks of 4 x 4 are turned in registers.</summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private static void Transpose(double* source, nint column, nint rows, nint columns, double* target, nint targetRow)
    {
        nint j = 0;
        for (; j <= columns - 4; j += 4)
        {
            double* from = source + (j * column);
            double* to = target + j;
            nint i = 0;
            for (; i <= rows - 4; i += 4)
            {
                Transpose4x4(from + i, column, to, targetRow);
                to += 4 * targetRow;
            }

            CopyElements(from + i, 1, column, rows - i, 4, to, targetRow);
        }

        if (j < columns)
            CopyElements(source + (j * column), 1, column, rows, columns - j, target + j, targetRow);
    }

    /// <summary>target[i * targetRow + j] = source[j * column + i] for i, j in 0 .. 3.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    internal static void Transpose4x4(double* source, nint column, double* target, nint targetRow)
    {
        Vector256<double> x0 = V.Load(source), x1 = V.Load(source + column);
        Vector256<double> x2 = V.Load(source + (2 * column)), x3 = V.Load(source + (3 * column));
        Turn(ref x0, ref x1, ref x2, ref x3);
        x0.Store(target);
        x1.Store(target + targetRow);
        x2.Store(target + (2 * targetRow));
        x3.Store(target + (3 * targetRow));
    }

    /// <summary>The transpose of the 4 x 4 matrix whose rows are given.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    internal static void Turn(
        ref Vector256<double> x0, ref Vector256<double> x1, ref Vector256<double> x2, ref Vector256<double> x3)
    {
        Vector256<double> low01, high01, low23, high23;
        if (Avx.IsSupported)
        {
            low01 = Avx.UnpackLow(x0, x1);
            high01 = Avx.UnpackHigh(x0, x1);
            low23 = Avx.UnpackLow(x2, x3);
            high23 = Avx.UnpackHigh(x2, x3);
            x0 = Avx.Permute2x128(low01, low23, 0x20);
            x1 = Avx.Permute2x128(high01, high23, 0x20);
            x2 = Avx.Permute2x128(low01, low23, 0x31);
            x3 = Avx.Permute2x128(high01, high23, 0x31);
            return;
        }

        low01 = V.Create(x0[0], x1[0], x2[0], x3[0]);
        high01 = V.Create(x0[1], x1[1], x2[1], x3[1]);
        low23 = V.Create(x0[2], x1[2], x2[2], x3[2]);
        high23 = V.Create(x0[3], x1[3], x2[3], x3[3]);
        (x0, x1, x2, x3) = (low01, high01, low23, high23);
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private static void CopyElements<T>(
        T* source, nint row, nint column, nint rows, nint columns, T* target, nint targetRow)
        where T : unmanaged
    {
        for (nint i = 0; i < rows; i++)
        {
            T* from = source + (i * row);
            T* to = target + (i * targetRow);
            for (nint j = 0; j < columns; j++, from += column)
                to[j] = *from;
        }
    }

    private static nint Reals<T>()
        where T : unmanaged
        => sizeof(T) / sizeof(double);
}
