using System.Runtime.CompilerServices;

namespace TensorRG.Tensors.Kernels.Decompositions;

/// <summary>
/// Implicit QR iteration on a real upper bidiagonal matrix (Golub and Reinsch, Numer. Math. 14, 403 (1970)), with the
/// zero-shift sweep and the choice of direction of Demmel and Kahan, SIAM J. Sci. Stat. Comput. 11, 873 (1990).
/// The rotations are left to two batches.
/// </summary>
/// <param name="d">Diagonal, n numbers; becomes the singular values with signs, unordered.</param>
/// <param name="e">Superdiagonal, at least n - 1 numbers; destroyed.</param>
/// <param name="left">Row k becomes left singular vector k.</param>
/// <param name="right">Row k becomes right singular vector k.</param>
internal ref struct BidiagonalQr(Span<double> d, Span<double> e, RotationBatch left, RotationBatch right)
{
    private const int MaxSweepsEach = 60;

    /// <summary>Sweeps without progress after which the deflation floor doubles.</summary>
    private const int Patience = 6;

    private readonly Span<double> _d = d;
    private readonly Span<double> _e = e;
    private double _floor;

    /// <summary>Iterates to convergence. The matrix should have its largest element near one.</summary>
    /// <exception cref="DecompositionException">60 sweeps passed without one value found.</exception>
    public void Solve()
    {
        int n = _d.Length;
        double floor = DeflationFloor();
        int high = n - 1, oldLow = -1, oldHigh = -1;
        bool down = true;
        int sweeps = 0;
        while (high > 0)
        {
            // Equal values to round-off never fall below half an ulp: their superdiagonal is the rounding of the sweeps.
            _floor = Math.ScaleB(floor, sweeps / Patience);
            int low = BlockStart(high);
            if (low == high)
            {
                high--;
                continue;
            }

            if (low >= oldHigh || high <= oldLow || oldHigh < 0)
                down = Math.Abs(_d[low]) >= Math.Abs(_d[high]);
            sweeps = (low, high) == (oldLow, oldHigh) ? sweeps + 1 : 0;
            if (sweeps > MaxSweepsEach)
                throw new DecompositionException($"Singular values of size {n}: {MaxSweepsEach} sweeps found no further value.");
            (oldLow, oldHigh) = (low, high);
            Sweep(low, high, down);
        }

        left.Finish();
        right.Finish();
    }

    private readonly double DeflationFloor()
    {
        double norm = 0;
        for (int i = 0; i < _d.Length; i++)
            norm = Math.Max(norm, Math.Abs(_d[i]) + (i < _d.Length - 1 ? Math.Abs(_e[i]) : 0));
        return norm * Math.ScaleB(1, -52);
    }

    /// <summary>First row of the unreduced block that ends at row high; negligible elements become zero on the way.</summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private readonly int BlockStart(int high)
    {
        for (int i = high; ; i--)
        {
            if (Math.Abs(_d[i]) <= _floor)
                _d[i] = 0;
            if (i == 0)
                return 0;
            if (Math.Abs(_e[i - 1]) > _floor)
                continue;
            _e[i - 1] = 0;
            return i;
        }
    }

    private readonly void Sweep(int low, int high, bool down)
    {
        double shift = Shift(low, high, down);
        Span<double> u = left.AddSweep(low, high - low, down), v = right.AddSweep(low, high - low, down);
        if (down && shift == 0)
            ZeroShiftDown(low, high, u, v);
        else if (down)
            ShiftedDown(low, high, shift, u, v);
        else if (shift == 0)
            ZeroShiftUp(low, high, u, v);
        else
            ShiftedUp(low, high, shift, u, v);
    }

    /// <summary>The smaller singular value of the 2 x 2 at the end, or zero where that is negligible or B is singular.</summary>
    private readonly double Shift(int low, int high, bool down)
    {
        for (int i = low; i <= high; i++)
        {
            if (_d[i] == 0)
                return 0;
        }

        double shift = down
            ? SmallerSingularValue(_d[high - 1], _e[high - 1], _d[high])
            : SmallerSingularValue(_d[low], _e[low], _d[low + 1]);
        double ratio = shift / Math.Abs(down ? _d[low] : _d[high]);
        return ratio * ratio < Math.ScaleB(1, -52) ? 0 : shift;
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private readonly void ZeroShiftDown(int low, int high, Span<double> u, Span<double> v)
    {
        double c = 1, oldC = 1, oldS = 0;
        for (int i = low; i < high; i++)
        {
            (c, double s, double r) = PlaneRotation.Generate(_d[i] * c, _e[i]);
            if (i > low)
                _e[i - 1] = oldS * r;
            (oldC, oldS, _d[i]) = PlaneRotation.Generate(oldC * r, _d[i + 1] * s);
            Record(v, i - low, c, -s);
            Record(u, i - low, oldC, -oldS);
        }

        double last = _d[high] * c;
        _d[high] = last * oldC;
        _e[high - 1] = last * oldS;
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private readonly void ZeroShiftUp(int low, int high, Span<double> u, Span<double> v)
    {
        double c = 1, oldC = 1, oldS = 0;
        for (int i = high; i > low; i--)
        {
            (c, double s, double r) = PlaneRotation.Generate(_d[i] * c, _e[i - 1]);
            if (i < high)
                _e[i] = oldS * r;
            (oldC, oldS, _d[i]) = PlaneRotation.Generate(oldC * r, _d[i - 1] * s);
            Record(u, i - 1 - low, c, s);
            Record(v, i - 1 - low, oldC, oldS);
        }

        double last = _d[low] * c;
        _d[low] = last * oldC;
        _e[low] = last * oldS;
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private readonly void ShiftedDown(int low, int high, double shift, Span<double> u, Span<double> v)
    {
        double f = (Math.Abs(_d[low]) - shift) * (Math.CopySign(1, _d[low]) + (shift / _d[low])), g = _e[low];
        for (int i = low; i < high; i++)
        {
            (double c, double s, double r) = PlaneRotation.Generate(f, g);
            if (i > low)
                _e[i - 1] = r;
            f = (c * _d[i]) + (s * _e[i]);
            _e[i] = (c * _e[i]) - (s * _d[i]);
            g = s * _d[i + 1];
            _d[i + 1] *= c;
            Record(v, i - low, c, -s);
            (c, s, _d[i]) = PlaneRotation.Generate(f, g);
            f = (c * _e[i]) + (s * _d[i + 1]);
            _d[i + 1] = (c * _d[i + 1]) - (s * _e[i]);
            Record(u, i - low, c, -s);
            if (i == high - 1)
                break;
            g = s * _e[i + 1];
            _e[i + 1] *= c;
        }

        _e[high - 1] = f;
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private readonly void ShiftedUp(int low, int high, double shift, Span<double> u, Span<double> v)
    {
        double f = (Math.Abs(_d[high]) - shift) * (Math.CopySign(1, _d[high]) + (shift / _d[high])), g = _e[high - 1];
        for (int i = high; i > low; i--)
        {
            (double c, double s, double r) = PlaneRotation.Generate(f, g);
            if (i < high)
                _e[i] = r;
            f = (c * _d[i]) + (s * _e[i - 1]);
            _e[i - 1] = (c * _e[i - 1]) - (s * _d[i]);
            g = s * _d[i - 1];
            _d[i - 1] *= c;
            Record(u, i - 1 - low, c, s);
            (c, s, _d[i]) = PlaneRotation.Generate(f, g);
            f = (c * _e[i - 1]) + (s * _d[i - 1]);
            _d[i - 1] = (c * _d[i - 1]) - (s * _e[i - 1]);
            Record(v, i - 1 - low, c, s);
            if (i == low + 1)
                break;
            g = s * _e[i - 2];
            _e[i - 2] *= c;
        }

        _e[low] = f;
    }

    private static void Record(Span<double> rotations, int index, double c, double s)
    {
        rotations[2 * index] = c;
        rotations[(2 * index) + 1] = s;
    }

    /// <summary>Smaller singular value of [[f, g], [0, h]], without cancellation.</summary>
    private static double SmallerSingularValue(double f, double g, double h)
    {
        double small = Math.Min(Math.Abs(f), Math.Abs(h)), large = Math.Max(Math.Abs(f), Math.Abs(h));
        double corner = Math.Abs(g);
        if (small == 0)
            return 0;
        double sum = 1 + (small / large), difference = (large - small) / large;
        if (corner < large)
        {
            double a = corner / large * (corner / large);
            return small * (2 / (Math.Sqrt((sum * sum) + a) + Math.Sqrt((difference * difference) + a)));
        }

        double b = large / corner;
        return 2 * (small * (1 / (Math.Sqrt(1 + (sum * b * sum * b)) + Math.Sqrt(1 + (difference * b * difference * b))))) * b;
    }
}
