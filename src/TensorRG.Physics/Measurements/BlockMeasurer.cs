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
        var plan = new BranchPlan(system, inputs, requests);
        BlockReading symmetric = Read(plan.Symmetric);
        Branch[] branches = [.. new[] { plan.Uniform, plan.Alternating }.OfType<Branch>()];
        BlockReading[] ordered = [.. branches.Select(Read)];
        ImmutableArray<Measured> values = [.. requests.Select(r => Assemble(r, inputs, ordered.FirstOrDefault(o => o.Has(r)) ?? symmetric))];
        return new Measurement(values, [.. plan.Remarks, .. Remarks(inputs, branches)]);

        BlockReading Read(Branch branch) => this.Read(branch, inputs, system, requests, progress, stop);
    }

    private static IEnumerable<string> Remarks(MeasurementInputs inputs, Branch[] ordered)
    {
        if (inputs.TorusLength is { } length)
            yield return FormattableString.Invariant($"Torus of {length} x {length} cells.");
        else if (ordered.Length > 0)
            yield return $"Observables that break the symmetry ({string.Join(", ", ordered.SelectMany(static b => b.Names))}) are root mean squares on a torus of 2^{Doublings} vertices a side: the modulus of the spontaneous value where there is order.";
    }

    private BlockReading Read(
        Branch branch, MeasurementInputs inputs, LatticeSystem system, ImmutableArray<QuantityRequest> requests, IProgress<string>? progress, CancellationToken stop)
    {
        int steps = inputs.TorusLength is { } length ? Steps(length, branch.Model.Network.SitesPerVertex / system.SitesPerCell) : 2 * Doublings;
        int[] orders = [.. branch.Names.Select(name => Math.Max(branch.IsOrdered ? 2 : 1, Order(name, requests)))];
        int[] sequence = [Math.Max(1, 2 * inputs.BondDimension / 3), inputs.BondDimension];
        var flows = new List<IReadOnlyList<MomentRecord>>();
        foreach (int chi in sequence)
        {
            progress?.Report(FormattableString.Invariant($"moments, chi = {chi}"));
            flows.Add(branch.IsReal ? Flow<double>(branch.Model, orders, chi, steps, stop) : Flow<Complex>(branch.Model, orders, chi, steps, stop));
        }

        return new BlockReading(branch.Names, flows, inputs.TorusLength is not null, branch.IsOrdered);
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
