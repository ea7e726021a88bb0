using System.Numerics;

namespace TensorRG.Models.Files;

/// <summary>A value of one variable.</summary>
/// <param name="Value">The value in expressions.</param>
/// <param name="Label">The value for people.</param>
/// <param name="LogMeasure">Logarithm of the weight that the sum over values gives it: 0 for counting.</param>
internal readonly record struct StateValue(Complex Value, string Label, double LogMeasure = 0);
