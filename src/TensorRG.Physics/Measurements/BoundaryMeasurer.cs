using System.Collections.Immutable;
using System.Numerics;
using TensorRG.Models;
using TensorRG.Models.Lattices;
using TensorRG.Tensors.Kernels;

namespace TensorRG.Physics.Measurements;

/// <summary>
/// Measures on the infinite lattice with the fixed points of the row-to-row transfer matrix. Neutral quantities come from the symmetric
/// state; observables that break the symmetry from a state chosen by a field that is then switched off.
/// </summary>
/// <param name="backend">Where the linear algebra runs.</param>
internal sealed class BoundaryMeasurer(Backend backend) : IMeasurer
{
    /// <inheritdoc/>
    public Measurement Measure(MeasurementInputs inputs, IProgress<string>? progress, CancellationToken stop)
    {
        ArgumentNullException.ThrowIfNull(inputs);
        ImmutableArray<QuantityRequest> requests = QuantityCatalogue.Read(inputs);
        LatticeSystem system = QuantityCatalogue.SystemOf(inputs.Parameters);
        var plan = new BranchPlan(system, inputs, requests);
        Estimate second = FlowCheck.LogZ(plan.Symmetric.Model.Network, backend);
        BranchReading symmetric = Read(plan.Symmetric);
        if ((symmetric.Disagreement > 0 || symmetric.LogZ.Error > second.Error) && inputs.Form == NetworkForm.Auto && plan.Symmetric.Model.Form == NetworkForm.Row)
            return Measure(inputs with { Form = NetworkForm.Face }, progress, stop); // Rows that are far from symmetric can lead astray.
        BranchReading[] ordered = [.. Ordered(plan)];
        ImmutableArray<Measured> values = [.. requests.Select(r => Assemble(r, inputs.Parameters, ordered.FirstOrDefault(o => o.Has(r)) ?? symmetric))];
        return new Measurement(values, [.. plan.Remarks, .. ordered.Select(o => o.OrderRemark(symmetric))]);

        BranchReading Read(Branch branch)
        {
            progress?.Report($"boundary fixed points, {(branch.IsOrdered ? "ordered" : "symmetric")} state");
            var reading = new BranchReading(branch.Names, branch.IsOrdered, branch.IsReal ? Run<double>(branch, inputs, stop) : Run<Complex>(branch, inputs, stop));
            return reading with { Disagreement = FlowCheck.Disagreement(reading.LogZ, second) };
        }

        IEnumerable<BranchReading> Ordered(BranchPlan p)
        {
            if (p.Uniform is { } uniform)
                yield return Read(uniform) is { Alternates: false } plain ? plain : Read(p.UniformInBlocks());
            if (p.Alternating is { } alternating)
                yield return Read(alternating);
        }
    }

    private IReadOnlyList<BranchPoint> Run<T>(Branch branch, MeasurementInputs inputs, CancellationToken stop)
        where T : unmanaged, INumberBase<T>
    {
        using var states = new BoundaryBranch<T>(backend, branch, inputs.Seed);
        return states.Run(ChiSequence.Below(inputs.BondDimension), stop);
    }

    private static Measured Assemble(QuantityRequest request, ParameterSet parameters, BranchReading reading)
    {
        (Estimate value, double imaginary) = reading.Value(request);
        string doubt = reading.Doubt(value);
        return new Measured(request.Name, request.Meaning, request.Unit, value, imaginary, doubt.Length == 0, doubt, ExactQuantities.Of(request, parameters));
    }
}
