namespace TensorRG.Models;

/// <summary>A line of a model's list of exact results: what is known, where it holds, and from whom.</summary>
/// <param name="Quantity">The quantity that <see cref="Model.Exact"/> returns.</param>
/// <param name="Validity">The parameters for which it is known, in words.</param>
/// <param name="Source">Who published the solution, and where.</param>
public sealed record ExactReference(Quantity Quantity, string Validity, string Source);
