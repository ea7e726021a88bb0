using TensorRG.Tensors;

namespace TensorRG.Models.Solutions;

/// <summary>
/// The six-vertex model without fields, ln of the partition function per vertex, in all its phases: E. H. Lieb, Phys. Rev.
/// 162, 162 (1967), Phys. Rev. Lett. 18, 692, 1046 and 19, 108 (1967); in the notation of R. J. Baxter, "Exactly Solved
/// Models in Statistical Mechanics" (1982), chapter 8. With a &gt;= b (the partition function is symmetric in them):
/// frozen, a &gt;= b + c: ln a;
/// critical, |a - b| &lt; c &lt;= a + b: ln a + int_0^inf sinh((mu + w)x) sinh((pi - mu)x) / (x sinh(pi x) cosh(mu x)) dx;
/// antiferroelectric, c &gt; a + b: ln a + (lambda + v)/2 + sum_(m &gt;= 1) exp(-m lambda) sinh(m (lambda + v)) / (m cosh(m lambda)).
/// </summary>
internal static class SixVertexSolution
{
    public const string Source = "E. H. Lieb, Phys. Rev. 162, 162 (1967); R. J. Baxter, Exactly Solved Models in Statistical Mechanics (1982), ch. 8";

    // Below this lambda the sum is taken by the Euler-Maclaurin formula, whose first neglected term is lambda^4 / 720.
    private const double SmallLambda = 1e-4;

    /// <summary>The value for positive weights.</summary>
    public static ExactValue LogZPerVertex(double a, double b, double c)
    {
        if (a < b)
            (a, b) = (b, a);
        (double rest, string note) = (a - b >= c, c > a + b) switch
        {
            (true, _) => (0.0, "frozen phase, Delta >= 1: ln of the larger of a and b"),
            (_, true) => (Antiferroelectric(a, b, c), "antiferroelectric phase, Delta < -1: a sum"),
            _ => (Critical(a, b, c), "critical phase, -1 <= Delta < 1: an integral by double-exponential quadrature"),
        };
        double value = Math.Log(a) + rest;
        return new ExactValue(value, 8 * Constants.Epsilon * Math.Max(1, Math.Abs(Math.Log(a)) + rest), Source, note);
    }

    // cos mu = -Delta; mu, sigma = (mu + w)/2 and pi - mu follow from the triangle with sides a, b, c.
    private static double Critical(double a, double b, double c)
    {
        double area = Math.Sqrt((a + b - c) * (a + b + c) * (c - (a - b)) * (c + a - b));
        double mu = 2 * Math.Atan2(Math.Sqrt((a + b - c) * (a + b + c)), Math.Sqrt((c - (a - b)) * (c + a - b)));
        double nu = 2 * Math.Atan2(Math.Sqrt((c - (a - b)) * (c + a - b)), Math.Sqrt((a + b - c) * (a + b + c)));
        double sigma = Math.Atan2(area, (c * c) + ((a - b) * (a + b)));
        return mu == 0 ? Integral(2 * b / (a + b), 0, nu) : Integral(2 * sigma / mu, mu, nu);
    }

    // In y = mu x: int_0^inf sinh(rho y) exp(-y) / (y cosh y) * (1 - exp(-2 nu y/mu)) / (1 - exp(-2 pi y/mu)) dy.
    private static double Integral(double rho, double mu, double nu) => HalfLine.Integral(y =>
    {
        double decay = Math.Exp((rho - 2) * y) * -Elementary.ExpM1(-2 * rho * y) / (1 + Math.Exp(-2 * y));
        double ratio = mu == 0 ? 1 : Elementary.ExpM1(-2 * nu * y / mu) / Elementary.ExpM1(-2 * Math.PI * y / mu);
        return decay * ratio / y;
    });

    private static double Antiferroelectric(double a, double b, double c)
    {
        double lambda = 2 * Math.Asinh(Math.Sqrt((c - a - b) / a * ((c + a + b) / b)) / 2);
        double s = Elementary.Log1P(b * Elementary.ExpM1(2 * lambda) / ((a * Math.Exp(lambda)) + b));
        double rho = s / lambda;
        return lambda < SmallLambda
            ? Integral(rho, 0, Math.PI) + (rho * lambda * lambda / 12)
            : (s / 2) + Sum(lambda, rho);
    }

    // Smallest terms first.
    private static double Sum(double lambda, double rho)
    {
        CompensatedSum sum = default;
        for (int m = (int)(40 / lambda) + 2; m > 0; m--)
        {
            double x = m * lambda;
            sum.Add(Math.Exp((rho - 2) * x) * -Elementary.ExpM1(-2 * rho * x) / ((1 + Math.Exp(-2 * x)) * m));
        }
        return sum.Value;
    }
}
