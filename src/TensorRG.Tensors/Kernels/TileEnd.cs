using System.Numerics;
using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics;
using V = System.Runtime.Intrinsics.Vector256;

namespace TensorRG.Tensors.Kernels;

/// <summary>
/// Carries a finished tile to C where the micro-kernel could not write it: ragged edges, strided columns and complex
/// numbers. A complex tile arrives as a real one: with a = x + i y of A and b = u + i v of B, row 2r holds the sums of x u and x v side by
/// side, row 2r + 1 those of y u and y v. Then Re C = x u - y v and Im C = x v + y u, with signs changed for conjugates.
/// </summary>
/// <param name="conjugateA">Whether A is conjugated.</param>
/// <param name="conjugateB">Whether B is conjugated.</param>
internal readonly unsafe struct TileEnd(bool conjugateA, bool conjugateB)
{
    // Signs of x v, y v and y u; x u is always added.
    private readonly double _xv = conjugateB ? -1 : 1;
    private readonly double _yv = conjugateA == conjugateB ? -1 : 1;
    private readonly double _yu = conjugateA ? -1 : 1;

    /// <summary>C = tile or C += tile.</summary>
    /// <param name="tile">Rows of the tile with contiguous columns.</param>
    /// <param name="tileRow">Row stride of the tile in real numbers.</param>
    /// <param name="rows">Rows of C.</param>
    /// <param name="columns">Columns of C.</param>
    /// <param name="c">First element of C.</param>
    /// <param name="row">Row stride of C.</param>
    /// <param name="column">Column stride of C.</param>
    /// <param name="accumulate">Whether to add.</param>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    internal void Write<T>(
        double* tile, nint tileRow, nint rows, nint columns, T* c, nint row, nint column, bool accumulate)
        where T : unmanaged, INumberBase<T>
    {
        if (typeof(T) != typeof(double) && column == 1)
            WriteComplex(tile, tileRow, rows, columns, (double*)c, row, accumulate);
        else if (typeof(T) != typeof(double))
            WriteComplexStrided(tile, tileRow, rows, columns, (Complex*)c, row, column, accumulate);
        else if (column == 1)
            WriteReal(tile, tileRow, rows, columns, (double*)c, row, accumulate);
        else
            WriteRealStrided(tile, tileRow, rows, columns, (double*)c, row, column, accumulate);
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private static void WriteReal(
        double* tile, nint tileRow, nint rows, nint columns, double* c, nint row, bool accumulate)
    {
        nint whole = columns & ~3, rest = columns & 3;
        for (; rows > 0; rows--, tile += tileRow, c += row)
        {
            for (nint j = 0; j < whole; j += 4)
                (accumulate ? V.Load(c + j) + V.Load(tile + j) : V.Load(tile + j)).Store(c + j);
            if (rest == 0)
                continue;
            Vector256<double> last = LaneTail.Load(tile + whole, rest);
            LaneTail.Store(accumulate ? LaneTail.Load(c + whole, rest) + last : last, c + whole, rest);
        }
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private static void WriteRealStrided(
        double* tile, nint tileRow, nint rows, nint columns, double* c, nint row, nint column, bool accumulate)
    {
        for (; rows > 0; rows--, tile += tileRow, c += row)
        {
            double* to = c;
            for (nint j = 0; j < columns; j++, to += column)
                *to = accumulate ? *to + tile[j] : tile[j];
        }
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private void WriteComplex(
        double* tile, nint tileRow, nint rows, nint columns, double* c, nint row, bool accumulate)
    {
        Vector256<double> straight = V.Create(1, _xv, 1, _xv), crossed = V.Create(_yv, _yu, _yv, _yu);
        for (; rows > 0; rows--, tile += 2 * tileRow, c += 2 * row)
        {
            nint j = 0;
            for (; j <= (2 * columns) - 4; j += 4)
            {
                // Products with +-1 are exact, so this rounds once, like the scalar form below.
                Vector256<double> y = ComplexVector.Exchange(V.Load(tile + tileRow + j));
                Vector256<double> sum = V.FusedMultiplyAdd(crossed, y, straight * V.Load(tile + j));
                (accumulate ? V.Load(c + j) + sum : sum).Store(c + j);
            }

            if (j < 2 * columns)
                WriteElement(tile + j, tileRow, (Complex*)(c + j), accumulate);
        }
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private void WriteComplexStrided(
        double* tile, nint tileRow, nint rows, nint columns, Complex* c, nint row, nint column, bool accumulate)
    {
        for (; rows > 0; rows--, tile += 2 * tileRow, c += row)
        {
            for (nint j = 0; j < columns; j++)
                WriteElement(tile + (2 * j), tileRow, c + (j * column), accumulate);
        }
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private void WriteElement(double* x, nint tileRow, Complex* c, bool accumulate)
    {
        double* y = x + tileRow;
        double re = x[0] + (_yv * y[1]), im = (_xv * x[1]) + (_yu * y[0]);
        *c = accumulate ? new Complex(c->Real + re, c->Imaginary + im) : new Complex(re, im);
    }
}
