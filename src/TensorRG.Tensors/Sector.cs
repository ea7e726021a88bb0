namespace TensorRG.Tensors;

/// <summary>The states of a leg that share one charge.</summary>
/// <param name="Charge">Their charge.</param>
/// <param name="Dimension">How many there are, at least 1.</param>
public readonly record struct Sector(Charge Charge, int Dimension);
