using System.Numerics;
using TensorRG.Tensors.Kernels;

namespace TensorRG.Tensors.Decompositions;

/// <summary>One run of the block subspace iteration: M P = Q R with P and Q turning towards the leading singular subspaces.</summary>
internal sealed class SubspaceIteration<T>
    where T : unmanaged, INumberBase<T>
{
    private readonly TensorAlgebra<T> _algebra;
    private readonly SubspaceOptions _options;
    private readonly ILinearMap<T> _map;
    private readonly CutRule _rule;
    private readonly RandomSequence _random;
    private readonly AbelianGroup _group;
    private readonly FusedSpace _rows;
    private readonly FusedSpace _columns;
    private readonly SortedDictionary<Charge, int> _limits = [];
    private readonly SortedDictionary<Charge, int> _sizes = [];
    private readonly Dictionary<Charge, int> _kept = [];
    private Tensor<T>? _sample;
    private Tensor<T>? _left;
    private Tensor<T>? _right;
    private BlockMatrix<T>? _triangles;
    private bool _cutsMultiplet;
    private bool _isUnsettled;

    public SubspaceIteration(TensorAlgebra<T> algebra, SubspaceOptions options, ILinearMap<T> map, CutRule rule, RandomSequence random)
    {
        _algebra = algebra;
        _options = options;
        _map = map;
        _rule = rule;
        _random = random;
        _group = map.RowLegs[0].Group;
        _rows = new FusedSpace(_group, map.RowLegs);
        _columns = new FusedSpace(_group, map.ColumnLegs);
        foreach (FusedSpace.Part row in _rows.Parts)
        {
            if (_columns.Find(_group.Negate(row.Charge)) is { } column)
                _limits.Add(row.Charge, Math.Min(row.Dimension, column.Dimension));
        }
    }

    /// <summary>Whether full decompositions of all sectors cost no more than iterating.</summary>
    public bool IsDenseCheaper
        => _sizes.All(p => p.Value >= _options.DenseFraction * _limits[p.Key]) && CanGoDense;

    private bool CanGoDense => _limits.Values.DefaultIfEmpty(0).Max() <= _options.LargestDenseSector;

    /// <summary>Chooses the number of vectors in each sector.</summary>
    public void SizeBlocks(IReadOnlyDictionary<Charge, int>? expected)
    {
        double total = _limits.Values.Sum(static n => (double)n);
        foreach ((Charge charge, int limit) in _limits)
        {
            int share = expected is not null && expected.TryGetValue(charge, out int known)
                ? known
                : (int)Math.Ceiling(_rule.MaxDimension * (limit / total));
            _sizes[charge] = BlockSize(charge, share);
        }
    }

    /// <summary>Iterates until the kept values have settled; false asks for a full decomposition.</summary>
    public bool Run()
    {
        using (Tensor<T> start = RandomBlock(_sizes))
            _sample = _map.Apply(start);
        (_left, BlockMatrix<T> unused) = GradedQr.Orthonormalize(_algebra.Kernels, _sample);
        unused.Dispose();
        int steps = 0;
        Dictionary<Charge, double[]>? last = null;
        for (int total = 0; total < 3 * _options.MaxPowerSteps; total++)
        {
            bool mayStop = ++steps >= _options.MinPowerSteps;
            Dictionary<Charge, double[]>? before = HalfStep(adjoint: true, wantValues: mayStop);
            Dictionary<Charge, double[]> after = HalfStep(adjoint: false, wantValues: true)!;
            if (Grow(after))
            {
                if (IsDenseCheaper)
                    return false;
                steps = 0;
                last = null;
                continue;
            }

            if (mayStop && HasSettled(last!, before!, after))
                return true;
            last = after;
            if (steps >= _options.MaxPowerSteps)
                break;
        }

        // Sectors too large for a full decomposition keep what the iteration has, and say so.
        _isUnsettled = true;
        return !CanGoDense;
    }

    /// <summary>The truncated decomposition from the last step.</summary>
    public TruncatedSvd<T> Result()
    {
        var factors = new Dictionary<Charge, Factors<T>>();
        try
        {
            using BlockMatrix<T> left = Columns(_left!);
            using BlockMatrix<T> right = Columns(_right!);
            foreach (Charge charge in left.Charges)
            {
                MatrixView<T> q = left[charge], p = right[charge];
                factors.Add(charge, Ritz(q, _triangles![charge], p));
            }

            TruncatedSvd<T> result = SvdAssembly.Build(_rows, _columns, factors, _kept, default);
            double kept = result.Weights.Values.Sum(static v => SectorCut.SquaredSum(v));
            return result with { Truncation = new Truncation(kept, DiscardedWeight(factors), _cutsMultiplet, _isUnsettled) };
        }
        finally
        {
            foreach (Factors<T> f in factors.Values)
                f.Dispose();
            Release();
        }
    }

    private static BlockMatrix<T> Columns(Tensor<T> block)
        => BlockMatrix<T>.From(block, [.. Enumerable.Range(0, block.Rank - 1)], [block.Rank - 1]);

    private Dictionary<Charge, double[]>? HalfStep(bool adjoint, bool wantValues)
    {
        using Tensor<T> moved = adjoint ? _map.ApplyAdjoint(_left!) : _map.Apply(_right!);
        (Tensor<T> basis, BlockMatrix<T> triangles) = GradedQr.Orthonormalize(_algebra.Kernels, moved);
        _triangles?.Dispose();
        _triangles = triangles;
        if (adjoint)
        {
            _right?.Dispose();
            _right = basis;
        }
        else
        {
            _left?.Dispose();
            _left = basis;
        }

        return wantValues ? triangles.Charges.ToDictionary(static q => q, q => Values(triangles[q])) : null;
    }

    private double[] Values(MatrixView<T> triangle)
    {
        using var f = new Factors<T>(triangle.Rows, triangle.Columns, triangle.Rows);
        _algebra.Kernels.SingularValues(triangle, f.U, f.S, f.V);
        return f.S;
    }

    /// <summary>Adds random vectors to the sectors whose kept values reach too near the end of the block.</summary>
    private bool Grow(Dictionary<Charge, double[]> values)
    {
        Dictionary<Charge, int> counts = SectorCut.Counts(values, _rule, out _cutsMultiplet);
        if (counts.Values.Sum() == 0)
            throw new DecompositionException("The matrix is zero: it has no singular value to keep.");
        _kept.Clear();
        var missing = new SortedDictionary<Charge, int>();
        foreach ((Charge charge, int count) in counts)
        {
            _kept.Add(charge, count);
            if (_sizes[charge] < Math.Min(_limits[charge], count + _options.Margin))
                missing.Add(charge, BlockSize(charge, count) - _sizes[charge]);
        }

        if (missing.Count == 0)
            return false;
        Extend(missing);
        return true;
    }

    /// <summary>Vectors for a sector that keeps a number of them: a multiple of eight, the width of a tile of the matrix product.</summary>
    private int BlockSize(Charge charge, int kept)
    {
        int wanted = Math.Max(_options.Oversampling, (int)(_options.OversamplingFraction * _rule.MaxDimension));
        int extra = Math.Max(_options.MinOversampling, (wanted + _limits.Count - 1) / _limits.Count);
        return Math.Min(_limits[charge], (kept + extra + 7) / 8 * 8);
    }

    private void Extend(SortedDictionary<Charge, int> missing)
    {
        using Tensor<T> fresh = RandomBlock(missing);
        using Tensor<T> moved = _map.Apply(fresh);
        using Tensor<T> sample = _sample!;
        _sample = BlockJoin.Concatenate(sample, moved);
        using Tensor<T> joined = BlockJoin.Concatenate(_left!, moved);
        (Tensor<T> basis, BlockMatrix<T> unused) = GradedQr.Orthonormalize(_algebra.Kernels, joined);
        unused.Dispose();
        _left!.Dispose();
        _left = basis;
        foreach ((Charge charge, int extra) in missing)
            _sizes[charge] += extra;
    }

    /// <summary>Whether two successive changes, over half a power step each, leave less than the tolerance to come.</summary>
    private bool HasSettled(Dictionary<Charge, double[]> first, Dictionary<Charge, double[]> second, Dictionary<Charge, double[]> third)
    {
        double earlier = LargestChange(first, second), later = LargestChange(second, third);
        double left = later * Math.Min(1, later / Math.Max(earlier, double.Epsilon));
        return left <= _options.Tolerance / 4;
    }

    /// <summary>The largest relative change of a kept value, round-off of the largest value apart.</summary>
    private double LargestChange(Dictionary<Charge, double[]> before, Dictionary<Charge, double[]> after)
    {
        double largest = after.Values.Max(static v => v.Length == 0 ? 0 : v[0]), change = 0;
        foreach ((Charge charge, int count) in _kept)
        {
            for (int i = 0; i < count; i++)
            {
                double difference = Math.Abs(after[charge][i] - before[charge][i]) - (1e-15 * largest);
                change = difference > 0 ? Math.Max(change, difference / after[charge][i]) : change;
            }
        }

        return change;
    }

    /// <summary>R = A s B^H gives U = Q A and V = P B.</summary>
    private Factors<T> Ritz(MatrixView<T> q, MatrixView<T> triangle, MatrixView<T> p)
    {
        int n = triangle.Rows;
        var result = new Factors<T>(q.Rows, p.Rows, n);
        using var small = new Factors<T>(n, n, n);
        _algebra.Kernels.SingularValues(triangle, small.U, result.S, small.V);
        _algebra.Kernels.Multiply(q, small.U, result.U, accumulate: false);
        _algebra.Kernels.Multiply(p, small.V, result.V, accumulate: false);
        PhaseConvention.Apply(result.U, result.V);
        return result;
    }

    /// <summary>
    /// Estimate of the squared norm outside the kept subspace: what is left of M times the random block, which has
    /// entries of variance one, after projecting the kept left vectors out, per vector.
    /// </summary>
    private double DiscardedWeight(Dictionary<Charge, Factors<T>> factors)
    {
        using BlockMatrix<T> sample = Columns(_sample!);
        double total = 0;
        foreach (Charge charge in sample.Charges)
        {
            MatrixView<T> y = sample[charge], u = factors[charge].U;
            if (_kept[charge] == _limits[charge] || y.Columns == 0)
                continue;
            total += ResidualWeight(y, u.Slice(0, 0, u.Rows, _kept[charge])) / y.Columns;
        }

        return total;
    }

    private unsafe double ResidualWeight(MatrixView<T> y, MatrixView<T> u)
    {
        using AlignedBuffer<T> memory = BufferPool.Rent<T>(((long)u.Columns * y.Columns) + ((long)y.Rows * y.Columns));
        var overlap = new MatrixView<T>(memory.Data, u.Columns, y.Columns);
        var projected = new MatrixView<T>(memory.Data + ((long)u.Columns * y.Columns), y.Rows, y.Columns);
        _algebra.Kernels.Multiply(u.Adjoint, y, overlap, accumulate: false);
        _algebra.Kernels.Multiply(u, overlap, projected, accumulate: false);
        double sum = 0;
        for (int i = 0; i < y.Rows; i++)
        {
            for (int j = 0; j < y.Columns; j++)
                sum += Scalar.SquaredMagnitude(y[i, j] - projected[i, j]);
        }

        return sum;
    }

    private Tensor<T> RandomBlock(SortedDictionary<Charge, int> sizes)
    {
        var vectors = new Leg(_group, Arrow.Out, sizes.Select(static p => new Sector(p.Key, p.Value)));
        Tensor<T> block = Tensor<T>.Zeros([.. _map.ColumnLegs.Select(static leg => leg.Dual), vectors]);
        foreach (ref T x in block.Elements)
            x = Scalar.FromReal<T>(_random.NextUnit());
        return block;
    }

    private void Release()
    {
        _sample?.Dispose();
        _left?.Dispose();
        _right?.Dispose();
        _triangles?.Dispose();
    }
}
