namespace TensorRG.Models.Files;

/// <summary>Kinds of values in a model file.</summary>
internal enum NodeKind
{
    /// <summary>Keys with values.</summary>
    Table,

    /// <summary>A list in square brackets, or of [[tables]].</summary>
    Array,

    /// <summary>A text.</summary>
    Text,

    /// <summary>A whole or decimal number.</summary>
    Number,

    /// <summary>true or false.</summary>
    Truth,

    /// <summary>A date or time, for which no key has a use.</summary>
    Date,
}
