using System.Collections.Immutable;
using System.Numerics;
using TensorRG.CoarseGraining;
using TensorRG.Models;
using TensorRG.Models.Lattices;
using TensorRG.Physics;
using TensorRG.Physics.Measurements;
using TensorRG.Tensors;
using TensorRG.Tensors.Decompositions;
using TensorRG.Tensors.Kernels;

namespace TensorRG.Cli.Execution;

/// <summary>Measures what a bond-weighted flow gives: ln Z and the free energy of the infinite lattice.</summary>
/// <param name="backend">Linear algebra.</param>
internal sealed class FlowMeasurer(Backend backend) : IMeasurer
{
    private const string LogZ = "ln-z";
    private const string FreeEnergyName = "free-energy";

    /// <summary>The last steps may still move a converged value by this much.</summary>
    private const double Settled = 1e-9;

    public Measurement Measure(MeasurementInputs inputs, IProgress<string>? progress, CancellationToken stop)
    {
        Check(inputs);
        ParameterSet parameters = inputs.Parameters;
        VertexNetwork network = parameters.Model.Network(parameters);
        IReadOnlyList<StepRecord> records = network.IsReal
            ? Run<double>(network, inputs, progress, stop)
            : Run<Complex>(network, inputs, progress, stop);
        FlowSummary summary = FlowSummary.Of(parameters, SchemeRegistry.Default, records);
        return new Measurement([.. inputs.Quantities.Select(q => Value(q, summary, parameters))], [summary.Phase.Summary]);
    }

    private static void Check(MeasurementInputs inputs)
    {
        string[] known = inputs.Parameters.Model.HasTemperature ? [LogZ, FreeEnergyName] : [LogZ];
        string? unknown = inputs.Quantities.FirstOrDefault(q => !known.Contains(q));
        if (unknown is not null)
            throw new ModelException($"'{unknown}' of model '{inputs.Parameters.Model.Name}' cannot be measured.{NameSuggestion.Text(unknown, known)} There are: {string.Join(", ", known)}.");
        if (inputs.TorusLength is not null || inputs.Method != "boundary" || inputs.Form != NetworkForm.Auto)
            throw new ModelException("Only the infinite lattice is measured, with --method boundary and --form auto. Leave out --torus, --method and --form.");
    }

    private IReadOnlyList<StepRecord> Run<T>(VertexNetwork network, MeasurementInputs inputs, IProgress<string>? progress, CancellationToken stop)
        where T : unmanaged, INumberBase<T>
    {
        var settings = new SchemeSettings(new CutRule(inputs.BondDimension)) { Seed = inputs.Seed };
        var flow = new Flow<T>(SchemeRegistry.Default.Create(new TensorAlgebra<T>(backend), settings), NetworkTensors.Build<T>(network));
        while (flow.Step < Input.FlowOptions.DefaultSteps)
        {
            stop.ThrowIfCancellationRequested();
            flow.Advance();
            progress?.Report(FormattableString.Invariant($"step {flow.Step} of {Input.FlowOptions.DefaultSteps}"));
        }

        return flow.Records;
    }

    private static Measured Value(string name, FlowSummary summary, ParameterSet parameters)
    {
        bool isConverged = summary.LogZPerSite.Parts[1].Value <= Settled;
        string remark = isConverged ? "" : "The last steps still moved it.";
        if (name == LogZ)
            return new Measured(name, "ln Z per site", "none", summary.LogZPerSite, 0, isConverged, remark, summary.Exact);
        double t = parameters.Temperature;
        ExactValue? exact = summary.Exact is { } e ? e with { Value = -t * e.Value, Uncertainty = t * e.Uncertainty } : null;
        return new Measured(name, "free energy per site, f = -T ln Z / N", "energy", summary.FreeEnergyPerSite!, 0, isConverged, remark, exact);
    }
}
