namespace TensorRG.Physics;

/// <summary>One contribution to an error estimate.</summary>
/// <param name="Name">Short name: truncation, steps, round-off.</param>
/// <param name="Value">Its size, non-negative.</param>
/// <param name="Basis">What it was estimated from, in a sentence.</param>
public sealed record ErrorPart(string Name, double Value, string Basis);
