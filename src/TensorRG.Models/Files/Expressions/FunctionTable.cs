using System.Numerics;

namespace TensorRG.Models.Files.Expressions;

/// <summary>The functions and fixed names of the expression language.</summary>
internal static class FunctionTable
{
    /// <summary>Arguments that min and max take at most.</summary>
    public const int MostArguments = 100;

    private static readonly Dictionary<string, Function> Functions = new Function[]
    {
        Complex("sqrt", ComplexMath.Sqrt),
        Complex("exp", ComplexMath.Exp),
        Complex("ln", ComplexMath.Log),
        Complex("log10", ComplexMath.Log10),
        Complex("sin", ComplexMath.Sin),
        Complex("cos", ComplexMath.Cos),
        Complex("tan", ComplexMath.Tan),
        Complex("asin", ComplexMath.Asin),
        Complex("acos", ComplexMath.Acos),
        Complex("atan", ComplexMath.Atan),
        Complex("sinh", ComplexMath.Sinh),
        Complex("cosh", ComplexMath.Cosh),
        Complex("tanh", ComplexMath.Tanh),
        Complex("asinh", ComplexMath.Asinh),
        Complex("acosh", ComplexMath.Acosh),
        Complex("atanh", ComplexMath.Atanh),
        Complex("abs", static z => z.Imaginary == 0 ? Math.Abs(z.Real) : System.Numerics.Complex.Abs(z)),
        Complex("re", static z => z.Real),
        Complex("im", static z => z.Imaginary),
        Complex("conj", System.Numerics.Complex.Conjugate),
        Complex("arg", static z => Math.Atan2(z.Imaginary == 0 ? 0 : z.Imaginary, z.Real)),
        Real("sign", static x => Math.Sign(x)),
        Real("floor", Math.Floor),
        Real("ceil", Math.Ceiling),
        Real("round", static x => Math.Round(x, MidpointRounding.AwayFromZero)),
        new("mod", 2, 2, true) { Two = static (a, b) => ComplexMath.Mod(a.Real, b.Real) },
        new("min", 1, MostArguments, true) { One = static a => a, Two = static (a, b) => Math.Min(a.Real, b.Real) },
        new("max", 1, MostArguments, true) { One = static a => a, Two = static (a, b) => Math.Max(a.Real, b.Real) },
        new("delta", 2, 2, false) { Two = static (a, b) => a == b ? 1 : 0 },
    }.ToDictionary(f => f.Name);

    /// <summary>Names that stand for a number.</summary>
    public static IReadOnlyDictionary<string, Complex> Constants { get; } = new Dictionary<string, Complex>
    {
        ["pi"] = Math.PI,
        ["e"] = Math.E,
        ["i"] = System.Numerics.Complex.ImaginaryOne,
    };

    /// <summary>Words of the language itself, and the two functions that deal with truth values.</summary>
    public static IReadOnlyList<string> Words { get; } = ["and", "or", "not", "true", "false", "if", "near"];

    /// <summary>Names of all functions.</summary>
    public static IEnumerable<string> Names => Functions.Keys.Concat(["if", "near"]);

    /// <summary>True if the language has a meaning for the name, so that nothing else can have it.</summary>
    /// <param name="name">A name.</param>
    public static bool IsReserved(string name) => Functions.ContainsKey(name) || Constants.ContainsKey(name) || Words.Contains(name);

    /// <summary>The function of that name, or null.</summary>
    /// <param name="name">A name.</param>
    public static Function? Find(string name) => Functions.GetValueOrDefault(name);

    private static Function Complex(string name, Func<Complex, Complex> value) => new(name, 1, 1, false) { One = value };

    private static Function Real(string name, Func<double, double> value) => new(name, 1, 1, true) { One = z => value(z.Real) };
}
