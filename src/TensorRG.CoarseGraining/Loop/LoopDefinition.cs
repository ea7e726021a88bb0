using TensorRG.Tensors;

namespace TensorRG.CoarseGraining.Loop;

/// <summary>Loop-optimised tensor-network renormalisation. Not registered yet: at equal time it is no better for ln Z than what is (DEVELOPERS.md, Decisions).</summary>
internal sealed class LoopDefinition : SchemeDefinition
{
    /// <inheritdoc/>
    public override string Name => "loop";

    /// <inheritdoc/>
    public override string Summary => "loop optimisation: filter the plaquettes, then split whole rings of four tensors variationally";

    /// <inheritdoc/>
    public override string Source => "S. Yang, Z.-C. Gu, X.-G. Wen, Phys. Rev. Lett. 118, 110504 (2017)";

    /// <inheritdoc/>
    public override double CostExponent => 6;

    /// <summary>On the relative costs of the rings. Not calibrated: an upper estimate from the critical square Ising model and T = 2.5 at chi = 8 and 12.</summary>
    public override TruncationLaw TruncationLaw => new(1, 10, 0);

    /// <inheritdoc/>
    public override IScheme<T> Create<T>(TensorAlgebra<T> algebra, SchemeSettings settings)
    {
        ArgumentNullException.ThrowIfNull(settings);
        return new LoopScheme<T>(algebra, settings);
    }
}
