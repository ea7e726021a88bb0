namespace TensorRG.Models;

/// <summary>Elementary functions that keep their relative accuracy near zero and do not overflow, to a few units in the last place.</summary>
internal static class Elementary
{
    /// <summary>exp(x) - 1 (W. Kahan's correction of the rounded exponential; common practice).</summary>
    public static double ExpM1(double x)
    {
        double u = Math.Exp(x);
        if (u == 1)
            return x;
        double difference = u - 1;
        if (difference == -1 || double.IsInfinity(u))
            return difference;
        return difference * x / Math.Log(u);
    }

    /// <summary>ln(1 + x) for x &gt;= -1 (W. Kahan's correction of the rounded sum; common practice).</summary>
    public static double Log1P(double x)
    {
        double u = 1 + x;
        if (u == 1)
            return x;
        return double.IsInfinity(u) ? u : Math.Log(u) * x / (u - 1);
    }

    /// <summary>ln cosh x for any x.</summary>
    public static double LogCosh(double x)
    {
        double a = Math.Abs(x);
        if (a > 1)
            return a + Log1P(Math.Exp(-2 * a)) - Constants.Ln2;
        double s = Math.Sinh(a / 2);
        return Log1P(2 * s * s);
    }
}
