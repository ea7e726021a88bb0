using System.Numerics;
using TensorRG.Tensors;
using TensorRG.Tensors.Decompositions;

namespace TensorRG.CoarseGraining.Loop;

/// <summary>
/// All eight pieces at once: (J^H J + mu) V = gradient by preconditioned conjugate gradients, mu by success (K. Levenberg 1944; D. W. Marquardt 1963).
/// </summary>
internal sealed class GaussNewton<T>(TensorAlgebra<T> algebra, LoopOptimizer<T> loop)
    where T : unmanaged, INumberBase<T>
{
    public static double Forcing = 0.1;
    public static int InnerMax = 40;
    private readonly Tensor<T>?[] _left = new Tensor<T>?[8], _right = new Tensor<T>?[8];
    private readonly Tensor<T>[] _environment = new Tensor<T>[8];
    private readonly TruncatedEigen<T>[] _eigen = new TruncatedEigen<T>[8];
    private double _mu = 1e-3;
    private double _scale;

    public int Inner { get; private set; }
    public double Mu => _mu;

    public double Advance(double cost)
    {
        Tensor<T>[] before = [.. loop.Pieces];
        Tensor<T>[] gradient = Prepare();
        for (int attempt = 0; attempt < 6; attempt++)
        {
            Tensor<T>[] step = Solve(gradient);
            loop.Reset(Blocks.Combine(before, step, 1));
            double next = loop.Cost();
            if (next < cost)
            {
                _mu = Math.Max(_mu * (attempt == 0 ? 0.2 : 0.7), 1e-13);
                return next;
            }

            _mu *= 5;
        }

        loop.Reset(before);
        return cost;
    }

    private Tensor<T>[] Prepare()
    {
        for (int k = 0; k < 8; k++)
            _left[k] = k == 0 ? null : k == 1 ? loop.OwnOf(0) : loop.Product(_left[k - 1]!, loop.OwnOf(k - 1));
        for (int k = 7; k >= 0; k--)
            _right[k] = k == 7 ? null : k == 6 ? loop.OwnOf(7) : loop.Product(loop.OwnOf(k + 1), _right[k + 1]!);
        Tensor<T>[] mixed = loop.MixedEnvironments();
        var gradient = new Tensor<T>[8];
        _scale = 0;
        for (int k = 0; k < 8; k++)
        {
            _environment[k] = loop.Join(_right[k], _left[k]);
            using Tensor<T> w = loop.Right(k, mixed[k / 2]);
            using Tensor<T> ns = loop.Applied(_environment[k], loop.Pieces[k]);
            gradient[k] = TensorAlgebra<T>.Add(w, ns, -T.One);
            using Tensor<T> matrix = _environment[k].Permute(3, 1, 2, 0);
            _eigen[k] = GradedEigen.Compute(algebra.Kernels, matrix, new CutRule(int.MaxValue, 0, 1e-15));
            _scale = Math.Max(_scale, _eigen[k].Values.Largest);
        }

        return gradient;
    }

    private Tensor<T>[] Solve(Tensor<T>[] gradient)
    {
        double mu = _mu * _scale;
        Tensor<T>[] r = gradient, z = Precondition(r, mu), p = z;
        Tensor<T>[] x = Blocks.Scale(p, 0);
        double rz = Blocks.Dot(r, z), first = rz;
        for (int n = 0; n < InnerMax && rz > Forcing * Forcing * first; n++)
        {
            Tensor<T>[] ap = Blocks.Combine(Hessian(p), p, mu);
            double alpha = rz / Blocks.Dot(p, ap);
            x = Blocks.Combine(x, p, alpha);
            r = Blocks.Combine(r, ap, -alpha);
            z = Precondition(r, mu);
            double next = Blocks.Dot(r, z);
            p = Blocks.Combine(z, p, next / rz);
            rz = next;
            Inner++;
        }

        return x;
    }

    private Tensor<T>[] Precondition(Tensor<T>[] r, double mu)
    {
        var z = new Tensor<T>[8];
        for (int k = 0; k < 8; k++)
        {
            using Tensor<T> dual = _eigen[k].Vectors.Conjugate();
            using Tensor<T> inner = algebra.Contract(dual, [0, 1], r[k], [0, 2]);
            using Tensor<T> scaled = TensorAlgebra<T>.ScaleLeg(inner, 0, new BondWeights(_eigen[k].Values.Leg, [.. _eigen[k].Values.Values.Select(v => Array.ConvertAll(v, e => e / (e + mu)))]));
            using Tensor<T> back = algebra.Contract(_eigen[k].Vectors, [2], scaled, [0]);
            using Tensor<T> ordered = back.Permute(0, 2, 1);
            using Tensor<T> rest = TensorAlgebra<T>.Add(r[k], ordered, -T.One);
            z[k] = TensorAlgebra<T>.Scale(rest, Scalar.FromReal<T>(1 / mu));
        }

        return z;
    }

    private Tensor<T>[] Hessian(Tensor<T>[] v)
    {
        var d = new Tensor<T>[8];
        for (int k = 0; k < 8; k++)
            d[k] = loop.Transfer(v[k], loop.Pieces[k]);
        var dl = new Tensor<T>?[8];
        var dr = new Tensor<T>?[8];
        for (int k = 1; k < 8; k++)
            dl[k] = k == 1 ? d[0] : Sum(loop.Product(dl[k - 1]!, loop.OwnOf(k - 1)), loop.Product(_left[k - 1]!, d[k - 1]));
        for (int k = 6; k >= 0; k--)
            dr[k] = k == 6 ? d[7] : Sum(loop.Product(loop.OwnOf(k + 1), dr[k + 1]!), loop.Product(d[k + 1], _right[k + 1]!));
        var h = new Tensor<T>[8];
        for (int k = 0; k < 8; k++)
        {
            using Tensor<T> change = k == 0 ? dr[0]!.Clone() : k == 7 ? dl[7]!.Clone() : Sum(loop.Product(_right[k]!, dl[k]!), loop.Product(dr[k]!, _left[k]!));
            using Tensor<T> other = loop.Applied(change, loop.Pieces[k]);
            using Tensor<T> own = loop.Applied(_environment[k], v[k]);
            h[k] = TensorAlgebra<T>.Add(other, own, T.One);
        }

        return h;
    }

    private static Tensor<T> Sum(Tensor<T> a, Tensor<T> b)
    {
        Tensor<T> sum = TensorAlgebra<T>.Add(a, b, T.One);
        a.Dispose();
        b.Dispose();
        return sum;
    }
}
