namespace TensorRG.Benchmarks;

/// <summary>One published value and the measurement that must reach it.</summary>
/// <param name="Id">Row of reference-values.json.</param>
/// <param name="Model">Model of the catalogue.</param>
/// <param name="Set">Parameters.</param>
/// <param name="Quantity">What is measured.</param>
/// <param name="BondDimension">chi.</param>
internal sealed record ReferenceCase(string Id, string Model, (string Name, double Value)[] Set, string Quantity, int BondDimension)
{
    /// <summary>Size of a torus, or null for the infinite lattice.</summary>
    public int? Torus { get; init; }

    /// <summary>The published number is exp(factor * measured).</summary>
    public double? Exponential { get; init; }
}
