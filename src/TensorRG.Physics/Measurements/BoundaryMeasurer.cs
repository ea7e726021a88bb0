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
    /// <summary>Blocks cost chi^7.</summary>
    private const int LargestOfBlocks = 16;

    /// <inheritdoc/>
    public Measurement Measure(MeasurementInputs inputs, IProgress<string>? progress, CancellationToken stop)
    {
        ArgumentNullException.ThrowIfNull(inputs);
        ImmutableArray<QuantityRequest> requests = QuantityCatalogue.Read(inputs);
        LatticeSystem system = QuantityCatalogue.SystemOf(inputs.Parameters);
        var plan = new BranchPlan(system, inputs, requests);
        Estimate second = FlowCheck.LogZ(plan.Symmetric.Model.Network, backend);
        BranchReading? symmetric = Dominant(plan.Symmetric);
        if (inputs.Form == NetworkForm.Auto && plan.Symmetric.Model.Form == NetworkForm.Row && !(symmetric?.LogZ.Error <= second.Error))
            return Measure(inputs with { Form = NetworkForm.Face }, progress, stop); // Rows that are far from symmetric can lead astray.
        if (symmetric is null)
            return Blocks(inputs, progress, stop);
        BranchReading[] ordered = [.. Ordered(plan)];
        ImmutableArray<Measured> values = [.. requests.Select(r => Assemble(r, inputs.Parameters, ordered.FirstOrDefault(o => o.Has(r)) ?? symmetric))];
        return new Measurement(values, [.. plan.Remarks, .. ordered.Select(o => o.OrderRemark(symmetric))]);

        // Null where no fixed point is found, or one that is not the dominant one.
        BranchReading? Dominant(Branch branch)
        {
            try
            {
                return Read(branch) is { Disagreement: 0 } reading ? reading : null;
            }
            catch (DecompositionException)
            {
                return null;
            }
        }

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

    /// <summary>The other method, where this one fails: it has no fixed point to miss.</summary>
    private Measurement Blocks(MeasurementInputs inputs, IProgress<string>? progress, CancellationToken stop)
    {
        MeasurementInputs other = inputs with { Method = "blocks", BondDimension = Math.Min(inputs.BondDimension, LargestOfBlocks) };
        Measurement measured = new BlockMeasurer(backend).Measure(other, progress, stop);
        string remark = FormattableString.Invariant($"The boundary method finds no fixed point that agrees with coarse-graining, so these are numbers of the method blocks at bond dimension {other.BondDimension}.");
        return measured with { Remarks = [remark, .. measured.Remarks] };
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
