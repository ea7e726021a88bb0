using TensorRG.Tensors;

namespace TensorRG.Models.Solutions;

/// <summary>
/// The eight-vertex model without fields, ln of the partition function per vertex, for weights that are not negative (R. J. Baxter, Ann. Phys. 70, 193, 1972;
/// "Exactly Solved Models in Statistical Mechanics" (1982), chapter 10). The partition function does not change when (a+b)/2, (a-b)/2, (c+d)/2,
/// (c-d)/2 are permuted or change sign; in descending order of size W1..W4 they give the region c &gt;= a + b + d, c = W1 + W2, d = W1 - W2, a, b = W3 +- W4. There
/// a : b : c : d = snh(L - u) : snh u : snh L : k snh L snh u snh(L - u), snh u = -i sn(iu, k), and with
/// q = exp(-pi K'/K), x = exp(-pi L/2K), z = exp(-pi (2u - L)/2K):
/// ln kappa = ln c + sum_(m >= 1) x^-m (x^2m - q^m)^2 (x^m + x^-m - z^m - z^-m) / (m (1 - q^2m) (1 + x^2m)).
/// </summary>
internal static class EightVertexSolution
{
    public const string Source = "R. J. Baxter, Phys. Rev. Lett. 26, 832 (1971), Ann. Phys. 70, 193 (1972)";

    // Steps of less than this need more terms than the sum is worth: all of W1, W2, W3 are then equal to 1e-9.
    private const double SmallestStep = 2e-5;

    /// <summary>The value for weights that are not negative.</summary>
    public static ExactValue LogZPerVertex(double a, double b, double c, double d)
    {
        double[] w = [(a + b) / 2, Math.Abs(a - b) / 2, (c + d) / 2, Math.Abs(c - d) / 2];
        Array.Sort(w);
        (double w1, double w2, double w3, double w4) = (w[3], w[2], w[1], w[0]);
        if (w3 == w4)
            return Value(Math.Log(w1 + w2), 1, "frozen, or weights with b = 0 after the symmetries: ln of the largest");
        if (w1 == w2 || w2 == w3)
            return SixVertex(w1, w2, w3, w4);
        (double k, double complement) = Modulus(w1, w2, w3, w4);
        double quarter = Math.PI / (2 * Mean(1, complement)), other = Math.PI / (2 * Mean(1, k));
        double tangent = Math.Sqrt((w1 + w2) * (w1 - w2) / ((w3 + w4) * (w3 - w4) * k));
        double u = Elliptic(tangent * (w3 - w4) / (w1 + w2), k), rest = Elliptic(tangent * (w3 + w4) / (w1 + w2), k);
        double x = Math.PI * (u + rest) / (2 * quarter), nome = Math.PI * other / quarter, z = Math.PI * (u - rest) / (2 * quarter);
        if (x < SmallestStep)
            return SixVertex(w1, w2, w2, w4) with { Uncertainty = 1e-8 };
        return Value(Math.Log(w1 + w2) + Sum(x, nome, Math.Abs(z)), 2, "the sum in the region c > a + b + d, reached by the symmetries");
    }

    // Two equal among the four make d = 0: a, b from the other two.
    private static ExactValue SixVertex(double w1, double w2, double w3, double w4)
    {
        ExactValue value = w2 == w3
            ? SixVertexSolution.LogZPerVertex(w1 + w4, w1 - w4, 2 * w2)
            : SixVertexSolution.LogZPerVertex(w3 + w4, w3 - w4, 2 * w1);
        return value with { Source = Source, Note = $"critical, or without d: the six-vertex model; {value.Note}" };
    }

    // (1 -+ k)^2 / k as products of linear forms, so that both k and its complement keep their precision.
    private static (double K, double Complement) Modulus(double w1, double w2, double w3, double w4)
    {
        double abcd = (w3 - w4) * (w3 + w4) * (w1 - w2) * (w1 + w2);
        double minus = 4 * (w1 - w4) * (w1 + w4) * (w2 - w3) * (w2 + w3) / abcd;
        double plus = 4 * (w1 - w3) * (w1 + w3) * (w2 - w4) * (w2 + w4) / abcd;
        double root = 2 / (Math.Sqrt(minus) + Math.Sqrt(plus)), k = root * root;
        return (k, Math.Sqrt(k * Math.Sqrt(minus * plus)));
    }

    // Arithmetic-geometric mean.
    private static double Mean(double a, double b)
    {
        while (Math.Abs(a - b) > 2 * Constants.Epsilon * a)
            (a, b) = ((a + b) / 2, Math.Sqrt(a * b));
        return (a + b) / 2;
    }

    // u with snh u = t: t R_F(1, 1 + k^2 t^2, 1 + t^2), by Carlson's duplication (B. C. Carlson, Numer. Math. 33, 1, 1979).
    private static double Elliptic(double t, double k)
    {
        double x = 1 / (1 + (t * t)), y = (1 + (k * t * k * t)) / (1 + (t * t)), z = 1, mean = (x + y + z) / 3;
        double scale = t / Math.Sqrt(1 + (t * t));
        while (Math.Max(Math.Abs(x - mean), Math.Max(Math.Abs(y - mean), Math.Abs(z - mean))) > 1e-3 * mean)
        {
            double step = Math.Sqrt(x * y) + Math.Sqrt(y * z) + Math.Sqrt(z * x);
            (x, y, z) = ((x + step) / 4, (y + step) / 4, (z + step) / 4);
            mean = (x + y + z) / 3;
        }
        double dx = 1 - (x / mean), dy = 1 - (y / mean), dz = -(dx + dy);
        double e2 = (dx * dy) - (dz * dz), e3 = dx * dy * dz;
        double series = 1 - (e2 / 10) + (e3 / 14) + (e2 * e2 / 24) - (3 * e2 * e3 / 44) - (5 * e2 * e2 * e2 / 208) + (3 * e3 * e3 / 104);
        return scale * series / Math.Sqrt(mean);
    }

    // Exponents of 1/x, 1/q and 1/z; smallest terms first, all factors in forms that do not cancel:
    // exp(-2xm) (1 - exp(-(q-2x)m))^2 (1 - exp(-(x+z)m)) (1 - exp(-(x-z)m)) / (m (1 - exp(-2qm)) (1 + exp(-2xm))).
    private static double Sum(double x, double q, double z)
    {
        CompensatedSum sum = default;
        for (int m = (int)(20 / x) + 2; m > 0; m--)
        {
            double gap = -Elementary.ExpM1((2 * x - q) * m), sides = Elementary.ExpM1(-(x + z) * m) * Elementary.ExpM1(-(x - z) * m);
            sum.Add(Math.Exp(-2 * x * m) * gap * gap * sides / (m * -Elementary.ExpM1(-2 * q * m) * (1 + Math.Exp(-2 * x * m))));
        }
        return sum.Value;
    }

    private static ExactValue Value(double value, double scale, string note)
        => new(value, 32 * Constants.Epsilon * Math.Max(scale, Math.Abs(value)), Source, note);
}
