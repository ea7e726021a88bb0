using TensorRG.Tensors;

namespace TensorRG.CoarseGraining.Plaquette;

/// <summary>The tensor renormalisation group of Levin and Nave.</summary>
internal sealed class LevinNaveDefinition : SchemeDefinition
{
    /// <inheritdoc/>
    public override string Name => "trg";

    /// <inheritdoc/>
    public override string Summary => "tensor renormalisation group: split along diagonals, join round plaquettes";

    /// <inheritdoc/>
    public override string Source => "M. Levin, C. P. Nave, Phys. Rev. Lett. 99, 120601 (2007)";

    /// <inheritdoc/>
    public override double CostExponent => 5;

    /// <inheritdoc/>
    public override TruncationLaw TruncationLaw => new(1, 1.2, 1e-4);

    /// <inheritdoc/>
    public override IScheme<T> Create<T>(TensorAlgebra<T> algebra, SchemeSettings settings)
        => new PlaquetteScheme<T>(algebra, settings, 0);
}
