using System.Collections.Immutable;
using System.Numerics;

namespace TensorRG.Models.Files.Expressions;

/// <summary>A compiled expression. Its values come from numbered slots, so evaluating looks nothing up.</summary>
/// <param name="text">The expression as written.</param>
/// <param name="spot">Where it stands.</param>
/// <param name="root">What it does.</param>
/// <param name="slots">The slots that it reads.</param>
internal sealed class Expression(string text, TextSpot spot, Operand root, ImmutableHashSet<int> slots)
{
    /// <summary>The expression as written.</summary>
    public string Text { get; } = text;

    /// <summary>Where it stands.</summary>
    public TextSpot Spot { get; } = spot;

    /// <summary>What it yields.</summary>
    public ExpressionType Type => root.Type;

    /// <summary>The slots that it reads.</summary>
    public ImmutableHashSet<int> Slots { get; } = slots;

    /// <summary>An expression that is a number.</summary>
    /// <param name="text">The number as written.</param>
    /// <param name="spot">Where it stands.</param>
    /// <param name="value">Its value.</param>
    public static Expression Constant(string text, TextSpot spot, double value) => new(text, spot, Operations.Constant(0, value), []);

    /// <summary>An expression that is true or false.</summary>
    /// <param name="text">As written.</param>
    /// <param name="spot">Where it stands.</param>
    /// <param name="value">Its value.</param>
    public static Expression Constant(string text, TextSpot spot, bool value) => new(text, spot, new Operand(0, 1, null, _ => value), []);

    /// <summary>Compiles an expression.</summary>
    /// <param name="text">The expression.</param>
    /// <param name="spot">Where it stands.</param>
    /// <param name="scope">The names it may use.</param>
    /// <exception cref="ModelFileException">It is not well formed, or uses a name or a type wrongly.</exception>
    public static Expression Parse(string text, TextSpot spot, Scope scope)
    {
        if (text.Length > Limits.ExpressionLength)
            throw spot.Error(0, $"The expression has more than {Limits.ExpressionLength} characters. Split it into several entries of [constants].");
        HashSet<int> slots = [];
        Operand root = new Parser(text, spot, scope, slots).Parse();
        return new(text, spot, root, [.. slots]);
    }

    /// <summary>The same, of a given type.</summary>
    /// <param name="text">The expression.</param>
    /// <param name="spot">Where it stands.</param>
    /// <param name="scope">The names it may use.</param>
    /// <param name="type">The type it must have.</param>
    /// <exception cref="ModelFileException">It is not well formed, or of the other type.</exception>
    public static Expression Parse(string text, TextSpot spot, Scope scope, ExpressionType type)
    {
        Expression made = Parse(text, spot, scope);
        if (made.Type == type)
            return made;
        throw spot.Error(0, type == ExpressionType.Number
            ? $"{SourceText.Quote(text)} is true or false, but a number is needed. Write if(condition, 1, 0)."
            : $"{SourceText.Quote(text)} is a number, but true or false is needed. Compare it, such as x == 0.");
    }

    /// <summary>Its value as a number.</summary>
    /// <param name="values">The slots.</param>
    public Complex Number(Complex[] values) => root.Number!(values);

    /// <summary>Its value as a truth value.</summary>
    /// <param name="values">The slots.</param>
    public bool Truth(Complex[] values) => root.Truth!(values);

    /// <summary>Its value as a real number.</summary>
    /// <param name="values">The slots.</param>
    /// <param name="what">What the number is, for the message.</param>
    /// <exception cref="ModelFileException">It is complex.</exception>
    public double Real(Complex[] values, string what)
    {
        Complex z = Number(values);
        return z.Imaginary == 0
            ? z.Real
            : throw Spot.Error(0, $"{what} must be real, but {SourceText.Quote(Text)} is complex. Take its real part with re(...).");
    }
}
