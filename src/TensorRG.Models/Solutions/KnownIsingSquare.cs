namespace TensorRG.Models.Solutions;

/// <summary>Square Ising model, parameters temperature, Jx, Jy and, if there is one, h = 0: see <see cref="IsingSolution"/>.</summary>
internal sealed class KnownIsingSquare : KnownSolution
{
    /// <inheritdoc/>
    public override string Name => "ising-square";

    /// <inheritdoc/>
    public override IReadOnlyList<ExactReference> References { get; } =
    [
        new(Quantity.LogZPerSite, "h = 0, any T, Jx, Jy", IsingSolution.OnsagerSource),
        new(Quantity.EnergyPerSite, "h = 0, any T, Jx, Jy", IsingSolution.OnsagerSource),
        new(Quantity.EntropyPerSite, "h = 0, any T, Jx, Jy", IsingSolution.OnsagerSource),
        new(Quantity.SpecificHeatPerSite, "h = 0, any T, Jx, Jy", IsingSolution.OnsagerSource),
        new(Quantity.SpontaneousMagnetisation, "h = 0, any T, Jx, Jy", IsingSolution.MagnetisationSource),
    ];

    /// <inheritdoc/>
    public override CriticalPoint CriticalTemperature(ParameterSet parameters)
    {
        if (HasField(parameters))
            return CriticalPoint.None("a magnetic field removes the transition of the ferromagnet, and that of the antiferromagnet in a field is not known exactly");
        if (parameters["Jx"] == 0 || parameters["Jy"] == 0)
            return CriticalPoint.None("with Jx = 0 or Jy = 0 the lattice falls apart into chains, which do not order at any temperature above zero");
        return CriticalPoint.At(IsingSolution.CriticalTemperature(parameters["Jx"], parameters["Jy"]));
    }

    /// <inheritdoc/>
    public override VertexNetwork? Network(ParameterSet parameters)
    {
        double t = parameters.Temperature;
        double kx = parameters["Jx"] / t, ky = parameters["Jy"] / t;
        double logPrefactor = Constants.Ln2 + Elementary.LogCosh(kx) + Elementary.LogCosh(ky);
        double[] vertical = [1, Math.Tanh(ky)], horizontal = [1, Math.Tanh(kx)];
        if (!HasField(parameters))
            return CyclicNetwork.Graded(vertical, horizontal, logPrefactor);
        if (!parameters.Model.Parameters.Any(p => p.IsCalled("h")))
            return null;
        double field = parameters["h"] / t;
        return CyclicNetwork.WithField(vertical, horizontal, [1, Math.Tanh(field)], logPrefactor + Elementary.LogCosh(field));
    }

    /// <inheritdoc/>
    protected override ExactValue? Find(string quantity, ParameterSet parameters)
    {
        if (HasField(parameters))
            return null;
        IsingSolution solution = IsingSolution.At(parameters.Temperature, parameters["Jx"], parameters["Jy"]);
        return QuantityNames.Find(quantity) is { } known ? solution.Exact(known) : null;
    }
}
