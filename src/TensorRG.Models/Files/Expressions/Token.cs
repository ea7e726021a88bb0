using System.Numerics;

namespace TensorRG.Models.Files.Expressions;

/// <summary>One token of an expression.</summary>
/// <param name="Kind">Its kind.</param>
/// <param name="Text">Its characters; empty at the end.</param>
/// <param name="Position">Offset in the expression.</param>
/// <param name="Value">Value of a number.</param>
internal readonly record struct Token(TokenKind Kind, string Text, int Position, Complex Value = default);
