using System.Globalization;
using System.Numerics;

namespace TensorRG.Models.Files.Expressions;

/// <summary>Puts operands together: checks their types and compiles what they do, with the place of every failure.</summary>
/// <param name="text">The expression, for messages.</param>
/// <param name="spot">Where it stands.</param>
internal sealed class Operations(string text, TextSpot spot)
{
    /// <summary>The operand as a number.</summary>
    /// <exception cref="ModelFileException">It is a truth value.</exception>
    public Func<Complex[], Complex> Number(Operand operand, string user) => operand.Number
        ?? throw spot.Error(operand.Position, $"{user} needs a number, but this is true or false. Turn it into a number with if(condition, 1, 0).");

    /// <summary>The operand as a truth value.</summary>
    /// <exception cref="ModelFileException">It is a number.</exception>
    public Func<Complex[], bool> Truth(Operand operand, string user) => operand.Truth
        ?? throw spot.Error(operand.Position, $"{user} needs true or false, but this is a number. Compare it, such as x == 0.");

    /// <summary>A value that does not change.</summary>
    public static Operand Constant(int position, Complex value) => new(position, 1, _ => value, null);

    /// <summary>The value of a slot.</summary>
    public static Operand Slot(int position, int slot) => new(position, 1, s => s[slot], null);

    /// <summary>-a.</summary>
    public Operand Negative(int position, Operand a)
    {
        Func<Complex[], Complex> x = Number(a, "'-'");
        return Made(position, s => -x(s), null, a);
    }

    /// <summary>not a.</summary>
    public Operand Not(int position, Operand a)
    {
        Func<Complex[], bool> x = Truth(a, "'not'");
        return Made(position, null, s => !x(s), a);
    }

    /// <summary>a symbol b.</summary>
    public Operand Binary(Token symbol, Operand a, Operand b) => symbol.Text switch
    {
        "and" or "or" => Logical(symbol, a, b),
        "+" or "-" or "*" or "/" or "^" => Arithmetic(symbol, a, b),
        _ => Comparison(symbol, a, b),
    };

    /// <summary>if(c, a, b); only the branch taken is evaluated.</summary>
    public Operand If(int position, List<Operand> arguments)
    {
        if (arguments.Count != 3)
            throw spot.Error(position, $"if has {Count(arguments.Count)}, but takes three. Write if(condition, value, otherwise).");
        Func<Complex[], bool> c = Truth(arguments[0], "The condition of if");
        (Operand a, Operand b) = (arguments[1], arguments[2]);
        if (a.Type == ExpressionType.Truth && b.Type == ExpressionType.Truth)
            return Made(position, null, s => c(s) ? a.Truth!(s) : b.Truth!(s), [.. arguments]);
        Func<Complex[], Complex> x = Number(a, "A branch of if beside a number"), y = Number(b, "A branch of if beside a number");
        return Made(position, s => c(s) ? x(s) : y(s), null, [.. arguments]);
    }

    /// <summary>near(a, b): |a - b| &lt;= 1e-12 max(|a|, |b|).</summary>
    public Operand Near(int position, List<Operand> arguments)
    {
        if (arguments.Count != 2)
            throw spot.Error(position, $"near has {Count(arguments.Count)}, but takes two arguments. Write near(x, y).");
        Func<Complex[], Complex> a = Number(arguments[0], "near"), b = Number(arguments[1], "near");
        return Made(position, null, s => IsNear(a(s), b(s)), [.. arguments]);
    }

    /// <summary>A function of numbers.</summary>
    public Operand Call(int position, Function function, List<Operand> arguments)
    {
        int n = arguments.Count;
        if (n < function.Minimum || n > function.Maximum)
            throw spot.Error(position, $"{function.Name} has {Count(n)}, but takes {function.ArityText}. Put as many between the parentheses, with commas.");
        Func<Complex[], Complex>[] values = [.. arguments.Select(a => Argument(function, a))];
        Func<Complex[], Complex> first = values[0];
        Func<Complex[], Complex> value = n == 1
            ? s => function.One!(first(s))
            : values.Skip(1).Aggregate(first, (a, b) => s => function.Two!(a(s), b(s)));
        return Made(position, Checked(position, value, $"{function.Name}(...)"), null, [.. arguments]) with { Height = arguments.Max(a => a.Height) + n };
    }

    private Func<Complex[], Complex> Argument(Function function, Operand operand)
    {
        Func<Complex[], Complex> value = Number(operand, function.Name);
        return function.RealOnly ? Real(operand.Position, value, function.Name) : value;
    }

