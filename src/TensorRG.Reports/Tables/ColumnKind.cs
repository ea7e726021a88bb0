namespace TensorRG.Reports;

/// <summary>What the cells of a column hold.</summary>
public enum ColumnKind
{
    /// <summary>Doubles.</summary>
    Number,

    /// <summary>Whole numbers up to 64 bits.</summary>
    WholeNumber,

    /// <summary>Strings.</summary>
    Text,

    /// <summary>Booleans, written true and false.</summary>
    Flag,
}
