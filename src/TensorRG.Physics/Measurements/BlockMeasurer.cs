using System.Collections.Immutable;
using System.Numerics;
using TensorRG.CoarseGraining;
using TensorRG.CoarseGraining.Moments;
using TensorRG.Models;
using TensorRG.Models.Lattices;
using TensorRG.Tensors;
using TensorRG.Tensors.Decompositions;
using TensorRG.Tensors.Kernels;

namespace TensorRG.Physics.Measurements;

/// <summary>
/// Measures with HOTRG and impurity tensors: moments of finite tori, and observables of the infinite lattice as those of a torus of 2^20 vertices a side.
/// A second method beside the boundary fixed points.
/// </summary>
/// <param name="backend">Where the linear algebra runs.</param>
internal sealed class BlockMeasurer(Backend backend) : IMeasurer
{
    /// <summary>Doublings of either side that stand for the infinite lattice.</summary>
    private const int Doublings = 20;

    /// <inheritdoc/>
    public Measurement Measure(MeasurementInputs inputs, IProgress<string>? progress, CancellationToken stop)
    {
        ArgumentNullException.ThrowIfNull(inputs);
        ImmutableArray<QuantityRequest> requests = QuantityCatalogue.Read(inputs);
        LatticeSystem system = QuantityCatalogue.SystemOf(inputs.Parameters);
        var plan = BranchPlan.Of(system, inputs, requests);
        BlockReading neutral = Read(plan.Symmetric, plan.NeutralNames, false, inputs, system, requests, progress, stop);
        BlockReading? breaking = plan.Broken is { } network ? Read(network, plan.BreakingNames, true, inputs, system, requests, progress, stop) : null;
        ImmutableArray<Measured> values = [.. requests.Select(r => Assemble(r, inputs, r.Observable is { } o && plan.BreakingNames.Contains(o.Name) ? breaking! : neutral))];
        return new Measurement(values, [.. Remarks(plan, inputs, breaking)]);
    }

    private static IEnumerable<string> Remarks(BranchPlan plan, MeasurementInputs inputs, BlockReading? breaking)
    {
        yield return plan.Symmetric.Choice;
        if (inputs.TorusLength is { } length)
            yield return FormattableString.Invariant($"Torus of {length} x {length} cells.");
        else if (breaking is not null)
            yield return $"Observables that break the symmetry ({string.Join(", ", plan.BreakingNames)}) are root mean squares on a torus of 2^{Doublings} vertices a side: the modulus of the spontaneous value where there is order.";
    }

    private BlockReading Read(
        ModelNetwork network,
        ImmutableArray<string> names,
        bool breaks,
        MeasurementInputs inputs,
        LatticeSystem system,
        ImmutableArray<QuantityRequest> requests,
        IProgress<string>? progress,
        CancellationToken stop)
    {
        int steps = inputs.TorusLength is { } length ? Steps(length, network.Network.SitesPerVertex / system.SitesPerCell) : 2 * Doublings;
        int[] orders = [.. names.Select(name => breaks ? Math.Max(2, Order(name, requests)) : Order(name, requests))];
        int[] sequence = [Math.Max(1, 2 * inputs.BondDimension / 3), inputs.BondDimension];
        var flows = new List<IReadOnlyList<MomentRecord>>();
        foreach (int chi in sequence)
        {
            progress?.Report(FormattableString.Invariant($"moments, chi = {chi}"));
            flows.Add(network.Network.IsReal ? Flow<double>(network, orders, chi, steps, stop) : Flow<Complex>(network, orders, chi, steps, stop));
        }

        return new BlockReading(names, flows, inputs.TorusLength is not null, breaks);
    }

    private IReadOnlyList<MomentRecord> Flow<T>(ModelNetwork network, int[] orders, int chi, int steps, CancellationToken stop)
        where T : unmanaged, INumberBase<T>
    {
        InitialNetwork<T> start = NetworkTensors.Build<T>(network.Network);
        Tensor<T>[][] insertions = [.. network.Impurities.Select((impurity, i) =>
            Enumerable.Range(1, orders[i]).Select(n => NetworkTensors.Insertion<T>(network.Network, impurity, n)).ToArray())];
        var flow = new MomentFlow<T>(new TensorAlgebra<T>(backend), new CutRule(chi), start, insertions);
        while (flow.Step < steps)
        {
            stop.ThrowIfCancellationRequested();
            flow.Advance();
        }

        return [.. flow.Records];
    }

    /// <summary>The highest power of an observable that the request needs.</summary>
    private static int Order(string name, ImmutableArray<QuantityRequest> requests)
        => requests.Where(r => r.Observable?.Name == name).Max(static r => r.Power);

    /// <summary>Steps to a torus of that many cells a side, from vertices of 1 or 2 x 2 cells.</summary>
    private static int Steps(int length, int cellsPerVertex)
    {
        int side = (int)Math.Round(Math.Sqrt(cellsPerVertex));
        return length >= side && int.IsPow2(length)
            ? 2 * int.Log2(length / side)
            : throw new ModelException($"--torus takes a power of two, at least {side} here, not {length}.");
    }

    private static Measured Assemble(QuantityRequest request, MeasurementInputs inputs, BlockReading reading)
    {
        (Estimate value, double imaginary) = reading.Value(request);
        ExactValue? exact = reading.IsTorus ? null : ExactQuantities.Of(request, inputs.Parameters);
        bool isFinite = double.IsFinite(value.Value) && double.IsFinite(value.Error);
        return new Measured(request.Name, request.Meaning, request.Unit, value, imaginary, isFinite, isFinite ? "" : "Z of this torus is zero", exact);
    }
}
