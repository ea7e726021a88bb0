namespace TensorRG.Models.Solutions;

/// <summary>Kagome Ising model, parameters temperature, J and, if there is one, h = 0: see <see cref="KagomeIsing"/>.</summary>
internal sealed class KnownIsingKagome : KnownSolution
{
    private const string Source = "K. Kano, S. Naya, Prog. Theor. Phys. 10, 158 (1953)";
    private const string OrderSource = "S. Naya, Prog. Theor. Phys. 11, 53 (1954)";

    /// <inheritdoc/>
    public override string Name => "ising-kagome";

    /// <inheritdoc/>
    public override IReadOnlyList<ExactReference> References { get; } =
    [
        new(Quantity.LogZPerSite, "h = 0, any T and J", Source),
        new(Quantity.EnergyPerSite, "h = 0, any T and J", Source),
        new(Quantity.EntropyPerSite, "h = 0, any T and J", Source),
        new(Quantity.SpecificHeatPerSite, "h = 0, any T and J", Source),
        new(Quantity.SpontaneousMagnetisation, "h = 0, any T and J", OrderSource),
    ];

    /// <inheritdoc/>
    public override CriticalPoint CriticalTemperature(ParameterSet parameters)
    {
        double j = parameters["J"];
        if (HasField(parameters))
            return CriticalPoint.None("in a magnetic field no transition temperature is known exactly");
        if (j <= 0)
            return CriticalPoint.None("the antiferromagnet on this lattice is frustrated and stays disordered down to zero temperature");
        double value = 4 * j / Math.Log(3 + (2 * Math.Sqrt(3)));
        return CriticalPoint.At(new ExactValue(value, 4 * Constants.Epsilon * value, Source, "4 J / ln(3 + 2 sqrt 3)"));
    }

    /// <inheritdoc/>
    protected override ExactValue? Find(string quantity, ParameterSet parameters)
        => HasField(parameters) ? null : KagomeIsing.Values(parameters.Temperature, parameters["J"]).Exact(quantity, Source, OrderSource);
}
