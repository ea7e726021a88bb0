using System.Numerics;

namespace TensorRG.Models.Files.Expressions;

/// <summary>A part of an expression, compiled: exactly one of the two functions is there.</summary>
/// <param name="Position">Offset of its operator or first character, for messages.</param>
/// <param name="Height">Longest chain of operations that wait for each other.</param>
/// <param name="Number">Its value from the slots, where it is a number.</param>
/// <param name="Truth">Its value from the slots, where it is a truth value.</param>
internal sealed record Operand(int Position, int Height, Func<Complex[], Complex>? Number, Func<Complex[], bool>? Truth)
{
    /// <summary>What it yields.</summary>
    public ExpressionType Type => Number is null ? ExpressionType.Truth : ExpressionType.Number;
}
