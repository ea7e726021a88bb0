namespace TensorRG.Models;

/// <summary>A number known exactly, as evaluated in double precision.</summary>
/// <param name="Value">The number.</param>
/// <param name="Uncertainty">Bound on the error of the evaluation, absolute.</param>
/// <param name="Source">Who published the solution, and where.</param>
/// <param name="Note">How it is evaluated, or what it applies to.</param>
public sealed record ExactValue(double Value, double Uncertainty, string Source, string Note);
