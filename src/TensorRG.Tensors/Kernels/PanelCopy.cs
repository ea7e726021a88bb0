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
    /// <summary>Rows turned before the next columns: as many pages as the first-level address cache holds.</summary>
    private const int RowBlock = 64;

    /// <summary>Bytes above which the system's block copy is faster than a loop.</summary>
    private const int LongRow = 1024;

    /// <summary>target[i * targetRow + j] = source[i * row + j * column].</summary>
    internal static void Run<T>(T* source, nint row, nint column, nint rows, nint columns, T* target, nint targetRow)
        where T : unmanaged
    {
        if (column == 1)
            CopyRows((double*)source, row * Reals<T>(), rows, columns * Reals<T>(), (double*)target, targetRow * Reals<T>());
        else if (sizeof(T) == sizeof(double))
            TurnRows((double*)source, row, column, rows, columns, (double*)target, targetRow);
        else
            CopyStrips(source, row, column, rows, columns, target, targetRow);
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private static void CopyRows(double* source, nint row, nint rows, nint columns, double* target, nint targetRow)
    {
        bool longRow = columns * sizeof(double) >= LongRow;
        for (; rows > 0; rows--, source += row, target += targetRow)
        {
            if (longRow)
            {
                Buffer.MemoryCopy(source, target, columns * sizeof(double), columns * sizeof(double));
                continue;
            }

            nint j = 0;
            for (; j <= columns - 4; j += 4)
                V.Load(source + j).Store(target + j);
            if (j < columns)
                LaneTail.Store(LaneTail.Load(source + j, columns - j), target + j, columns - j);
        }
    }

    /// <summary>The same, with zeros after the columns up to <paramref name="targetRow"/>.</summary>
    internal static void RunPadded<T>(T* source, nint row, nint column, nint rows, nint columns, T* target, nint targetRow)
        where T : unmanaged
    {
        nint width = targetRow * Reals<T>(), used = columns * Reals<T>();
        if (column == 1 && width % 4 == 0)
        {
            PadRows((double*)source, row * Reals<T>(), rows, used, (double*)target, width);
            return;
        }

        System.Runtime.InteropServices.NativeMemory.Clear(target, (nuint)(rows * targetRow * sizeof(T)));
        Run(source, row, column, rows, columns, target, targetRow);
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private static void PadRows(double* source, nint row, nint rows, nint columns, double* target, nint targetRow)
    {
        nint whole = columns & ~3, rest = columns & 3;
        for (; rows > 0; rows--, source += row, target += targetRow)
        {
            nint j = 0;
            for (; j < whole; j += 4)
                V.Load(source + j).Store(target + j);
            if (rest != 0)
            {
                LaneTail.Load(source + j, rest).Store(target + j);
                j += 4;
            }

            for (; j < targetRow; j += 4)
                V.Store(default, target + j);
        }
    }

    private static void TurnRows(double* source, nint row, nint column, nint rows, nint columns, double* target, nint targetRow)
    {
        if (row != 1)
        {
            CopyStrips(source, row, column, rows, columns, target, targetRow);
            return;
        }

        for (; rows > 0; rows -= RowBlock, source += RowBlock, target += RowBlock * targetRow)
            Transpose(source, column, Math.Min(rows, RowBlock), columns, target, targetRow);
    }

    /// <summary>
    /// Source columns are contiguous: blocks of 4 x 4 are turned in registers, two at a time so that each target row
    /// receives a whole cache line.
    /// </summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private static void Transpose(double* source, nint column, nint rows, nint columns, double* target, nint targetRow)
    {
        nint whole = rows & ~3;
        nint j = 0;
        for (; j <= columns - 8; j += 8)
        {
            double* from = source + (j * column);
            double* to = target + j;
            for (nint i = 0; i < whole; i += 4, to += 4 * targetRow)
            {
                Transpose4x4(from + i, column, to, targetRow);
                Transpose4x4(from + i + (4 * column), column, to + 4, targetRow);
            }
        }

        for (; j <= columns - 4; j += 4)
        {
            double* to = target + j;
            for (nint i = 0; i < whole; i += 4, to += 4 * targetRow)
                Transpose4x4(source + (j * column) + i, column, to, targetRow);
        }

        if (whole < rows)
            CopyStrips(source + whole, 1, column, rows - whole, j, target + (whole * targetRow), targetRow);
        if (j < columns)
            CopyStrips(source + (j * column), 1, column, rows, columns - j, target + j, targetRow);
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

    /// <summary>Element by element, four columns at a time: a few source streams, and target rows in whole pieces.</summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private static void CopyStrips<T>(
        T* source, nint row, nint column, nint rows, nint columns, T* target, nint targetRow)
        where T : unmanaged
    {
        nint j = 0;
        for (; j <= columns - 4; j += 4)
        {
            T* from = source + (j * column);
            T* to = target + j;
            for (nint i = 0; i < rows; i++, from += row, to += targetRow)
            {
                T x0 = from[0], x1 = from[column], x2 = from[2 * column], x3 = from[3 * column];
                to[0] = x0;
                to[1] = x1;
                to[2] = x2;
                to[3] = x3;
            }
        }

        for (; j < columns; j++)
        {
            T* from = source + (j * column);
            T* to = target + j;
            for (nint i = 0; i < rows; i++, from += row, to += targetRow)
                *to = *from;
        }
    }

    private static nint Reals<T>()
        where T : unmanaged
        => sizeof(T) / sizeof(double);
}
