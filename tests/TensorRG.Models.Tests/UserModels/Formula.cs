using System.Numerics;

namespace TensorRG.Models.Tests.UserModels;

/// <summary>An expression twice: as text for a model file, and as C# that knows nothing of the program's parser. Truth values are 1 and 0.</summary>
/// <param name="Text">The text.</param>
/// <param name="Binding">How tightly its outermost operator binds: or 1, and 2, not 3, comparison 4, sum 5, product 6, sign 7, power 8, everything else 9.</param>
/// <param name="Value">The value, from the values of names.</param>
internal sealed record Formula(string Text, int Binding, Func<Func<string, Complex>, Complex> Value)
{
    private const int Power = 8, Atom = 9;

    public static Formula Number(string text, double value) => new(text, Atom, _ => value);

    public static Formula Name(string name) => new(name, Atom, x => x(name));

    public static Formula ImaginaryUnit { get; } = new("i", Atom, static _ => Complex.ImaginaryOne);

    public static Formula Call(string function, Func<Complex, Complex> value, Formula a) => new($"{function}({a.Text})", Atom, x => value(a.Value(x)));

    public static Formula Call(string function, Func<Complex, Complex, Complex> value, Formula a, Formula b)
        => new($"{function}({a.Text}, {b.Text})", Atom, x => value(a.Value(x), b.Value(x)));

    public static Formula If(Formula condition, Formula a, Formula b)
        => new($"if({condition.Text}, {a.Text}, {b.Text})", Atom, x => condition.Value(x) != 0 ? a.Value(x) : b.Value(x));

    public static Formula Negative(Formula a) => new($"-{a.From(7)}", 7, x => -a.Value(x));

    public static Formula Not(Formula a) => new($"not {a.From(3)}", 3, x => a.Value(x) == 0 ? 1 : 0);

    /// <summary>a operator b, with the parentheses that it needs and no others.</summary>
    public static Formula Binary(string symbol, Formula a, Formula b)
    {
        (int binding, Func<Complex, Complex, Complex> value) = Operator(symbol);
        string left = a.From(symbol == "^" || binding == 4 ? binding + 1 : binding), right = b.From(symbol == "^" ? binding : binding + 1);
        return new($"{left} {symbol} {right}", binding, x => value(a.Value(x), b.Value(x)));
    }

    /// <summary>a^n with a whole n from 0 to 3.</summary>
    public static Formula Whole(Formula a, int n)
        => new($"{a.From(Power + 1)}^{n}", Power, x => Enumerable.Repeat(a.Value(x), n).Aggregate(Complex.One, static (p, f) => p * f));

    /// <summary>The same in parentheses that it may not need.</summary>
    public Formula Enclosed() => new($"({Text})", Atom, Value);

    private string From(int binding) => Binding >= binding ? Text : $"({Text})";

    private static (int Binding, Func<Complex, Complex, Complex> Value) Operator(string symbol) => symbol switch
    {
        "or" => (1, static (a, b) => Truth(a != 0 || b != 0)),
        "and" => (2, static (a, b) => Truth(a != 0 && b != 0)),
        "==" => (4, static (a, b) => Truth(a == b)),
        "!=" => (4, static (a, b) => Truth(a != b)),
        "<" => (4, static (a, b) => Truth(a.Real < b.Real)),
        "<=" => (4, static (a, b) => Truth(a.Real <= b.Real)),
        ">" => (4, static (a, b) => Truth(a.Real > b.Real)),
        ">=" => (4, static (a, b) => Truth(a.Real >= b.Real)),
        "+" => (5, static (a, b) => a + b),
        "-" => (5, static (a, b) => a - b),
        "*" => (6, static (a, b) => a * b),
        "/" => (6, static (a, b) => a / b),
        "^" => (Power, static (a, b) => Math.Pow(a.Real, b.Real)),
        _ => throw new ArgumentOutOfRangeException(nameof(symbol)),
    };

    private static Complex Truth(bool value) => value ? 1 : 0;
}
