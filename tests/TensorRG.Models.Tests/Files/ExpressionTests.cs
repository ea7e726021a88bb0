using System.Globalization;
using System.Numerics;
using TensorRG.Models.Files;

namespace TensorRG.Models.Tests.Files;

/// <summary>The expression language through the files that use it: values against System.Math and System.Numerics, precedence, types.</summary>
public class ExpressionTests
{
    private const double X = 0.7, Y = -1.3;

    private static readonly Complex Z = new(0.3, -0.4);

    public static TheoryData<string, double> Values => new()
    {
        { "1", 1 }, { "1.5", 1.5 }, { ".5", 0.5 }, { "2.", 2 }, { "2e-3", 2e-3 }, { "1E3", 1000 }, { "1e+2", 100 }, { "pi", Math.PI }, { "e", Math.E },
        { "1+2*3", 7 }, { "(1+2)*3", 9 }, { "10-4-3", 3 }, { "16/4/2", 2 }, { "2^3^2", 512 }, { "-2^2", -4 }, { "(-2)^2", 4 }, { "2^-1", 0.5 }, { "-2^-2", -0.25 },
        { "2*-3", -6 }, { "--2", 2 }, { "+2", 2 }, { "-x^2", -X * X }, { "2*x+y", (2 * X) + Y }, { "2*3^2", 18 }, { "-2*3", -6 }, { "1 - -1", 2 }, { "0^0", 1 }, { "0^2", 0 },
        { "sqrt(2)", Math.Sqrt(2) }, { "exp(x)", Math.Exp(X) }, { "ln(x)", Math.Log(X) }, { "log10(x)", Math.Log10(X) },
        { "sin(x)", Math.Sin(X) }, { "cos(x)", Math.Cos(X) }, { "tan(x)", Math.Tan(X) }, { "asin(x)", Math.Asin(X) }, { "acos(x)", Math.Acos(X) }, { "atan(x)", Math.Atan(X) },
        { "sinh(x)", Math.Sinh(X) }, { "cosh(x)", Math.Cosh(X) }, { "tanh(x)", Math.Tanh(X) }, { "asinh(x)", Math.Asinh(X) }, { "acosh(2)", Math.Acosh(2) }, { "atanh(x)", Math.Atanh(X) },
        { "abs(y)", -Y }, { "sign(y)", -1 }, { "sign(0)", 0 }, { "floor(y)", -2 }, { "ceil(y)", -1 }, { "round(y)", -1 }, { "round(2.5)", 3 }, { "round(-2.5)", -3 },
        { "mod(5,3)", 2 }, { "mod(-1,3)", 2 }, { "mod(-3,3)", 0 }, { "mod(1,-3)", -2 }, { "mod(5.5,2)", 1.5 }, { "min(3,1,2)", 1 }, { "max(3,1,2)", 3 }, { "max(4)", 4 },
        { "delta(1,1)", 1 }, { "delta(1,2)", 0 }, { "delta(x,x)", 1 }, { "re(z)", 0.3 }, { "im(z)", -0.4 }, { "arg(-1)", Math.PI }, { "arg(i)", Math.PI / 2 }, { "x^2.5", Math.Pow(X, 2.5) }, { "y^3", Math.Pow(Y, 3) },
        { "if(x > 0, 1, 2)", 1 }, { "if(x < 0, 1, 2)", 2 }, { "if(true, x, 1/0)", X }, { "if(x >= 0.7, 1, 0)", 1 }, { "if(x <= 0.7, 1, 0)", 1 }, { "if(x != 0.7, 1, 0)", 0 }, { "if(x == 0.7, 1, 0)", 1 },
        { "if(1 < 2 and 2 < 3, 1, 0)", 1 }, { "if(1 > 2 or 2 < 3, 1, 0)", 1 }, { "if(not 1 == 2, 1, 0)", 1 }, { "if(not (1 < 2) or true, 1, 0)", 1 }, { "if(true or false and false, 1, 0)", 1 },
        { "if(false and 1/0 == 1, 1, 0)", 0 }, { "if(true or 1/0 == 1, 1, 0)", 1 }, { "if(if(x > 0, false, true), 1, 0)", 0 }, { "if(near(1, 1 + 1e-13), 1, 0)", 1 }, { "if(near(1, 1 + 1e-11), 1, 0)", 0 }, { "if(near(0, 0), 1, 0)", 1 },
        { "re(i*i)", -1 }, { "im(0.1i)", 0.1 }, { "re((1+2i)*(3-1i))", 5 }, { "im(2i^3)", 0 - 0 }, { "abs(3+4i)", 5 }, { "re(conj(z)*z)", 0.25 }, { " 1 \t+\n 2 ", 3 }, { "twice", 1.4 }, { "2i*i", -2 },
    };

    public static TheoryData<string> Functions => ["sqrt", "exp", "ln", "log10", "sin", "cos", "tan", "asin", "acos", "atan", "sinh", "cosh", "tanh", "asinh", "acosh", "atanh", "conj"];

    [Theory]
    [MemberData(nameof(Values))]
    public void Real_values(string expression, double expected)
    {
        Complex value = Evaluate(expression);
        if (expression != "im(2i^3)")
            Assert.True(Math.Abs(value.Real - expected) <= 1e-15 * Math.Max(1, Math.Abs(expected)), $"{expression} = {value}, not {expected}");
        Assert.Equal(0, value.Imaginary);
    }

