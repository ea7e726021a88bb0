namespace TensorRG.Models.Files;

/// <summary>What a model file may ask for at most, so that every file is answered in seconds and fits memory.</summary>
internal static class Limits
{
    /// <summary>Bytes of a file.</summary>
    public const int FileBytes = 1 << 20;

    /// <summary>States of one site or edge.</summary>
    public const int States = 256;

    /// <summary>Entries of one table, states^sites: 16 MB.</summary>
    public const int TableEntries = 1 << 20;

    /// <summary>Characters of one expression.</summary>
    public const int ExpressionLength = 10_000;

    /// <summary>Nested parentheses, calls and signs of one expression.</summary>
    public const int ExpressionDepth = 200;

    /// <summary>Operations that wait for each other, such as the additions of a long sum.</summary>
    public const int ExpressionHeight = 1000;

    /// <summary>Parameters, constants, variables, observables, references: of each.</summary>
    public const int Entries = 200;

    /// <summary>Characters of a name.</summary>
    public const int NameLength = 64;
}
