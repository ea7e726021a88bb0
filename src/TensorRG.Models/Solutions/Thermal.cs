namespace TensorRG.Models.Solutions;

/// <summary>
/// ln Z per site as a function of the inverse temperature, split so that entropy and specific heat do not cancel at low
/// temperature: ln Z = Linear + Rest, Linear = -E0 / T.
/// </summary>
/// <param name="Temperature">T.</param>
/// <param name="Linear">Minus the ground-state energy per site over T (or any part proportional to 1/T).</param>
/// <param name="Rest">The rest, with its derivatives beta d/dbeta.</param>
/// <param name="IsCritical">At the critical point itself, where the specific heat is infinite.</param>
/// <param name="Magnetisation">Spontaneous magnetisation per site.</param>
internal sealed record Thermal(double Temperature, double Linear, Jet Rest, bool IsCritical, double Magnetisation)
{
    /// <summary>A quantity by name, or null where it is not finite or none of these.</summary>
    /// <param name="quantity">One of <see cref="QuantityNames"/>.</param>
    /// <param name="source">Who published the solution.</param>
    /// <param name="magnetisationSource">Who published the magnetisation.</param>
    public ExactValue? Exact(string quantity, string source, string magnetisationSource) => quantity switch
    {
        "ln-z" => Value(Linear + Rest.Value, 1, source, "integral over one momentum, by double-exponential quadrature"),
        "energy" => Value(-Temperature * (Linear + Rest.First), Temperature * (1 + Math.Abs(Linear)), source, "integral of the derivative of the integrand"),
        "entropy" => Value(Rest.Value - Rest.First, 1, source, "ln Z + U/T, the ground-state energy taken out of both"),
        "specific-heat" when !IsCritical => Value(Math.Max(0, Rest.Second), 1, source, "integral of the second derivative of the integrand"),
        "magnetisation" => Value(Magnetisation, 1, magnetisationSource, "eighth root of a rational function of the Boltzmann factors"),
        _ => null,
    };

    private static ExactValue Value(double value, double scale, string source, string note)
        => new(value, 32 * Constants.Epsilon * Math.Max(scale, Math.Abs(value)), source, note);
}
