namespace TensorRG.Models.Solutions;

/// <summary>Square clock model, parameters temperature, q and J: see <see cref="ClockSolution"/>.</summary>
internal sealed class KnownClockSquare : KnownSolution
{
    /// <inheritdoc/>
    public override string Name => "clock-square";

    /// <inheritdoc/>
    public override IReadOnlyList<ExactReference> References { get; } =
    [
        new(Quantity.LogZPerSite, "q = 2 and 4 at any T and J; q = 3 at the transition, J > 0", ClockSolution.Source),
        new(Quantity.EnergyPerSite, "q = 2 and 4 at any T and J; q = 3 at the transition, J > 0", ClockSolution.Source),
        new(Quantity.EntropyPerSite, "q = 2 and 4 at any T and J; q = 3 at the transition, J > 0", ClockSolution.Source),
        new(Quantity.LatentHeat, "q = 3, J > 0, whatever the temperature given: 0", PottsSolution.Source),
        new(Quantity.SpecificHeatPerSite, "q = 2 and 4 at any T and J", IsingSolution.OnsagerSource),
        new(Quantity.SpontaneousMagnetisation, "q = 2 and 4 at any T and J: length of the mean spin", IsingSolution.MagnetisationSource),
    ];

    /// <inheritdoc/>
    public override CriticalPoint CriticalTemperature(ParameterSet parameters)
    {
        int q = parameters.WholeNumber("q");
        double j = parameters["J"];
        return (q, j) switch
        {
            (_, 0) => CriticalPoint.None("with J = 0 the spins are independent"),
            ( >= 5, _) => CriticalPoint.None("for q >= 5 the two Kosterlitz-Thouless transitions are not known exactly"),
            (3, < 0) => CriticalPoint.None("the antiferromagnetic 3-state model (J < 0) does not order above zero temperature"),
            _ => CriticalPoint.At(ClockSolution.CriticalTemperature(q, j)),
        };
    }

    /// <inheritdoc/>
    public override VertexNetwork? Network(ParameterSet parameters)
    {
        int q = parameters.WholeNumber("q");
        ClockWeights weights = ClockWeights.At(q, parameters["J"] / parameters.Temperature);
        return CyclicNetwork.Graded(weights.Ratios, weights.Ratios, (2 * weights.LogLargest) - Math.Log(q));
    }

    /// <inheritdoc/>
    protected override ExactValue? Find(string quantity, ParameterSet parameters)
        => QuantityNames.Find(quantity) is { } known
            ? ClockSolution.Exact(known, parameters.WholeNumber("q"), parameters.Temperature, parameters["J"])
            : null;
}
