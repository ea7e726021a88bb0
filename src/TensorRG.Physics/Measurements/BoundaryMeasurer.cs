using System.Collections.Immutable;
using System.Numerics;
using TensorRG.Boundary;
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
        var plan = BranchPlan.Of(system, inputs, requests);
        var remarks = new List<string> { plan.Symmetric.Choice, plan.SymmetryRemark };
        BranchReading symmetric = Read(plan.Symmetric, inputs, plan, plan.NeutralNames, null, progress, stop);
        BranchReading? broken = plan.Broken is { } network
            ? Read(network, inputs, plan, plan.BreakingNames, 0, progress, stop)
            : null;
        if (broken is not null)
            remarks.Add(broken.OrderRemark(symmetric, plan.OrderName));
        ImmutableArray<Measured> values = [.. requests.Select(r => Assemble(r, inputs.Parameters, r.Observable is { } o && plan.BreakingNames.Contains(o.Name) ? broken! : symmetric))];
        return new Measurement(values, [.. remarks.Where(static r => r.Length > 0)]);
    }

    private BranchReading Read(
        ModelNetwork network, MeasurementInputs inputs, BranchPlan plan, ImmutableArray<string> names, int? orderBy, IProgress<string>? progress, CancellationToken stop)
    {
        progress?.Report($"boundary fixed points, {(orderBy is null ? "symmetric" : "ordered")} state");
        int[] variances = [.. names.Select((name, i) => (name, i)).Where(x => plan.VarianceNames.Contains(x.name)).Select(static x => x.i)];
        return new BranchReading(names, network.Network.IsReal
            ? Run<double>(network, inputs, orderBy, variances, stop)
            : Run<Complex>(network, inputs, orderBy, variances, stop));
    }

    private IReadOnlyList<BranchPoint> Run<T>(ModelNetwork network, MeasurementInputs inputs, int? orderBy, int[] variances, CancellationToken stop)
        where T : unmanaged, INumberBase<T>
    {
        var settings = new BoundarySettings { BondDimension = inputs.BondDimension, Seed = inputs.Seed };
        using var branch = new BoundaryBranch<T>(backend, network, settings);
        return branch.Run(ChiSequence.Below(inputs.BondDimension), orderBy, variances, stop);
    }

    private static Measured Assemble(QuantityRequest request, ParameterSet parameters, BranchReading reading)
    {
        (Estimate value, double imaginary) = reading.Value(request);
        string remark = reading.IsConverged ? "" : "the boundary state did not converge: raise --bond-dimension, or use --method blocks";
        return new Measured(request.Name, request.Meaning, request.Unit, value, imaginary, reading.IsConverged, remark, ExactQuantities.Of(request, parameters));
    }
}
