using System.Numerics;

namespace TensorRG.CoarseGraining.Moments;

/// <summary>Binomial coefficients, and what a shift of the observable does to its moments.</summary>
internal static class Binomial
{
    /// <summary>n! / (k! (n - k)!).</summary>
    public static double Of(int n, int k)
    {
        double value = 1;
        for (int i = 1; i <= k; i++)
            value = value * (n - k + i) / i;
        return value;
    }

    /// <summary>Moments of O + shift from those of O: sum_k binom(n, k) shift^(n-k) &lt;O^k&gt;, n = 1 .. order.</summary>
    /// <param name="moments">Moments of O, n = 1 .. order.</param>
    /// <param name="shift">What is added to O.</param>
    public static Complex[] Shift(ReadOnlySpan<Complex> moments, Complex shift)
    {
        var result = new Complex[moments.Length];
        for (int n = 1; n <= moments.Length; n++)
        {
            // Horner in the shift: binom(n, 0) shift^n + binom(n, 1) shift^(n-1) m_1 + ...
            Complex sum = Complex.One;
            for (int k = 1; k <= n; k++)
                sum = (sum * shift) + (Of(n, k) * moments[k - 1]);
            result[n - 1] = sum;
        }

        return result;
    }
}
