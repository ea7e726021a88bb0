using TensorRG.Tensors;

namespace TensorRG.CoarseGraining.Plaquette;

/// <summary>The bond-weighted tensor renormalisation group.</summary>
internal sealed class BondWeightedDefinition : SchemeDefinition
{
    /// <inheritdoc/>
    public override string Name => "bond-weighted";

    /// <inheritdoc/>
    public override string Summary => "as trg, with part of the singular values left on the bonds: the most accurate per second here";

    /// <inheritdoc/>
    public override string Source => "D. Adachi, T. Okubo, S. Todo, Phys. Rev. B 105, L060402 (2022)";

    /// <inheritdoc/>
    public override bool UsesBondExponent => true;

    /// <inheritdoc/>
    public override double CostExponent => 5;

    /// <inheritdoc/>
    public override TruncationLaw TruncationLaw => new(1, 1.2, 5e-4);

    /// <inheritdoc/>
    public override IScheme<T> Create<T>(TensorAlgebra<T> algebra, SchemeSettings settings)
    {
        ArgumentNullException.ThrowIfNull(settings);
        return new PlaquetteScheme<T>(algebra, settings, settings.BondExponent);
    }
}
