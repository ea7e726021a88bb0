using System.Collections.Immutable;

namespace TensorRG.Reports;

/// <summary>One step of a flow, as <see cref="FlowPlot"/> draws it.</summary>
/// <param name="Step">Step number.</param>
/// <param name="LengthScale">Linear size of one tensor in lattice constants.</param>
/// <param name="DegeneracyRatio">X = (Tr M)^2 / Tr M^2.</param>
/// <param name="Levels">-ln |lambda_n / lambda_0| for n = 1, 2, ..., in the same order at every step.</param>
public sealed record FlowPoint(int Step, double LengthScale, double DegeneracyRatio, ImmutableArray<double> Levels);
