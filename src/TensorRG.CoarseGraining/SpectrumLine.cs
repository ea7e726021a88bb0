namespace TensorRG.CoarseGraining;

/// <summary>One eigenvalue of the transfer matrix of a single tensor closed in the horizontal direction.</summary>
/// <param name="Charge">Charge of the eigenvector, as text.</param>
/// <param name="Magnitude">|lambda| divided by the largest |lambda|, in [0, 1].</param>
/// <param name="Phase">Argument of lambda relative to the leading one, in (-pi, pi].</param>
public readonly record struct SpectrumLine(string Charge, double Magnitude, double Phase);
