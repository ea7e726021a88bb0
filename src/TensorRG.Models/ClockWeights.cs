namespace TensorRG.Models;

/// <summary>
/// Eigenvalues lambda_k = sum_n exp(K cos(2 pi n / q)) cos(2 pi k n / q), k = 0..q-1, of the clock model's pair weight.
/// The largest is lambda_0. Small eigenvalues keep their relative accuracy where that is possible: for K &gt; 0, and for
/// even q, up to |K| = q^2 they are summed as lambda_k = q sum_m I_m(K) over m = k mod q (I_m the modified Bessel
/// functions), which has no cancellation.
/// </summary>
/// <param name="Ratios">lambda_k / lambda_0.</param>
/// <param name="LogLargest">ln lambda_0.</param>
internal sealed record ClockWeights(double[] Ratios, double LogLargest)
{
    /// <summary>The eigenvalues for q states at coupling K = J / T.</summary>
    public static ClockWeights At(int q, double coupling)
    {
        double size = Math.Abs(coupling);
        bool bessel = coupling < 0 && q % 2 == 1 ? size <= 1 : size <= q * (double)q;
        double[] lambda = bessel ? FromBessel(q, coupling) : FromSum(q, coupling, Peak(q, coupling));
        double shift = bessel ? size : Peak(q, coupling);
        return new ClockWeights([.. lambda.Select(x => x / lambda[0])], Math.Log(lambda[0]) + shift);
    }

    // The largest exponent K cos: taken out of every weight.
    private static double Peak(int q, double coupling)
        => coupling >= 0 ? coupling : coupling * Cosine(q / 2, q);

    // The same bits for n and q - n, so that equal weights stay equal however large K is.
    private static double Cosine(int n, int q) => Math.Cos(2 * Math.PI * Math.Min(n % q, q - (n % q)) / q);

    private static double[] FromSum(int q, double coupling, double peak)
    {
        double[] weight = [.. Enumerable.Range(0, q).Select(n => Math.Exp((coupling * Cosine(n, q)) - peak))];
        return [.. Enumerable.Range(0, q).Select(k => weight.Select((w, n) => w * Cosine(k * n, q)).Sum())];
    }

    private static double[] FromBessel(int q, double coupling)
    {
        double[] bessel = ScaledBessel(Math.Abs(coupling), 3 * q);
        var lambda = new double[q];
        // I_-m = I_m: every order m > 0 stands for both signs. Smallest terms first.
        for (int m = bessel.Length - 1; m >= 0; m--)
        {
            double term = q * (coupling < 0 && m % 2 == 1 ? -bessel[m] : bessel[m]);
            lambda[m % q] += term;
            if (m > 0)
                lambda[(q - (m % q)) % q] += term;
        }
        return lambda;
    }

    // exp(-x) I_m(x), m = 0, 1, ..., by the backward recurrence I_(m-1) = I_(m+1) + (2m/x) I_m, normalised with
    // I_0 + 2 sum I_m = exp(x) (J. C. P. Miller; Abramowitz and Stegun, section 9.12).
    private static double[] ScaledBessel(double x, int orders)
    {
        int start = orders + 40 + (int)(9 * Math.Sqrt(x));
        var values = new double[start + 1];
        if (x < 1e-30)
        {
            (values[0], values[1]) = (1, x / 2);
            return values;
        }
        double above = 0, current = 1e-300, sum = 0;
        for (int m = start; m > 0; m--)
        {
            values[m] = current;
            sum += 2 * current;
            (above, current) = (current, above + (2 * m / x * current));
            if (current > 1e200)
                Rescale(values, m, ref above, ref current, ref sum);
        }
        values[0] = current;
        sum += current;
        return [.. values.Select(v => v / sum)];
    }

    // What underflows here is below 1e-200 of what is still to come.
    private static void Rescale(double[] values, int from, ref double above, ref double current, ref double sum)
    {
        double factor = 1 / current;
        for (int m = from; m < values.Length; m++)
            values[m] *= factor;
        (above, current, sum) = (above * factor, 1, sum * factor);
    }
}
