namespace TensorRG.Models.Files.Expressions;

/// <summary>What an expression yields.</summary>
internal enum ExpressionType
{
    /// <summary>A complex number.</summary>
    Number,

    /// <summary>True or false.</summary>
    Truth,
}
