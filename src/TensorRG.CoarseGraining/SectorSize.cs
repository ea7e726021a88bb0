namespace TensorRG.CoarseGraining;

/// <summary>How many states of a bond carry one charge.</summary>
/// <param name="Charge">The charge as text: <c>0</c>, <c>1</c>, <c>(1,-2)</c>.</param>
/// <param name="Dimension">Number of states.</param>
public readonly record struct SectorSize(string Charge, int Dimension);
