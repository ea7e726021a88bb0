using TensorRG.Models;

namespace TensorRG.Physics.Measurements;

/// <summary>The exact value of a requested quantity, where the model knows one.</summary>
internal static class ExactQuantities
{
    /// <summary>The exact value, or null.</summary>
    /// <param name="request">The quantity.</param>
    /// <param name="parameters">The model's parameters.</param>
    public static ExactValue? Of(QuantityRequest request, ParameterSet parameters)
    {
        if (request.Kind != QuantityKind.FreeEnergy)
            return parameters.Model.Exact(request.Name, parameters);
        ExactValue? logZ = parameters.Model.Exact("ln-z", parameters);
        return logZ is null ? null : logZ with { Value = request.Factor * logZ.Value, Uncertainty = Math.Abs(request.Factor) * logZ.Uncertainty };
    }
}
