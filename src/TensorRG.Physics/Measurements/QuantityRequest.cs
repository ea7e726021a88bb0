using TensorRG.Models.Lattices;

namespace TensorRG.Physics.Measurements;

/// <summary>One quantity that was asked for.</summary>
/// <param name="Name">As it was asked for.</param>
/// <param name="Kind">How it comes about.</param>
/// <param name="Observable">The observable it needs, or null.</param>
/// <param name="Factor">Factor of the result: 1/T^2 for the specific heat, 1/T for a susceptibility, else 1.</param>
/// <param name="Power">Power of a moment.</param>
/// <param name="Meaning">What it is, in one line.</param>
/// <param name="Unit">Its unit.</param>
internal sealed record QuantityRequest(
    string Name, QuantityKind Kind, LocalObservable? Observable, double Factor, int Power, string Meaning, string Unit);
