using TensorRG.CoarseGraining;
using TensorRG.Models;

namespace TensorRG.Physics;

/// <summary>What a finished flow says about its model: the free energy with its bar, the exact value where one is known, the phase.</summary>
/// <param name="LogZPerSite">ln Z per site of the infinite lattice.</param>
/// <param name="FreeEnergyPerSite">f = -T ln Z / N with its bar; null for a model without a temperature.</param>
/// <param name="Exact">The exact ln Z per site, or null.</param>
/// <param name="DegeneracyRatio">X of the last step.</param>
/// <param name="Phase">What X says.</param>
/// <param name="Measure">D: the scheme's measure of all that was discarded, per site.</param>
public sealed record FlowSummary(
    Estimate LogZPerSite,
    Estimate? FreeEnergyPerSite,
    ExactValue? Exact,
    double DegeneracyRatio,
    PhaseReading Phase,
    double Measure)
{
    /// <summary>(value - exact) / |exact|, or NaN where no exact value is known.</summary>
    public double RelativeDeviation => Exact is null ? double.NaN : (LogZPerSite.Value - Exact.Value) / Math.Abs(Exact.Value);

    /// <summary>Whether the exact value lies inside the bar; null where none is known.</summary>
    public bool? IsCovered => Exact is null ? null : Math.Abs(LogZPerSite.Value - Exact.Value) <= LogZPerSite.Error + Exact.Uncertainty;

    /// <summary>Reads a flow.</summary>
    /// <param name="parameters">The model's parameters.</param>
    /// <param name="scheme">The scheme.</param>
    /// <param name="records">The records from step 0 on.</param>
    public static FlowSummary Of(ParameterSet parameters, SchemeDefinition scheme, IReadOnlyList<StepRecord> records)
    {
        ArgumentNullException.ThrowIfNull(parameters);
        ArgumentNullException.ThrowIfNull(scheme);
        ArgumentNullException.ThrowIfNull(records);
        Model model = parameters.Model;
        Estimate logZ = FreeEnergy.LogZPerSite(records, scheme, model.SitesPerVertex);
        return new FlowSummary(
            logZ,
            model.HasTemperature ? logZ.Times(-parameters.Temperature) : null,
            model.Exact(Quantity.LogZPerSite, parameters),
            records[^1].DegeneracyRatio,
            PhaseReading.Of(records),
            scheme.TruncationLaw.Measure(records) / model.SitesPerVertex);
    }
}
