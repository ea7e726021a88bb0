using System.Globalization;
using System.Numerics;

namespace TensorRG.Cli.Explanations;

/// <summary>Numbers of tables for people: six digits, complex ones as a+bi.</summary>
internal static class ComplexText
{
    public static string Of(double value) => (value == 0 ? 0 : value).ToString("G6", CultureInfo.InvariantCulture).Replace("E", "e", StringComparison.Ordinal);

    public static string Of(Complex value)
    {
        if (value.Imaginary == 0)
            return Of(value.Real);
        string imaginary = Of(value.Imaginary) + "i";
        return value.Real == 0 ? imaginary : Of(value.Real) + (value.Imaginary < 0 ? "" : "+") + imaginary;
    }

    /// <summary>A value of a table; "x" where it is excluded.</summary>
    public static string Of(Complex? value) => value is { } number ? Of(number) : "x";
}
