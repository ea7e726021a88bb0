using System.Collections.Immutable;
using TensorRG.Models.Files;
using TensorRG.Models.Lattices;

namespace TensorRG.Physics.Measurements;

/// <summary>
/// The networks of a measurement: the symmetric one for neutral quantities, one without charges for observables that break the symmetry, and one of
/// blocks of 2 x 2 cells for those that alternate from cell to cell.
/// </summary>
internal sealed class BranchPlan
{
    /// <summary>Measured on triangular and next-nearest-neighbour Ising at Tc: at chi = 16 ln Z is forty times closer than in the face form, whose rows carry every site twice.</summary>
    private const string RowChoice = "The row form: terms reach across a face, and with one site on a vertical leg a row needs the fewest states.";

    private readonly LatticeSystem _system;
    private readonly MeasurementInputs _inputs;
    private readonly ImmutableArray<QuantityRequest> _requests;

    /// <summary>Sorts the observables of a request by what they do to the symmetry.</summary>
    /// <param name="system">The model.</param>
    /// <param name="inputs">The request.</param>
    /// <param name="requests">What was asked for.</param>
    public BranchPlan(LatticeSystem system, MeasurementInputs inputs, ImmutableArray<QuantityRequest> requests)
    {
        (_system, _inputs, _requests) = (system, inputs, requests);
        LocalObservable[] wanted = [.. requests.Select(static r => r.Observable).OfType<LocalObservable>().DistinctBy(static o => o.Name).OrderByDescending(static o => o.IsOrderParameter)];
        ImmutableArray<string> uniform = [.. wanted.Where(o => !Alternates(o)).Select(static o => o.Name)];
        Branch all = Create(uniform, isOrdered: false);
        HashSet<string> breaking = [.. all.Model.Impurities.Where(i => Branch.Breaks(all.Model.Network, i)).Select(static i => i.Name)];
        Symmetric = breaking.Count == 0 ? all : Create([.. uniform.Where(n => !breaking.Contains(n))], isOrdered: false);
        Uniform = breaking.Count == 0 ? null : Create([.. uniform.Where(breaking.Contains)], isOrdered: true);
        ImmutableArray<string> alternating = [.. wanted.Where(Alternates).Select(static o => o.Name)];
        Alternating = alternating.IsEmpty ? null : Create(alternating, isOrdered: true);
    }

    /// <summary>The graded network with the neutral observables.</summary>
    public Branch Symmetric { get; }

    /// <summary>The network without charges and with the uniform observables that break the symmetry; null if none is asked for.</summary>
    public Branch? Uniform { get; }

    /// <summary>The network of blocks with the observables that alternate; null if none is asked for.</summary>
    public Branch? Alternating { get; }

    /// <summary>What a reader must know of the networks.</summary>
    public IEnumerable<string> Remarks => Symmetric.Model.Network.GroupOrders.IsEmpty
        ? [Symmetric.Model.Choice]
        : [Symmetric.Model.Choice, $"Symmetry in use: {Symmetric.Model.Symmetry}."];

    /// <summary>The network without charges in blocks of 2 x 2 cells, for a uniform order that the plain network cannot hold.</summary>
    public Branch UniformInBlocks() => Create(Uniform!.Names, isOrdered: true, inBlocks: true);

    /// <summary>The form asked for, else that of the model's file.</summary>
    private NetworkForm Form => _inputs.Form == NetworkForm.Auto && _inputs.Parameters.Model is FileModel file ? file.Form : _inputs.Form;

    private bool Alternates(LocalObservable observable) => observable.IsStaggered && _system.Lattice != LatticeKind.Honeycomb;

    private Branch Create(ImmutableArray<string> names, bool isOrdered, bool inBlocks = false)
    {
        var options = new NetworkOptions { Form = Form, Graded = !isOrdered, Observables = names, InBlocks = inBlocks };
        int[] variances = [.. Enumerable.Range(0, names.Length).Where(i => _requests.Any(r => r.Kind == QuantityKind.Variance && r.Observable!.Name == names[i]))];
        ModelNetwork network = NetworkBuilder.Build(_system, options);
        if (Form == NetworkForm.Auto && network.Form == NetworkForm.Face)
            network = NetworkBuilder.Build(_system, options with { Form = NetworkForm.Row }) with { Choice = RowChoice };
        return new Branch(network, names, isOrdered, [.. variances]);
    }
}
