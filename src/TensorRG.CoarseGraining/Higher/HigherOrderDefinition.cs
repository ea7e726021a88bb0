using TensorRG.Tensors;

namespace TensorRG.CoarseGraining.Higher;

/// <summary>Coarse-graining by the higher-order singular value decomposition.</summary>
internal sealed class HigherOrderDefinition : SchemeDefinition
{
    /// <inheritdoc/>
    public override string Name => "hotrg";

    /// <inheritdoc/>
    public override string Summary => "higher-order tensor renormalisation group: join two tensors, cut the doubled bonds by an isometry";

    /// <inheritdoc/>
    public override string Source => "Z. Y. Xie, J. Chen, M. P. Qin, J. W. Zhu, L. P. Yang, T. Xiang, Phys. Rev. B 86, 045139 (2012)";

    /// <inheritdoc/>
    public override double CostExponent => 7;

    /// <inheritdoc/>
    public override TruncationLaw TruncationLaw => new(2, 4, 0);

    /// <inheritdoc/>
    public override IScheme<T> Create<T>(TensorAlgebra<T> algebra, SchemeSettings settings)
        => new HigherOrderScheme<T>(algebra, settings);
}
