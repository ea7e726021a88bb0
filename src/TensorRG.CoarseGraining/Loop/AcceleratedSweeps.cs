using System.Numerics;
using TensorRG.Tensors;

namespace TensorRG.CoarseGraining.Loop;

/// <summary>
/// Anderson acceleration of the sweeps (D. G. Anderson, J. ACM 12, 547 (1965)): the next pieces are the combination of the last sweeps' results whose
/// changes cancel best. A combination that raises the cost is thrown away, so that the cost never rises.
/// </summary>
internal sealed class AcceleratedSweeps<T>(LoopOptimizer<T> optimizer, int memory)
    where T : unmanaged, INumberBase<T>
{
    private readonly List<(Tensor<T>[] Result, Tensor<T>[] Change)> _history = [];

    public int Rejected { get; private set; }

    public int Taken { get; private set; }

    /// <summary>One sweep and, where it helps, an extrapolation; the relative cost afterwards.</summary>
    public double Advance(double cost)
    {
        Tensor<T>[] before = [.. optimizer.Pieces];
        double swept = cost - optimizer.Sweep();
        Tensor<T>[] after = [.. optimizer.Pieces];
        Tensor<T>[] change = Combine(after, before, -1);
        _history.Add((after, change));
        if (_history.Count > memory)
            _history.RemoveAt(0);
        if (_history.Count < 2)
            return swept;
        optimizer.Reset(Extrapolated());
        double direct = optimizer.Cost();
        if (direct < swept)
        {
            Taken++;
            return direct;
        }

        Rejected++;
        optimizer.Reset(after);
        _history.RemoveRange(0, _history.Count - 1);
        return swept;
    }

    private Tensor<T>[] Extrapolated()
    {
        int n = _history.Count - 1;
        (Tensor<T>[] result, Tensor<T>[] change) = _history[n];
        var dx = new Tensor<T>[n][];
        var df = new Tensor<T>[n][];
        for (int j = 0; j < n; j++)
        {
            dx[j] = Combine(_history[j + 1].Result, _history[j].Result, -1);
            df[j] = Combine(_history[j + 1].Change, _history[j].Change, -1);
        }

        double[,] gram = new double[n, n + 1];
        for (int i = 0; i < n; i++)
        {
            for (int j = 0; j < n; j++)
                gram[i, j] = Dot(df[i], df[j]);
            gram[i, n] = Dot(df[i], change);
        }

        double trace = 0;
        for (int i = 0; i < n; i++)
            trace += gram[i, i];
        for (int i = 0; i < n; i++)
            gram[i, i] *= 1 + 1e-10;
        double[] gamma = Solve(gram, n);
        Tensor<T>[] next = result;
        for (int j = 0; j < n; j++)
            next = Combine(next, dx[j], -gamma[j]);
        return next;
    }

    private static double[] Solve(double[,] m, int n)
    {
        for (int c = 0; c < n; c++)
        {
            int p = c;
            for (int r = c + 1; r < n; r++)
                if (Math.Abs(m[r, c]) > Math.Abs(m[p, c]))
                    p = r;
            for (int k = 0; k <= n; k++)
                (m[c, k], m[p, k]) = (m[p, k], m[c, k]);
            if (m[c, c] == 0)
                return new double[n];
            for (int r = c + 1; r < n; r++)
            {
                double q = m[r, c] / m[c, c];
                for (int k = c; k <= n; k++)
                    m[r, k] -= q * m[c, k];
            }
        }

        double[] x = new double[n];
        for (int r = n - 1; r >= 0; r--)
        {
            double s = m[r, n];
            for (int k = r + 1; k < n; k++)
                s -= m[r, k] * x[k];
            x[r] = s / m[r, r];
        }

        return x;
    }

    private static Tensor<T>[] Combine(Tensor<T>[] a, Tensor<T>[] b, double factor)
        => [.. a.Zip(b, (x, y) => TensorAlgebra<T>.Add(x, y, Scalar.FromReal<T>(factor)))];

    private static double Dot(Tensor<T>[] a, Tensor<T>[] b)
    {
        double sum = 0;
        for (int k = 0; k < a.Length; k++)
        {
            ReadOnlySpan<T> x = a[k].Elements, y = b[k].Elements;
            for (int i = 0; i < x.Length; i++)
                sum += Scalar.RealPart(Scalar.Conjugate(x[i]) * y[i]);
        }

        return sum;
    }
}
