using System.Numerics;
using TensorRG.Tensors;

namespace TensorRG.Boundary;

/// <summary>The infinite strip of an upper state, a row or none, and a lower state: its environments and its factor per vertex.</summary>
/// <typeparam name="T">Element type.</typeparam>
/// <param name="algebra">Contractions and kernels.</param>
/// <param name="upper">State above.</param>
/// <param name="lower">State below, contracted as it is.</param>
/// <param name="seed">Seed of the first environments.</param>
internal sealed class Strip<T>(TensorAlgebra<T> algebra, UniformState<T> upper, UniformState<T> lower, long seed)
    where T : unmanaged, INumberBase<T>
{
    private const double Tolerance = 2e-15;
    private const double Agreement = 1e-7;
    private const double RatioTolerance = 1e-10;

    private readonly Channel<T> _channel = new(algebra);
    private readonly Arnoldi<T> _solver = new(dimension: 24, restarts: 200);

    /// <summary>
    /// Whether the factors from the left, from the right and around a vertex agreed in all that was computed. They do not where two dominant
    /// eigenvalues of a strip compete, as in phases that alternate from row to row or from column to column without a charge to tell the two apart.
    /// </summary>
    public bool IsUnique { get; private set; } = true;

    /// <summary>FL and FR of the strip with a row, scaled to FL C C FR = 1, and its factor per vertex.</summary>
    public (Tensor<T> Left, Tensor<T> Right, Complex Factor) WithRow(Tensor<T> row)
    {
        Leg a = upper.Bond.Dual, x = lower.Bond.Dual;
        Ritz<T> left = Dominant([x, a, row.Legs[1].Dual], 3, v => _channel.Left(v, upper.AL, row, lower.AL));
        Ritz<T> right = Dominant([row.Legs[3].Dual, a.Dual, x.Dual], 4, v => _channel.Right(v, upper.AR, row, lower.AR));
        using Tensor<T> bond = _channel.Bond(left.Vector, upper.C, right.Vector);
        VectorSpace.Scale(right.Vector, T.One / Close(bond, lower.C));
        return (left.Vector, right.Vector, Agreed(Vertex(left.Vector, row, right.Vector), left, right));
    }

    /// <summary>The factor per vertex of the two states on one another.</summary>
    public Complex WithoutRow()
    {
        Leg a = upper.Bond.Dual, x = lower.Bond.Dual;
        Ritz<T> left = Dominant([x, a], 5, v => _channel.Left(v, upper.AL, lower.AL));
        Ritz<T> right = Dominant([a.Dual, x.Dual], 6, v => _channel.Right(v, upper.AR, lower.AR));
        using Tensor<T> bond = algebra.Contract(left.Vector, [1], upper.C, [0]), center = algebra.Contract(left.Vector, [1], upper.AC, [0]);
        using Tensor<T> bondUnder = algebra.Contract(bond, [1], right.Vector, [0]), centerUnder = algebra.Contract(center, [2], right.Vector, [0]);
        return Agreed(Scalar.ToComplex(Close(centerUnder, lower.AC)) / Scalar.ToComplex(Close(bondUnder, lower.C)), left, right);
    }

    /// <summary>FL AC A AC FR: the strip around one vertex, which may be another than the row's.</summary>
    public Complex Vertex(Tensor<T> left, Tensor<T> vertex, Tensor<T> right)
    {
        using Tensor<T> center = _channel.Center(left, upper.AC, vertex, right);
        return Scalar.ToComplex(Close(center, lower.AC));
    }

    /// <summary>The strip with one vertex at a place and another at distances 1, 2, ..., over the strip of the row alone.</summary>
    public Complex[] Pair(Tensor<T> left, Tensor<T> right, Tensor<T> row, Tensor<T> first, Tensor<T> second, int count)
    {
        T factor = T.One / Close(_channel.Center(left, upper.AC, row, right), lower.AC);
        Tensor<T> state = Step(left, upper.AC, first, lower.AC);
        var result = new Complex[count];
        for (int i = 0; i < count; i++)
        {
            using Tensor<T> end = Step(state, upper.AR, second, lower.AR);
            using Tensor<T> number = algebra.Contract(end, [2, 1, 0], right, [0, 1, 2]);
            result[i] = Scalar.ToComplex(number.Elements[0]);
            using Tensor<T> old = state;
            state = Step(old, upper.AR, row, lower.AR);
        }

        return result;

        Tensor<T> Step(Tensor<T> from, Tensor<T> above, Tensor<T> vertex, Tensor<T> below)
        {
            Tensor<T> next = _channel.Left(from, above, vertex, below);
            VectorSpace.Scale(next, factor);
            return next;
        }
    }

    /// <summary>
    /// The largest eigenvalue of the strip that carries a charge, over the dominant one; for charge zero the second. Null where no state carries the charge.
    /// </summary>
    public Complex? Ratio(Tensor<T> left, Tensor<T> right, Tensor<T> row, Charge charge)
    {
        using Tensor<T> start = VectorSpace.Random<T>(left.Legs, new RandomSequence(seed, 7), charge);
        if (start.StoredCount == 0)
            return null;
        using Tensor<T> above = algebra.Contract(upper.C, [1], right, [1]);
        using Tensor<T> dual = algebra.Contract(above, [2], lower.C, [1]);
        Ritz<T> ritz = _solver.Dominant(v => Deflated(_channel.Left(v, upper.AL, row, lower.AL)), Deflated(start), RatioTolerance);
        return ritz.Value / Vertex(left, row, right);

        // v - FL (v, C C FR): what is left beside the dominant vector.
        Tensor<T> Deflated(Tensor<T> v)
        {
            if (charge != Charge.Zero)
                return v;
            using Tensor<T> overlap = algebra.Contract(v, [1, 2, 0], dual, [0, 1, 2]);
            VectorSpace.AddTo(v, left, -overlap.Elements[0]);
            return v;
        }
    }

    /// <summary>The factor, after a look whether the eigenvalues from both sides are the same.</summary>
    private Complex Agreed(Complex factor, Ritz<T> left, Ritz<T> right)
    {
        double bound = Agreement * factor.Magnitude;
        IsUnique &= (left.Value - factor).Magnitude <= bound && (right.Value - factor).Magnitude <= bound;
        return factor;
    }

    private Ritz<T> Dominant(Leg[] legs, int purpose, Func<Tensor<T>, Tensor<T>> apply)
    {
        using Tensor<T> start = VectorSpace.Random<T>(legs, new RandomSequence(seed, purpose));
        return _solver.Dominant(apply, start, Tolerance);
    }

    private T Close(Tensor<T> a, Tensor<T> b)
    {
        int[] axes = [.. Enumerable.Range(0, a.Rank)];
        using Tensor<T> number = algebra.Contract(a, axes, b, axes);
        return number.Elements[0];
    }
}
