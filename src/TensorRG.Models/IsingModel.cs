using TensorRG.Models.Solutions;

namespace TensorRG.Models;

/// <summary>
/// Square-lattice Ising model, spins s = +1, -1:
/// E = -Jx sum s s' over horizontal bonds - Jy sum s s' over vertical bonds - h sum s.
/// </summary>
public sealed class IsingModel : Model
{
    /// <inheritdoc/>
    public override string Name => "ising";

    /// <inheritdoc/>
    public override string Title => "Ising model on the square lattice";

    /// <inheritdoc/>
    public override string Description =>
        "Spins s = +1 or -1 on the square lattice with E = -Jx sum s s' (horizontal bonds) - Jy sum s s' (vertical bonds) - h sum s. "
        + "Without a field it orders below the temperature where sinh(2|Jx|/T) sinh(2|Jy|/T) = 1; negative couplings order antiferromagnetically.";

    /// <inheritdoc/>
    public override string Lattice => "square";

    /// <inheritdoc/>
    public override int SitesPerVertex => 1;

    /// <inheritdoc/>
    public override string Symmetry => "Z2 (spin flip) for h = 0, none otherwise";

    /// <inheritdoc/>
    public override IReadOnlyList<ParameterDefinition> Parameters { get; } =
    [
        ParameterDefinition.Temperature(2.269185314213022),
        ParameterDefinition.Energy("Jx", 1, "Coupling of horizontal neighbours; positive is ferromagnetic"),
        ParameterDefinition.Energy("Jy", 1, "Coupling of vertical neighbours; positive is ferromagnetic"),
        ParameterDefinition.Energy("h", 0, "Magnetic field"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<ParameterShorthand> Shorthands { get; } =
        [new("J", ["Jx", "Jy"], "Sets Jx and Jy to the same value")];

    /// <inheritdoc/>
    public override IReadOnlyList<ExactReference> ExactReferences { get; } =
    [
        new(Quantity.LogZPerSite, "h = 0, any T, Jx, Jy", IsingSolution.OnsagerSource),
        new(Quantity.EnergyPerSite, "h = 0, any T, Jx, Jy", IsingSolution.OnsagerSource),
        new(Quantity.SpecificHeatPerSite, "h = 0, any T, Jx, Jy", IsingSolution.OnsagerSource),
        new(Quantity.SpontaneousMagnetisation, "h = 0, any T, Jx, Jy", IsingSolution.MagnetisationSource),
    ];

    /// <inheritdoc/>
    protected override CriticalPoint FindCriticalTemperature(ParameterSet parameters)
    {
        if (parameters["h"] != 0)
            return CriticalPoint.None("a magnetic field removes the transition of the ferromagnet, and that of the antiferromagnet in a field is not known exactly");
        if (parameters["Jx"] == 0 || parameters["Jy"] == 0)
            return CriticalPoint.None("with Jx = 0 or Jy = 0 the lattice falls apart into chains, which do not order at any temperature above zero");
        return CriticalPoint.At(IsingSolution.CriticalTemperature(parameters["Jx"], parameters["Jy"]));
    }

    /// <inheritdoc/>
    protected override VertexNetwork BuildNetwork(ParameterSet parameters)
    {
        double t = parameters.Temperature;
        double kx = parameters["Jx"] / t, ky = parameters["Jy"] / t, field = parameters["h"] / t;
        double logPrefactor = Constants.Ln2 + Elementary.LogCosh(kx) + Elementary.LogCosh(ky) + Elementary.LogCosh(field);
        double[] vertical = [1, Math.Tanh(ky)], horizontal = [1, Math.Tanh(kx)];
        return field == 0
            ? CyclicNetwork.Graded(vertical, horizontal, logPrefactor)
            : CyclicNetwork.WithField(vertical, horizontal, [1, Math.Tanh(field)], logPrefactor);
    }

    /// <inheritdoc/>
    protected override ExactValue? FindExact(Quantity quantity, ParameterSet parameters)
        => parameters["h"] == 0
            ? IsingSolution.At(parameters.Temperature, parameters["Jx"], parameters["Jy"]).Exact(quantity)
            : null;
}
