namespace TensorRG.Models.Solutions;

/// <summary>
/// Where and how sharply the integrand of a frustrated triangular lattice bends: Q(u) = s1^2 (u - Bend)^2 + Rest.
/// </summary>
/// <param name="Slope">s1.</param>
/// <param name="Rest">Minimum of Q, free of cancellation.</param>
internal readonly record struct Frustration(Jet Slope, Jet Rest);
