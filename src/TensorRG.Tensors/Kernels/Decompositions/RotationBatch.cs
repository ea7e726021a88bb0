using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics;

namespace TensorRG.Tensors.Kernels.Decompositions;

/// <summary>
/// Plane rotations of neighbouring rows, collected sweep by sweep and applied together, so that a strip of columns stays
/// in cache while many sweeps pass over it. Rotation k turns rows (k, k+1) into (c z_k - s z_(k+1), s z_k + c z_(k+1)).
/// </summary>
internal sealed unsafe class RotationBatch : IDisposable
{
    private const int Lanes = 4;

    /// <summary>Columns that pass together: two vectors keep both multipliers busy, and 500 rows stay in a 32 KiB cache.</summary>
    private const int StripWidth = 2 * Lanes;

    /// <summary>Size from which several threads are worth waking.</summary>
    private const int ThreadingSize = 96;

    private readonly Workers _workers;
    private readonly Action<int> _applyPart;
    private readonly int _size;
    private readonly int _columns;
    private readonly AlignedBuffer<double> _rows;
    private readonly double[] _rotations;
    private readonly List<(int Start, int First, int Count, bool Ascending)> _sweeps = [];
    private int _used;

    /// <summary>An empty batch acting on the rows of the identity.</summary>
    /// <param name="workers">Threads that share the strips; which one takes which does not change the bits.</param>
    /// <param name="size">Number of rows and of columns.</param>
    /// <param name="reversed">Whether to start from the identity with its rows in reverse order.</param>
    public RotationBatch(Workers workers, int size, bool reversed = false)
    {
        _workers = workers;
        _applyPart = ApplyPart;
        _size = size;
        _columns = (size + StripWidth - 1) / StripWidth * StripWidth;
        _rows = BufferPool.RentZeroed<double>((long)size * _columns);
        for (int i = 0; i < size; i++)
            Row(i)[reversed ? size - 1 - i : i] = 1;
        _rotations = new double[Math.Max(2 * size, Math.Min(64 * size, 1 << 16))];
    }

    /// <summary>Row i, of which the first <c>size</c> elements count. Valid after <see cref="Finish"/>.</summary>
    public double* Row(int i) => _rows.Data + ((nint)i * _columns);

    /// <summary>
    /// Room for one sweep of rotations: c of the rotation of rows (first + i, first + i + 1) at 2 i, s at 2 i + 1.
    /// </summary>
    /// <param name="first">Upper row of the first pair.</param>
    /// <param name="count">Number of rotations.</param>
    /// <param name="ascending">Whether the first pair is rotated first, or last.</param>
    public Span<double> AddSweep(int first, int count, bool ascending)
    {
        if (_used + (2 * count) > _rotations.Length)
            Flush();
        _sweeps.Add((_used, first, count, ascending));
        _used += 2 * count;
        return _rotations.AsSpan(_used - (2 * count), 2 * count);
    }

    /// <summary>
    /// Applies what is left and normalises the rows: thousands of rotations stretch a unit vector by as many roundings.
    /// </summary>
    public void Finish()
    {
        Flush();
        for (int i = 0; i < _size; i++)
            VectorOps.ScaleReal(1 / Math.Sqrt(VectorOps.SumOfSquares(Row(i), _size)), Row(i), _size);
    }

    private void Flush()
    {
        if (_sweeps.Count == 0)
            return;
        _workers.Run(Parts, _applyPart);
        _sweeps.Clear();
        _used = 0;
    }

    /// <summary>Gives the memory back.</summary>
    public void Dispose() => _rows.Dispose();

    private int Parts => _size < ThreadingSize ? 1 : Math.Min(2 * _workers.Threads, _columns / StripWidth);

    private void ApplyPart(int part)
    {
        int parts = Parts, strips = _columns / StripWidth;
        using AlignedBuffer<double> packed = BufferPool.Rent<double>((long)_size * StripWidth);
        for (int strip = strips * part / parts; strip < strips * (part + 1) / parts; strip++)
            ApplyToStrip(strip * StripWidth, packed.Data);
    }

    private void ApplyToStrip(int column, double* strip)
    {
        for (int i = 0; i < _size; i++)
            new Span<double>(Row(i) + column, StripWidth).CopyTo(new Span<double>(strip + (i * StripWidth), StripWidth));
        fixed (double* rotations = _rotations)
        {
            foreach ((int start, int first, int count, bool ascending) in _sweeps)
            {
                if (ascending)
                    Ascend(strip + (first * StripWidth), rotations + start, count);
                else
                    Descend(strip + (first * StripWidth), rotations + start, count);
            }
        }

        for (int i = 0; i < _size; i++)
            new Span<double>(strip + (i * StripWidth), StripWidth).CopyTo(new Span<double>(Row(i) + column, StripWidth));
    }

    // The carried row enters its own update through the addend's multiplication last, so that one rotation waits four
    // cycles for the one before it, not eight.
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private static void Ascend(double* z, double* rotations, int count)
    {
        Vector256<double> a = Vector256.Load(z), b = Vector256.Load(z + Lanes);
        for (int i = 0; i < count; i++, z += StripWidth, rotations += 2)
        {
            Vector256<double> c = Vector256.Create(rotations[0]), s = Vector256.Create(rotations[1]);
            Vector256<double> p = Vector256.Load(z + StripWidth), q = Vector256.Load(z + StripWidth + Lanes);
            Vector256.Store(Vector256.FusedMultiplyAdd(c, a, -(s * p)), z);
            Vector256.Store(Vector256.FusedMultiplyAdd(c, b, -(s * q)), z + Lanes);
            a = Vector256.FusedMultiplyAdd(s, a, c * p);
            b = Vector256.FusedMultiplyAdd(s, b, c * q);
        }

        Vector256.Store(a, z);
        Vector256.Store(b, z + Lanes);
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private static void Descend(double* z, double* rotations, int count)
    {
        z += count * StripWidth;
        rotations += 2 * (count - 1);
        Vector256<double> a = Vector256.Load(z), b = Vector256.Load(z + Lanes);
        for (int i = 0; i < count; i++, z -= StripWidth, rotations -= 2)
        {
            Vector256<double> c = Vector256.Create(rotations[0]), s = Vector256.Create(rotations[1]);
            Vector256<double> p = Vector256.Load(z - StripWidth), q = Vector256.Load(z - StripWidth + Lanes);
            Vector256.Store(Vector256.FusedMultiplyAdd(c, a, s * p), z);
            Vector256.Store(Vector256.FusedMultiplyAdd(c, b, s * q), z + Lanes);
            a = Vector256.FusedMultiplyAdd(-s, a, c * p);
            b = Vector256.FusedMultiplyAdd(-s, b, c * q);
        }

        Vector256.Store(a, z);
        Vector256.Store(b, z + Lanes);
    }
}
