namespace TensorRG.CoarseGraining.Tests;

/// <summary>The random site tensors that the contract tests run on; none has a reflection symmetry.</summary>
public enum SiteKind
{
    /// <summary>Two states on vertical bonds, two on horizontal ones, no grading.</summary>
    Plain,

    /// <summary>Two states on vertical bonds, three on horizontal ones, no grading.</summary>
    Oblong,

    /// <summary>Even and odd states; vertical 2, horizontal 3.</summary>
    Parity,

    /// <summary>Charges of U(1): vertical 0 and 1, horizontal -1, 0, 1.</summary>
    Phase,

    /// <summary>Two of the six charges of Z2 x Z3; vertical 2, horizontal 3.</summary>
    Product,
}
