namespace TensorRG.Models.Solutions;

/// <summary>
/// The square clock models that reduce to solved ones: q = 2 is the Ising model with coupling J; q = 3 the 3-state Potts
/// model with coupling 3J/2, less -J per site; q = 4 two independent Ising models with coupling J/2
/// (cos = (s s' + t t')/2 with signs s, t of the two diagonal components).
/// </summary>
internal static class ClockSolution
{
    public const string Source = "L. Onsager, Phys. Rev. 65, 117 (1944) for q = 2, 4; R. J. Baxter, J. Phys. C 6, L445 (1973) for q = 3";

    /// <summary>The transition temperature for q = 2, 4 (J not 0) and q = 3 (J &gt; 0).</summary>
    public static ExactValue CriticalTemperature(int q, double j) => q switch
    {
        2 => IsingSolution.CriticalTemperature(j, j),
        3 => PottsSolution.CriticalTemperature(3, 1.5 * j),
        _ => IsingSolution.CriticalTemperature(j / 2, j / 2),
    };

    /// <summary>An exact value, or null where none is known.</summary>
    public static ExactValue? Exact(Quantity quantity, int q, double t, double j)
    {
        ExactValue? solved = q switch
        {
            2 => IsingSolution.At(t, j, j).Exact(quantity),
            3 when j > 0 => PottsSolution.AtTransition(quantity, 3, t, 1.5 * j),
            4 => IsingSolution.At(t, j / 2, j / 2).Exact(quantity),
            _ => null,
        };
        if (solved is null)
            return null;
        return q switch
        {
            2 => solved,
            3 => MappedValue.Shift(solved, quantity, 1, -j, t, "the 3-state Potts model with coupling 3J/2"),
            _ => MappedValue.Shift(solved, quantity, 2, 0, t, "two independent Ising models with coupling J/2"),
        };
    }
}
