using System.Collections.Immutable;
using TensorRG.Models;
using TensorRG.Models.Lattices;

namespace TensorRG.Physics.Measurements;

/// <summary>Which networks a measurement needs and which observable is read from which.</summary>
/// <param name="Symmetric">The graded network with the neutral observables.</param>
/// <param name="Broken">The same without charges and with the observables that break the symmetry, the order parameter first; null if none is asked for.</param>
/// <param name="NeutralNames">Observables of the symmetric network.</param>
/// <param name="BreakingNames">Observables of the broken network.</param>
/// <param name="VarianceNames">Observables whose variance is asked for.</param>
internal sealed record BranchPlan(
    ModelNetwork Symmetric,
    ModelNetwork? Broken,
    ImmutableArray<string> NeutralNames,
    ImmutableArray<string> BreakingNames,
    ImmutableHashSet<string> VarianceNames)
{
    /// <summary>The observable whose field chooses the ordered state.</summary>
    public string OrderName => BreakingNames[0];

    /// <summary>The symmetry in use, for people.</summary>
    public string SymmetryRemark => Symmetric.Network.GroupOrders.IsEmpty ? "" : $"Symmetry in use: {Symmetric.Symmetry}.";

    /// <summary>Sorts the observables of a request by what they do to the symmetry.</summary>
    /// <param name="system">The model.</param>
    /// <param name="inputs">The request.</param>
    /// <param name="requests">What was asked for.</param>
    public static BranchPlan Of(LatticeSystem system, MeasurementInputs inputs, ImmutableArray<QuantityRequest> requests)
    {
        LocalObservable[] wanted = [.. requests.Select(static r => r.Observable).OfType<LocalObservable>().DistinctBy(static o => o.Name)];
        ImmutableArray<string> uniform = [.. wanted.Where(static o => !o.IsStaggered).Select(static o => o.Name)];
        ModelNetwork graded = Build(system, inputs, uniform, graded: true);
        HashSet<string> breaking = [.. graded.Impurities.Where(i => Breaks(graded.Network, i)).Select(static i => i.Name), .. wanted.Where(static o => o.IsStaggered).Select(static o => o.Name)];
        ImmutableArray<string> neutral = [.. uniform.Where(name => !breaking.Contains(name))];
        ImmutableArray<string> broken = [.. wanted.Where(o => breaking.Contains(o.Name)).OrderByDescending(static o => o.IsOrderParameter).Select(static o => o.Name)];
        return new BranchPlan(
            neutral.Length == uniform.Length ? graded : Build(system, inputs, neutral, graded: true),
            broken.IsEmpty ? null : Build(system, inputs, broken, graded: false),
            neutral,
            broken,
            [.. requests.Where(static r => r.Kind == QuantityKind.Variance).Select(static r => r.Observable!.Name)]);
    }

    private static ModelNetwork Build(LatticeSystem system, MeasurementInputs inputs, ImmutableArray<string> observables, bool graded)
        => NetworkBuilder.Build(system, new NetworkOptions { Form = inputs.Form, Graded = graded, Observables = observables });

    private static bool Breaks(VertexNetwork network, Impurity impurity)
    {
        if (network.GroupOrders.IsEmpty)
            return false;
        int v = network.VerticalBond.Length, h = network.HorizontalBond.Length;
        for (int u = 0; u < v; u++)
        {
            for (int l = 0; l < h; l++)
            {
                for (int d = 0; d < v; d++)
                {
                    for (int r = 0; r < h; r++)
                    {
                        if (!network.ConservesCharge(u, l, d, r) && impurity.Element(1, u, l, d, r).Magnitude > 1e-13)
                            return true;
                    }
                }
            }
        }

        return false;
    }
}
