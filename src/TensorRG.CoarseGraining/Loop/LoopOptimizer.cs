using System.Numerics;
using TensorRG.Tensors;
using TensorRG.Tensors.Decompositions;

namespace TensorRG.CoarseGraining.Loop;

/// <summary>
/// Minimises || ring(M) - ring(S) ||^2 over eight three-leg pieces S[left, outer, right], one at a time.
/// </summary>
internal sealed class LoopOptimizer<T>
    where T : unmanaged, INumberBase<T>
{
    public static double Drop = 1e-13;
    public static double Shift = 1e-12;
    public static double Omega = 1;
    private readonly TensorAlgebra<T> _algebra;
    private readonly Tensor<T>[] _ring;
    private readonly Tensor<T>[] _pieces;
    private readonly Tensor<T>[] _own = new Tensor<T>[8];    // E_k
    private readonly Tensor<T>[] _mixed = new Tensor<T>[4];  // F_i

    public LoopOptimizer(TensorAlgebra<T> algebra, Tensor<T>[] ring, Tensor<T>[] pieces)
    {
        (_algebra, _ring, _pieces) = (algebra, ring, pieces);
        Target = TargetNorm();
        for (int k = 0; k < 8; k++)
            _own[k] = Own(k);
        for (int i = 0; i < 4; i++)
            _mixed[i] = Mixed(i);
    }

    public double Target { get; }
    public Tensor<T>[] Pieces => _pieces;

    public void Reset(Tensor<T>[] pieces)
    {
        pieces.CopyTo(_pieces, 0);
        for (int k = 0; k < 8; k++)
            _own[k] = Own(k);
        for (int i = 0; i < 4; i++)
            _mixed[i] = Mixed(i);
    }

    public double Cost()
    {
        double self = Closed(_own), cross = Closed(_mixed);
        return (Target - (2 * cross) + self) / Target;
    }

    /// <summary>One sweep; returns the decrease of the relative cost.</summary>
    public double Sweep()
    {
        double decrease = 0;
        var suffix = new Tensor<T>?[9];
        var mixedSuffix = new Tensor<T>?[5];
        for (int k = 7; k > 0; k--)
            suffix[k] = suffix[k + 1] is null ? _own[k] : Product(_own[k], suffix[k + 1]!);
        for (int i = 3; i > 0; i--)
            mixedSuffix[i] = mixedSuffix[i + 1] is null ? _mixed[i] : Product(_mixed[i], mixedSuffix[i + 1]!);
        Tensor<T>? prefix = null, mixedPrefix = null;
        for (int k = 0; k < 8; k++)
        {
            int i = k / 2;
            Tensor<T> environment = Join(suffix[k + 1], prefix);
            Tensor<T> mixed = Join(mixedSuffix[i + 1], mixedPrefix);
            decrease += Update(k, environment, mixed);
            _own[k] = Own(k);
            prefix = prefix is null ? _own[k] : Product(prefix, _own[k]);
            if (k % 2 == 1)
            {
                _mixed[i] = Mixed(i);
                mixedPrefix = mixedPrefix is null ? _mixed[i] : Product(mixedPrefix, _mixed[i]);
            }
        }

        return decrease / Target;
    }

    public Tensor<T> Join(Tensor<T>? suffix, Tensor<T>? prefix)
        => suffix is null ? prefix! : prefix is null ? suffix : Product(suffix, prefix);

    private double Update(int k, Tensor<T> environment, Tensor<T> mixed)
    {
        Tensor<T> piece = _pieces[k];
        Tensor<T> w = Right(k, mixed);
        Tensor<T> ns = Applied(environment, piece);
        Tensor<T> residual = TensorAlgebra<T>.Add(w, ns, -T.One);
        Tensor<T> matrix = environment.Permute(3, 1, 2, 0);
        using Tensor<T> ordered = residual.Permute(0, 2, 1);
        double size = TensorAlgebra<T>.LargestMagnitude(matrix);
        using Tensor<T> solved = GradedSolve.Positive(matrix, Shift * size, ordered);
        Tensor<T> delta = solved.Permute(0, 2, 1);
        double gain = 0;
        using (Tensor<T> d = delta.Conjugate())
            gain = Scalar.RealPart(_algebra.Contract(d, [0, 1, 2], residual, [0, 1, 2]).Elements[0]);
        _pieces[k] = TensorAlgebra<T>.Add(piece, delta, Scalar.FromReal<T>(Omega));
        return Omega * (2 - Omega) * gain;
    }

    /// <summary>W[l, o, r].</summary>
    public Tensor<T> Right(int k, Tensor<T> g)
    {
        int i = k / 2;
        if (k % 2 == 0)
        {
            using Tensor<T> next = _pieces[k + 1].Conjugate();
            using Tensor<T> open = _algebra.Contract(_ring[i], [2], next, [1]); // [a, o1, c, x*, d*]
            // g[c, d*, a, b*]
            return _algebra.Contract(g, [0, 1, 2], open, [2, 4, 0]).Permute(0, 1, 2); // [b, o1, x]
        }

        using Tensor<T> before = _pieces[k - 1].Conjugate(); // [b*, o1*, x*]
        using Tensor<T> opened = _algebra.Contract(_ring[i], [1], before, [1]); // [a, o2, c, b*, x*]
        return _algebra.Contract(opened, [0, 2, 3], g, [2, 0, 3]).Permute(1, 0, 2); // [o2, x, d] -> [x, o2, d]
    }

    /// <summary>N S from [a, a*, b, b*] with a at the right of the piece, b at its left.</summary>
    public Tensor<T> Applied(Tensor<T> environment, Tensor<T> piece)
        => _algebra.Contract(environment, [2, 0], piece, [0, 2]).Permute(1, 2, 0); // [a*, b*, o] -> [l, o, r]

    public Tensor<T> OwnOf(int k) => _own[k];

    public Tensor<T> Transfer(Tensor<T> upper, Tensor<T> lower)
    {
        using Tensor<T> dual = lower.Conjugate();
        using Tensor<T> e = _algebra.Contract(upper, [1], dual, [1]);
        return e.Permute(0, 2, 1, 3);
    }

    /// <summary>Of the four tensors: the product of the other three mixed transfers.</summary>
    public Tensor<T>[] MixedEnvironments()
    {
        Tensor<T> front = Product(_mixed[0], _mixed[1]), back = Product(_mixed[2], _mixed[3]);
        return [Product(_mixed[1], back), Product(back, _mixed[0]), Product(_mixed[3], front), Product(front, _mixed[2])];
    }

    private Tensor<T> Own(int k) => Transfer(_pieces[k], _pieces[k]);

    private Tensor<T> Mixed(int i)
    {
        using Tensor<T> first = _pieces[2 * i].Conjugate(), second = _pieces[(2 * i) + 1].Conjugate();
        using Tensor<T> pair = _algebra.Contract(first, [2], second, [0]);
        using Tensor<T> f = _algebra.Contract(_ring[i], [1, 2], pair, [1, 2]);
        return f.Permute(0, 2, 1, 3);
    }

    public Tensor<T> Product(Tensor<T> a, Tensor<T> b) => _algebra.Contract(a, [2, 3], b, [0, 1]);

    private double Closed(Tensor<T>[] factors)
    {
        int half = factors.Length / 2;
        Tensor<T> left = factors[0], right = factors[half];
        for (int i = 1; i < half; i++)
            (left, right) = (Product(left, factors[i]), Product(right, factors[half + i]));
        return Scalar.RealPart(_algebra.Contract(left, [2, 3, 0, 1], right, [0, 1, 2, 3]).Elements[0]);
    }

    private double TargetNorm()
    {
        var factors = new Tensor<T>[4];
        for (int i = 0; i < 4; i++)
        {
            using Tensor<T> dual = _ring[i].Conjugate();
            using Tensor<T> e = _algebra.Contract(_ring[i], [1, 2], dual, [1, 2]);
            factors[i] = e.Permute(0, 2, 1, 3);
        }

        return Closed(factors);
    }
}
