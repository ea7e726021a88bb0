namespace TensorRG.Models;

/// <summary>A line of a model's list of exact results: what is known, where it holds, and from whom.</summary>
/// <param name="Quantity">Name of the quantity that <see cref="Model.Exact"/> returns: one of <see cref="QuantityNames"/>, or an observable.</param>
/// <param name="Validity">The parameters for which it is known, in words.</param>
/// <param name="Source">Who published the solution, and where.</param>
public sealed record ExactReference(string Quantity, string Validity, string Source)
{
    /// <summary>A line for one of the common quantities.</summary>
    /// <param name="quantity">The quantity.</param>
    /// <param name="validity">The parameters for which it is known, in words.</param>
    /// <param name="source">Who published the solution, and where.</param>
    public ExactReference(Quantity quantity, string validity, string source)
        : this(QuantityNames.Name(quantity), validity, source)
    {
    }
}
