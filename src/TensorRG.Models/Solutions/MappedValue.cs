namespace TensorRG.Models.Solutions;

/// <summary>Exact values that follow from another model's by a factor and a shift of the energy.</summary>
internal static class MappedValue
{
    /// <summary>
    /// The value for a model whose energy per site is that of <paramref name="copies"/> independent copies of the solved
    /// one, less <paramref name="energy"/>: ln Z = copies ln Z' + energy / T, U = copies U' - energy, C = copies C', S = copies S', order
    /// parameter unchanged.
    /// </summary>
    public static ExactValue Shift(ExactValue solved, Quantity quantity, int copies, double energy, double temperature, string mapping)
    {
        double value = quantity switch
        {
            Quantity.LogZPerSite => (copies * solved.Value) + (energy / temperature),
            Quantity.EnergyPerSite => (copies * solved.Value) - energy,
            Quantity.SpecificHeatPerSite or Quantity.EntropyPerSite => copies * solved.Value,
            _ => solved.Value,
        };
        double uncertainty = (copies * solved.Uncertainty) + (2 * Constants.Epsilon * Math.Abs(value));
        return solved with { Value = value, Uncertainty = uncertainty, Note = $"{mapping}; {solved.Note}" };
    }
}
