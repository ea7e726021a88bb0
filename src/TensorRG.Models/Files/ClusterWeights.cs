using System.Numerics;

namespace TensorRG.Models.Files;

/// <summary>Tables of one kind of cluster.</summary>
/// <param name="Log">Logarithms of the weights, constraints included; real part minus infinity where excluded.</param>
/// <param name="Energy">Energies, 0 where excluded; null without a term of energy.</param>
internal sealed record ClusterWeights(Complex[] Log, Complex[]? Energy);
