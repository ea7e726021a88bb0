using TensorRG.Models;

namespace TensorRG.Physics.Measurements;

/// <summary>One measured number.</summary>
/// <param name="Name">Name as it was asked for.</param>
/// <param name="Meaning">What it is, in one line.</param>
/// <param name="Unit">Unit in words; "none" for a pure number.</param>
/// <param name="Value">The number with its bar; real part for complex weights.</param>
/// <param name="ImaginaryPart">Imaginary part, 0 for real weights.</param>
/// <param name="IsConverged">False if the sequence in the bond dimension does not carry the bar; the remark says why.</param>
/// <param name="Remark">What a reader must know, such as how the symmetry was broken; empty for nothing.</param>
/// <param name="Exact">The exact value, or null where none is known.</param>
public sealed record Measured(
    string Name, string Meaning, string Unit, Estimate Value, double ImaginaryPart, bool IsConverged, string Remark, ExactValue? Exact);