    [Fact]
    public void Powers_bind_tighter_than_the_imaginary_unit_is_part_of_a_number()
        => Assert.Equal(-8, Evaluate("im((2i)^3)").Real, 1e-15);

    // Definitions by the exponential and the logarithm, on the principal branch (common practice, no source).
    [Theory]
    [MemberData(nameof(Functions))]
    public void Complex_values(string name)
    {
        Complex expected = name switch
        {
            "sqrt" => Complex.Exp(Complex.Log(Z) / 2),
            "exp" => Math.Exp(0.3) * new Complex(Math.Cos(0.4), -Math.Sin(0.4)),
            "ln" => new(Math.Log(0.5), Math.Atan2(-0.4, 0.3)),
            "log10" => new Complex(Math.Log(0.5), Math.Atan2(-0.4, 0.3)) / Math.Log(10),
            "sin" => (E(1) - E(-1)) / new Complex(0, 2),
            "cos" => (E(1) + E(-1)) / 2,
            "tan" => (E(1) - E(-1)) / (E(1) + E(-1)) / Complex.ImaginaryOne,
            "sinh" => (Complex.Exp(Z) - Complex.Exp(-Z)) / 2,
            "cosh" => (Complex.Exp(Z) + Complex.Exp(-Z)) / 2,
            "tanh" => (Complex.Exp(Z) - Complex.Exp(-Z)) / (Complex.Exp(Z) + Complex.Exp(-Z)),
            "conj" => new(0.3, 0.4),
            _ => Z,
        };
        string inverse = name switch { "asin" => "sin(asin(z))", "acos" => "cos(acos(z))", "atan" => "tan(atan(z))", "asinh" => "sinh(asinh(z))", "acosh" => "cosh(acosh(z))", "atanh" => "tanh(atanh(z))", _ => $"{name}(z)" };
        Assert.True(Complex.Abs(Evaluate(inverse) - expected) <= 2e-15, $"{inverse} = {Evaluate(inverse)}, not {expected}");

        static Complex E(int sign) => Complex.Exp(sign * Complex.ImaginaryOne * Z);
    }

    [Theory]
    [InlineData("sqrt(-1)", 0, 1)]
    [InlineData("ln(-1)", 0, Math.PI)]
    [InlineData("sqrt(-(0*i) - 4)", 0, 2)]
    [InlineData("i^2", -1, 0)]
    [InlineData("i^-1", 0, -1)]
    [InlineData("(1+i)^2", 0, 2)]
    [InlineData("(-8)^(1/3)", 1, 1.7320508075688772)]
    [InlineData("e^(i*pi/2)", 0, 1)]
    [InlineData("2^i", 0.76923890136397213, 0.63896127631363480)]
    [InlineData("if(true, i, 1)", 0, 1)]
    [InlineData("acosh(0)", 0, Math.PI / 2)]
    public void Complex_results_of_the_principal_branch(string expression, double re, double im)
        => Assert.True(Complex.Abs(Evaluate(expression) - new Complex(re, im)) <= 1e-15, $"{expression} = {Evaluate(expression)}");

    [Fact]
    public void Random_trees_agree_with_a_direct_evaluation()
    {
        Random random = new(20261);
        for (int n = 0; n < 40; n++)
        {
            (string text, Complex value) = Tree(random, 5);
            Complex found = Evaluate(text);
            Assert.True(Complex.Abs(found - value) <= 1e-12 * (1 + Complex.Abs(value)), $"{text} = {found}, not {value} (seed 20261, tree {n})");
        }
    }

    [Theory]
    [InlineData("(", ")", 150)]
    [InlineData("-", "", 150)]
    [InlineData("sin(", ")", 150)]
    public void Moderate_nesting_is_allowed(string open, string close, int depth)
        => Evaluate(string.Concat(Enumerable.Repeat(open, depth)) + "x" + string.Concat(Enumerable.Repeat(close, depth)));

    [Fact]
    public void Long_sums_are_allowed() => Assert.Equal(900, Evaluate(string.Join("+", Enumerable.Repeat("1", 900))).Real);

    private static (string Text, Complex Value) Tree(Random random, int depth)
    {
        if (depth == 0 || random.Next(5) == 0)
        {
            double number = Math.Round(random.NextDouble() * 3, 2);
            return random.Next(4) switch
            {
                0 => ("x", X),
                1 => ("z", Z),
                2 => ($"{number.ToString(CultureInfo.InvariantCulture)}i", new(0, number)),
                _ => (number.ToString(CultureInfo.InvariantCulture), number),
            };
        }
        (string a, Complex x) = Tree(random, depth - 1);
        (string b, Complex y) = Tree(random, depth - 1);
        return random.Next(5) switch
        {
            0 => ($"({a} + {b})", x + y),
            1 => ($"({a} - ({b}))", x - y),
            2 => ($"({a})*({b})", x * y),
            3 => ($"({a})/(2.5 + abs({b}))", x / (2.5 + Complex.Abs(y))),
            _ => ($"sin({a})*1", Complex.Sin(x)),
        };
    }

    // As an observable of a file, on the one state of a site.
    private static Complex Evaluate(string expression)
    {
        FileModel model = Samples.Parse($"""
            name = "x"
            lattice = "square"
            [parameters]
            x = 0.7
            y = -1.3
            z = {"{"} default = "0.3 - 0.4i", complex = true {"}"}
            [constants]
            twice = "2*x"
            [site]
            s = [0]
            [observables]
            v = '''{expression}'''
            """);
        return model.System(model.CreateParameters())!.Observables[0].Terms[0].Values[0];
    }
}
