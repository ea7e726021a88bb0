using System.Numerics;
using TensorRG.Tensors;

namespace TensorRG.CoarseGraining.Loop;

/// <summary>ln |Z| of a chain of blocks of two by two tensors, closed on itself in both directions.</summary>
internal static class BlockTorus
{
    /// <summary>ln|Tr M^n| with n = 2^doublings over n, horizontally and vertically.</summary>
    public static double Before<T>(TensorAlgebra<T> algebra, Tensor<T> a, Tensor<T> b, int doublings)
        where T : unmanaged, INumberBase<T>
    {
        double sum = 0;
        foreach ((int p, int q) in ((int, int)[])[(1, 3), (0, 2)])
        {
            using Tensor<T> upper = algebra.Contract(a, [p, q], b, [q, p]), lower = algebra.Contract(b, [p, q], a, [q, p]);
            using Tensor<T> m = algebra.Contract(upper, [1, 3], lower, [0, 2]); // [ua, ub, dB, dA]
            sum += 0.5 * LogTrace(algebra, m, doublings);
        }

        return sum;
    }

    public static double After<T>(TensorAlgebra<T> algebra, Tensor<T> x, Tensor<T> y, int doublings)
        where T : unmanaged, INumberBase<T>
    {
        using Tensor<T> up = algebra.Contract(x, [1, 2], y, [3, 0]);  // [Xu, Xr, Yl, Yd]
        using Tensor<T> upOrdered = up.Permute(0, 1, 3, 2);
        using Tensor<T> side = algebra.Contract(x, [3, 2], y, [1, 0]); // [Xu, Xl, Yd, Yr]
        return 0.5 * (LogTrace(algebra, upOrdered, doublings) + LogTrace(algebra, side, doublings));
    }

    private static double LogTrace<T>(TensorAlgebra<T> algebra, Tensor<T> m, int doublings)
        where T : unmanaged, INumberBase<T>
    {
        double log = 0, n = 1;
        for (int i = 0; i < doublings; i++)
        {
            double norm = TensorAlgebra<T>.Norm(m);
            log += Math.Log(norm) / n;
            m = TensorAlgebra<T>.Scale(m, Scalar.FromReal<T>(1 / norm));
            m = algebra.Contract(m, [2, 3], m, [0, 1]);
            n *= 2;
        }

        return log + (Math.Log(Scalar.Magnitude(TensorAlgebra<T>.Trace(m, [0, 1], [2, 3]).Elements[0])) / n);
    }
}
