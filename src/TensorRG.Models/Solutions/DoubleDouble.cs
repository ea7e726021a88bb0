namespace TensorRG.Models.Solutions;

/// <summary>
/// An unevaluated sum of two doubles, about 31 digits: just enough arithmetic to tell how far a coupling is from its
/// critical value when the difference is below the rounding of a double (algorithms of T. J. Dekker, Numer. Math. 18, 224, 1971).
/// </summary>
internal readonly struct DoubleDouble
{
    private static readonly DoubleDouble Ln2 = new(0.693147180559945309417232121458, 2.3190468138462996e-17);

    private DoubleDouble(double high, double low)
    {
        High = high;
        Low = low;
    }

    /// <summary>The sum rounded to a double.</summary>
    public double High { get; }

    /// <summary>The rest.</summary>
    public double Low { get; }

    public static implicit operator DoubleDouble(double value) => new(value, 0);

    public static DoubleDouble operator +(DoubleDouble a, DoubleDouble b)
    {
        DoubleDouble high = TwoSum(a.High, b.High), low = TwoSum(a.Low, b.Low);
        DoubleDouble sum = FastTwoSum(high.High, high.Low + low.High);
        return FastTwoSum(sum.High, sum.Low + low.Low);
    }

    public static DoubleDouble operator -(DoubleDouble a, DoubleDouble b) => a + new DoubleDouble(-b.High, -b.Low);

    public static DoubleDouble operator *(DoubleDouble a, DoubleDouble b)
    {
        double p = a.High * b.High;
        double error = Math.FusedMultiplyAdd(a.High, b.High, -p) + ((a.High * b.Low) + (a.Low * b.High));
        return FastTwoSum(p, error);
    }

    public static DoubleDouble operator /(DoubleDouble a, DoubleDouble b)
    {
        double first = a.High / b.High;
        DoubleDouble rest = a - (b * first);
        double second = rest.High / b.High;
        rest -= b * second;
        return FastTwoSum(first, second) + (rest.High / b.High);
    }

    /// <summary>sinh x for |x| &lt; 700, relative error about 1e-30.</summary>
    public static DoubleDouble Sinh(DoubleDouble x)
    {
        if (Math.Abs(x.High) < 0.5)
            return SinhSeries(x);
        DoubleDouble e = Exp(x);
        return (e - (1.0 / e)) * 0.5;
    }

    /// <summary>exp x for |x| &lt; 700, relative error about 1e-30.</summary>
    public static DoubleDouble Exp(DoubleDouble x)
    {
        double k = Math.Round(x.High / Ln2.High);
        DoubleDouble r = x - (Ln2 * k), term = 1, sum = 1;
        for (int n = 1; n < 30; n++)
        {
            term = term * r / n;
            sum += term;
        }
        double scale = Math.ScaleB(1, (int)k);
        return new DoubleDouble(sum.High * scale, sum.Low * scale);
    }

    private static DoubleDouble SinhSeries(DoubleDouble x)
    {
        DoubleDouble square = x * x, term = x, sum = x;
        for (int n = 2; n < 30; n += 2)
        {
            term = term * square / (n * (n + 1.0));
            sum += term;
        }
        return sum;
    }

    private static DoubleDouble TwoSum(double a, double b)
    {
        double s = a + b, t = s - a;
        return new DoubleDouble(s, (a - (s - t)) + (b - t));
    }

    // Exact for |a| >= |b|.
    private static DoubleDouble FastTwoSum(double a, double b)
    {
        double s = a + b;
        return new DoubleDouble(s, b - (s - a));
    }
}
