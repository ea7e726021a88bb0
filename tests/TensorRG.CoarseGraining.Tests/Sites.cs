using System.Numerics;
using TensorRG.Tensors;

namespace TensorRG.CoarseGraining.Tests;

/// <summary>Site tensors of known models, made here from their definition.</summary>
internal static class Sites
{
    /// <summary>K_c = ln(1 + sqrt 2) / 2.</summary>
    public static readonly double CriticalCoupling = Math.Log(1 + Math.Sqrt(2)) / 2;

    /// <summary>
    /// The square Ising model in the even/odd basis: exp(K s s') = sum_k lambda_k(s) lambda_k(s') with sqrt(cosh K) and
    /// s sqrt(sinh K), so A[u,l,d,r] = 2 product of the roots if the number of odd legs is even, else 0.
    /// </summary>
    public static Tensor<double> Ising(double coupling, bool graded = true)
    {
        double[] root = [Math.Sqrt(Math.Cosh(coupling)), Math.Sqrt(Math.Sinh(coupling))];
        Leg leg = graded
            ? new Leg(AbelianGroup.Cyclic(2), Arrow.In, [new Sector(new Charge(0), 1), new Sector(new Charge(1), 1)])
            : Leg.Plain(2, Arrow.In);
        return Tensor<double>.FromFunction([leg, leg, leg.Dual, leg.Dual], p =>
        {
            int odd = 0;
            double product = 2;
            foreach (int state in p.Span)
                (odd, product) = (odd + state, product * root[state]);
            return odd % 2 == 0 ? product : 0;
        });
    }

    /// <summary>The same elements without grading.</summary>
    public static Tensor<T> Ungraded<T>(Tensor<T> site)
        where T : unmanaged, INumberBase<T>
        => Tensor<T>.FromFunction(site.Legs.Select(static leg => Leg.Plain(leg.Dimension, leg.Arrow)), p => site.At(p.Span));

    /// <summary>The same elements as complex numbers.</summary>
    public static Tensor<Complex> ToComplex(Tensor<double> site)
        => Tensor<Complex>.FromFunction(site.Legs, p => site.At(p.Span));
}