    private Operand Logical(Token symbol, Operand a, Operand b)
    {
        Func<Complex[], bool> x = Truth(a, $"'{symbol.Text}'"), y = Truth(b, $"'{symbol.Text}'");
        return symbol.Text == "and"
            ? Made(symbol.Position, null, s => x(s) && y(s), a, b)
            : Made(symbol.Position, null, s => x(s) || y(s), a, b);
    }

    private Operand Arithmetic(Token symbol, Operand a, Operand b)
    {
        Func<Complex[], Complex> x = Number(a, $"'{symbol.Text}'"), y = Number(b, $"'{symbol.Text}'");
        Func<Complex[], Complex> value = symbol.Text switch
        {
            "+" => s => x(s) + y(s),
            "-" => s => x(s) - y(s),
            "*" => s => Times(x(s), y(s)),
            "/" => s => Quotient(symbol.Position, x(s), y(s)),
            _ => s => Power(symbol.Position, x(s), y(s)),
        };
        return Made(symbol.Position, Checked(symbol.Position, value, $"'{symbol.Text}'"), null, a, b);
    }

    private Operand Comparison(Token symbol, Operand a, Operand b)
    {
        string user = $"'{symbol.Text}'";
        Func<Complex[], Complex> x = Number(a, user), y = Number(b, user);
        if (symbol.Text is not ("==" or "!="))
            (x, y) = (Real(a.Position, x, user), Real(b.Position, y, user));
        Func<Complex[], bool> value = symbol.Text switch
        {
            "==" => s => x(s) == y(s),
            "!=" => s => x(s) != y(s),
            "<" => s => x(s).Real < y(s).Real,
            "<=" => s => x(s).Real <= y(s).Real,
            ">" => s => x(s).Real > y(s).Real,
            _ => s => x(s).Real >= y(s).Real,
        };
        return Made(symbol.Position, null, value, a, b);
    }

    private Operand Made(int position, Func<Complex[], Complex>? number, Func<Complex[], bool>? truth, params Operand[] parts)
    {
        int height = parts.Max(p => p.Height) + 1;
        return height <= Limits.ExpressionHeight
            ? new Operand(position, height, number, truth)
            : throw spot.Error(position, $"The expression chains more than {Limits.ExpressionHeight} operations. Split it into several entries of [constants].");
    }

    // Real times real stays real whatever the size, and costs one product.
    private static Complex Times(Complex a, Complex b) => a.Imaginary == 0 && b.Imaginary == 0 ? a.Real * b.Real : a * b;

    private static bool IsNear(Complex a, Complex b) => Complex.Abs(a - b) <= 1e-12 * Math.Max(Complex.Abs(a), Complex.Abs(b));

    private static string Count(int arguments) => arguments switch
    {
        0 => "no argument",
        1 => "one argument",
        _ => string.Create(CultureInfo.InvariantCulture, $"{arguments} arguments"),
    };

    private Complex Quotient(int position, Complex a, Complex b)
    {
        if (b == 0)
            throw spot.Error(position, $"Division by zero in {SourceText.Quote(text)}. Guard it with if(condition, value, otherwise), or restrict the parameters.");
        return a.Imaginary == 0 && b.Imaginary == 0 ? a.Real / b.Real : a / b;
    }

    private Complex Power(int position, Complex a, Complex b)
    {
        if (a == 0 && b.Real < 0)
            throw spot.Error(position, $"Division by zero: zero to a negative power in {SourceText.Quote(text)}. Guard it with if(condition, value, otherwise), or restrict the parameters.");
        return ComplexMath.Pow(a, b);
    }

    private Func<Complex[], Complex> Checked(int position, Func<Complex[], Complex> value, string what) => s =>
    {
        Complex z = value(s);
        return double.IsFinite(z.Real) && double.IsFinite(z.Imaginary)
            ? z
            : throw spot.Error(position, $"The result of {what} in {SourceText.Quote(text)} is {(double.IsNaN(z.Real) || double.IsNaN(z.Imaginary) ? "not a number" : "infinite")}. Guard it with if(condition, value, otherwise), or restrict the parameters; large Boltzmann weights go to [energy] instead.");
    };

    private Func<Complex[], Complex> Real(int position, Func<Complex[], Complex> value, string user) => s =>
    {
        Complex z = value(s);
        return z.Imaginary == 0
            ? z
            : throw spot.Error(position, $"{user} takes real numbers, but this is complex in {SourceText.Quote(text)}. Take its real part with re(...).");
    };
}
