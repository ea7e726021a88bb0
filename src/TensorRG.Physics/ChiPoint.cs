namespace TensorRG.Physics;

/// <summary>One member of a bond-dimension sequence.</summary>
/// <param name="BondDimension">chi.</param>
/// <param name="Value">ln Z per site with the bar of its own run.</param>
/// <param name="Measure">D, the scheme's measure of all that was discarded, per lattice site.</param>
public sealed record ChiPoint(int BondDimension, Estimate Value, double Measure);
