namespace TensorRG.Models.Tests.UserModels;

/// <summary>
/// Random formulas. What jumps (comparisons, delta, floor, ...) is put on whole formulas alone: their values are small multiples of 1/8, exact in both
/// evaluations. Functions with branch cuts are kept away from them.
/// </summary>
/// <param name="random">Source of numbers.</param>
/// <param name="real">Names with real values.</param>
/// <param name="exact">Names with values that are small multiples of 1/2.</param>
/// <param name="complex">Names with complex values.</param>
internal sealed class RandomFormula(Random random, string[] real, string[] exact, string[] complex)
{
    private static readonly string[] Comparisons = ["==", "!=", "<", "<=", ">", ">="];

    /// <summary>A real one.</summary>
    public Formula Real(int depth)
    {
        if (depth == 0)
            return RealAtom();
        Formula a = Real(depth - 1);
        Formula made = random.Next(12) switch
        {
            0 or 1 => Formula.Binary("+", a, Real(depth - 1)),
            2 => Formula.Binary("-", a, Real(depth - 1)),
            3 or 4 => Formula.Binary("*", a, Real(depth - 1)),
            5 => Formula.Binary("/", a, Above(depth - 1)),
            6 => Formula.Negative(a),
            7 => Formula.Whole(a, random.Next(4)),
            8 => Formula.If(Truth(depth - 1), a, Real(depth - 1)),
            9 => Whole(depth),
            10 => Formula.Binary("^", Above(depth - 1), Formula.Call("tanh", static z => Math.Tanh(z.Real), a)),
            _ => RealCall(a, depth),
        };
        return random.Next(10) == 0 ? made.Enclosed() : made;
    }

    /// <summary>A complex one.</summary>
    public Formula Complex(int depth)
    {
        if (depth == 0)
            return complex.Length > 0 && random.Next(2) == 0 ? Formula.Name(Pick(complex)) : Formula.ImaginaryUnit;
        Formula a = Complex(depth - 1);
        return random.Next(9) switch
        {
            0 => Formula.Binary("+", a, Real(depth - 1)),
            1 => Formula.Binary("*", Real(depth - 1), a),
            2 => Formula.Binary("-", Real(depth - 1), a),
            3 => Formula.Call("cos", static z => System.Numerics.Complex.Cos(z), a),
            4 => Formula.Call("exp", static z => System.Numerics.Complex.Exp(z), Formula.Binary("*", Formula.ImaginaryUnit, Real(depth - 1))),
            5 => Formula.Whole(a, random.Next(1, 4)),
            6 => Formula.Call("conj", System.Numerics.Complex.Conjugate, a),
            7 => Formula.Binary("*", a, Complex(depth - 1)),
            _ => Formula.Binary("/", a, Above(depth - 1)),
        };
    }

    /// <summary>A condition.</summary>
    public Formula Truth(int depth)
    {
        if (depth <= 0)
            return Formula.Binary(Pick(Comparisons), Whole(1), Whole(1));
        return random.Next(6) switch
        {
            0 => Formula.Not(Truth(depth - 1)),
            1 => Formula.Binary("and", Truth(depth - 1), Truth(depth - 1)),
            2 => Formula.Binary("or", Truth(depth - 1), Truth(depth - 1)),
            3 => Formula.Call("near", static (a, b) => a == b ? 1 : 0, Whole(1), Whole(1)),
            _ => Formula.Binary(Pick(Comparisons), Whole(depth), Whole(depth - 1)),
        };
    }

    private Formula Whole(int depth)
    {
        if (depth <= 0)
            return exact.Length > 0 && random.Next(4) > 0 ? Formula.Name(Pick(exact)) : WholeNumber();
        Formula a = Whole(depth - 1);
        return random.Next(11) switch
        {
            0 or 1 => Formula.Binary("+", a, Whole(depth - 1)),
            2 => Formula.Binary("-", a, Whole(depth - 1)),
            3 => Formula.Binary("*", a, Whole(0)),
            4 => Formula.Call("delta", static (x, y) => x == y ? 1 : 0, a, Whole(depth - 1)),
            5 => Formula.Call("mod", static (x, y) => x.Real - (y.Real * Math.Floor(x.Real / y.Real)), a, Formula.Number("2", 2)),
            6 => Formula.Call("floor", static x => Math.Floor(x.Real), Formula.Binary("/", a, Formula.Number("2", 2))),
            7 => Formula.Call("ceil", static x => Math.Ceiling(x.Real), a),
            8 => Formula.Call("sign", static x => Math.Sign(x.Real), a),
            9 => Formula.Call("abs", static x => Math.Abs(x.Real), a),
            _ => Formula.Call("round", static x => Math.Floor(x.Real + 0.5), Formula.Call("abs", static x => Math.Abs(x.Real), a)),
        };
    }

    private Formula RealCall(Formula a, int depth) => random.Next(14) switch
    {
        0 => Formula.Call("sin", static z => Math.Sin(z.Real), a),
        1 => Formula.Call("cos", static z => Math.Cos(z.Real), a),
        2 => Formula.Call("tanh", static z => Math.Tanh(z.Real), a),
        3 => Formula.Call("exp", static z => Math.Exp(z.Real), Formula.Negative(Formula.Whole(a, 2))),
        4 => Formula.Call("atan", static z => Math.Atan(z.Real), a),
        5 => Formula.Call("asinh", static z => Math.Asinh(z.Real), a),
        6 => Formula.Call("abs", static z => Math.Abs(z.Real), a),
        7 => Formula.Call("min", static (x, y) => Math.Min(x.Real, y.Real), a, Real(depth - 1)),
        8 => Formula.Call("max", static (x, y) => Math.Max(x.Real, y.Real), a, Real(depth - 1)),
        9 => Formula.Call("sqrt", static z => Math.Sqrt(z.Real), Above(depth - 1)),
        10 => Formula.Call("ln", static z => Math.Log(z.Real), Above(depth - 1)),
        11 => Formula.Call("log10", static z => Math.Log10(z.Real), Above(depth - 1)),
        12 => Formula.Call("cosh", static z => Math.Cosh(z.Real), Formula.Call("sin", static z => Math.Sin(z.Real), a)),
        _ => complex.Length > 0
            ? Part(random.Next(2) == 0 ? "re" : "im", Complex(1))
            : Formula.Call("tan", static z => Math.Tan(z.Real), Formula.Call("sin", static z => Math.Sin(z.Real), a)),
    };

    private static Formula Part(string name, Formula a) => Formula.Call(name, z => name == "re" ? z.Real : z.Imaginary, a);

    // 3/2 + x^2 or the like: never near zero.
    private Formula Above(int depth) => Formula.Binary("+", Formula.Number("1.5", 1.5), random.Next(2) == 0
        ? Formula.Whole(Real(Math.Max(0, depth - 1)), 2)
        : Formula.Call("cos", static z => Math.Cos(z.Real), Real(Math.Max(0, depth - 1))));

    private Formula RealAtom() => random.Next(8) switch
    {
        0 => WholeNumber(),
        1 => Formula.Number("0.75", 0.75),
        2 => Formula.Number("3e-1", 0.3),
        3 => random.Next(2) == 0 ? Formula.Number("pi", Math.PI) : Formula.Number("e", Math.E),
        _ => Formula.Name(Pick(real)),
    };

    private Formula WholeNumber()
    {
        int n = random.Next(4);
        return Formula.Number(n.ToString(System.Globalization.CultureInfo.InvariantCulture), n);
    }

    private string Pick(string[] from) => from[random.Next(from.Length)];
}
