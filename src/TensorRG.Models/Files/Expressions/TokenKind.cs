namespace TensorRG.Models.Files.Expressions;

/// <summary>Kinds of tokens of an expression.</summary>
internal enum TokenKind
{
    /// <summary>A number, imaginary with an i at its end.</summary>
    Number,

    /// <summary>A name or a word such as and.</summary>
    Name,

    /// <summary>An operator, a parenthesis or a comma.</summary>
    Symbol,

    /// <summary>The end of the text.</summary>
    End,
}
