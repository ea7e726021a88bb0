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
    internal void Write<T>(
        double* tile, nint tileRow, int rows, int columns, T* c, nint row, nint column, bool accumulate)
        where T : unmanaged, INumberBase<T>
    {
        for (int i = 0; i < rows; i++)
        {
            if (typeof(T) == typeof(double))
                WriteRow(tile + (i * tileRow), columns, (double*)c, column, accumulate);
            else
                WriteRow(tile + (2 * i * tileRow), tileRow, columns, (Complex*)c, column, accumulate);
            c += row;
        }
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private static void WriteRow(double* tile, int columns, double* c, nint column, bool accumulate)
    {
        int j = 0;
        if (column == 1)
        {
            for (; j <= columns - 4; j += 4)
                (accumulate ? V.Load(c + j) + V.Load(tile + j) : V.Load(tile + j)).Store(c + j);
        }

        c += j * column;
        for (; j < columns; j++, c += column)
            *c = accumulate ? *c + tile[j] : tile[j];
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private void WriteRow(double* tile, nint tileRow, int columns, Complex* c, nint column, bool accumulate)
    {
        int j = 0;
        if (column == 1)
        {
            Vector256<double> straight = V.Create(1, _xv, 1, _xv), crossed = V.Create(_yv, _yu, _yv, _yu);
            for (; j <= columns - 2; j += 2)
            {
                // Products with +-1 are exact, so the fused form rounds once like the scalar one below.
                Vector256<double> y = ComplexVector.Exchange(V.Load(tile + tileRow + (2 * j)));
                Vector256<double> sum = V.FusedMultiplyAdd(crossed, y, straight * V.Load(tile + (2 * j)));
                double* to = (double*)(c + j);
                (accumulate ? V.Load(to) + sum : sum).Store(to);
            }
        }

        c += j * column;
        for (; j < columns; j++, c += column)
        {
            double* x = tile + (2 * j), y = x + tileRow;
            var sum = new Complex(x[0] + (_yv * y[1]), (_xv * x[1]) + (_yu * y[0]));
            *c = accumulate ? new Complex(c->Real + sum.Real, c->Imaginary + sum.Imaginary) : sum;
        }
    }
}
