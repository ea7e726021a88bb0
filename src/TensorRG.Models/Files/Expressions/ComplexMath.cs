using System.Numerics;

namespace TensorRG.Models.Files.Expressions;

/// <summary>
/// Elementary functions that stay real, to the bits of <see cref="Math"/>, for real arguments in the real domain. On a branch cut
/// they take the principal value with the argument from above: sqrt(-1) = i, ln(-1) = i pi.
/// </summary>
internal static class ComplexMath
{
    /// <summary>Square root, principal branch.</summary>
    public static Complex Sqrt(Complex z) => !IsReal(z)
        ? Complex.Sqrt(z)
        : z.Real >= 0 ? Math.Sqrt(z.Real) : new Complex(0, Math.Sqrt(-z.Real));

    /// <summary>Exponential.</summary>
    public static Complex Exp(Complex z) => IsReal(z) ? Math.Exp(z.Real) : Complex.Exp(z);

    /// <summary>Natural logarithm, principal branch.</summary>
    public static Complex Log(Complex z) => !IsReal(z)
        ? Complex.Log(z)
        : z.Real >= 0 ? Math.Log(z.Real) : new Complex(Math.Log(-z.Real), Math.PI);

    /// <summary>Logarithm to base 10, principal branch.</summary>
    public static Complex Log10(Complex z) => IsReal(z) && z.Real >= 0 ? Math.Log10(z.Real) : Log(z) / Math.Log(10);

    /// <summary>Sine.</summary>
    public static Complex Sin(Complex z) => IsReal(z) ? Math.Sin(z.Real) : Complex.Sin(z);

    /// <summary>Cosine.</summary>
    public static Complex Cos(Complex z) => IsReal(z) ? Math.Cos(z.Real) : Complex.Cos(z);

    /// <summary>Tangent.</summary>
    public static Complex Tan(Complex z) => IsReal(z) ? Math.Tan(z.Real) : Complex.Tan(z);

    /// <summary>Arc sine.</summary>
    public static Complex Asin(Complex z) => IsReal(z) && Math.Abs(z.Real) <= 1 ? Math.Asin(z.Real) : Complex.Asin(z);

    /// <summary>Arc cosine.</summary>
    public static Complex Acos(Complex z) => IsReal(z) && Math.Abs(z.Real) <= 1 ? Math.Acos(z.Real) : Complex.Acos(z);

    /// <summary>Arc tangent.</summary>
    public static Complex Atan(Complex z) => IsReal(z) ? Math.Atan(z.Real) : Complex.Atan(z);

    /// <summary>Hyperbolic sine.</summary>
    public static Complex Sinh(Complex z) => IsReal(z) ? Math.Sinh(z.Real) : Complex.Sinh(z);

    /// <summary>Hyperbolic cosine.</summary>
    public static Complex Cosh(Complex z) => IsReal(z) ? Math.Cosh(z.Real) : Complex.Cosh(z);

    /// <summary>Hyperbolic tangent.</summary>
    public static Complex Tanh(Complex z) => IsReal(z) ? Math.Tanh(z.Real) : Complex.Tanh(z);

    /// <summary>Inverse hyperbolic sine, ln(z + sqrt(z^2 + 1)).</summary>
    public static Complex Asinh(Complex z) => IsReal(z) ? Math.Asinh(z.Real) : Log(z + Sqrt((z * z) + 1));

    /// <summary>Inverse hyperbolic cosine, ln(z + sqrt(z + 1) sqrt(z - 1)).</summary>
    public static Complex Acosh(Complex z) => IsReal(z) && z.Real >= 1 ? Math.Acosh(z.Real) : Log(z + (Sqrt(z + 1) * Sqrt(z - 1)));

    /// <summary>Inverse hyperbolic tangent, (ln(1 + z) - ln(1 - z)) / 2.</summary>
    public static Complex Atanh(Complex z) => IsReal(z) && Math.Abs(z.Real) < 1 ? Math.Atanh(z.Real) : (Log(1 + z) - Log(1 - z)) / 2;

    /// <summary>a - b floor(a / b): the remainder with the sign of b; NaN for b = 0.</summary>
    public static double Mod(double a, double b)
    {
        double rest = Math.IEEERemainder(a, b);
        return rest != 0 && (rest < 0) != (b < 0) ? rest + b : rest;
    }

    /// <summary>a^b, principal branch; 0^0 = 1; infinite for zero to a negative power. Whole powers of complex numbers are products.</summary>
    public static Complex Pow(Complex a, Complex b)
    {
        bool whole = IsReal(b) && b.Real == Math.Floor(b.Real);
        if (IsReal(a) && IsReal(b) && (a.Real >= 0 || whole))
            return Math.Pow(a.Real, b.Real);
        if (whole && Math.Abs(b.Real) <= 64)
            return b.Real >= 0 ? Product(a, (int)b.Real) : 1 / Product(a, (int)-b.Real);
        return a == 0 ? (b.Real > 0 ? 0 : Complex.Infinity) : Exp(b * Log(a));
    }

    private static Complex Product(Complex a, int power)
    {
        Complex product = 1;
        for (; power > 0; power >>= 1)
        {
            if (power % 2 == 1)
                product *= a;
            a *= a;
        }
        return product;
    }

    private static bool IsReal(Complex z) => z.Imaginary == 0;
}
