namespace TensorRG.Models.Solutions;

/// <summary>Hard hexagons, parameter z (the activity): see <see cref="HardHexagons"/>.</summary>
internal sealed class KnownHardHexagons : KnownSolution
{
    /// <inheritdoc/>
    public override string Name => "hard-hexagons";

    /// <inheritdoc/>
    public override IReadOnlyList<ExactReference> References { get; } =
    [
        new(Quantity.LogZPerSite, "any z", HardHexagons.Source),
        new(Quantity.Density, "any z; above z_c the mean of the three sublattices", HardHexagons.Source),
        new(Quantity.EntropyPerSite, "any z: ln Z - density ln z", HardHexagons.Source),
    ];

    /// <inheritdoc/>
    protected override ExactValue? Find(string quantity, ParameterSet parameters)
    {
        double z = parameters["z"];
        if (!(z > 0) || quantity is not ("ln-z" or "density" or "entropy"))
            return null;
        (double logKappa, double density) = HardHexagons.At(z);
        // The density has the slope |ln z - ln z_c|^(-1/3) at the transition.
        double distance = Math.Max(1e-15, Math.Abs(Math.Log(z) - HardHexagons.LogCritical));
        double steep = 2e-14 + (4e-15 / Math.Cbrt(distance));
        return quantity switch
        {
            "ln-z" => new ExactValue(logKappa, 2e-14 * Math.Max(1, Math.Abs(logKappa)), HardHexagons.Source, "products in x, x from z by bisection"),
            "density" => new ExactValue(density, steep, HardHexagons.Source, "products in x, x from z by bisection"),
            _ => new ExactValue(logKappa - (density * Math.Log(z)), 2e-14 + (Math.Abs(Math.Log(z)) * steep), HardHexagons.Source, "ln Z - density ln z"),
        };
    }
}
