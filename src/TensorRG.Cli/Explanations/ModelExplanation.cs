using System.Collections.Immutable;
using TensorRG.Models;
using TensorRG.Models.Lattices;
using TensorRG.Physics.Measurements;

namespace TensorRG.Cli.Explanations;

/// <summary>What the program makes of a model at some parameters.</summary>
/// <param name="Source">Name or path, as the user gave it.</param>
/// <param name="Parameters">The parameters.</param>
/// <param name="System">The model as tables.</param>
/// <param name="Plan">The network.</param>
/// <param name="Terms">The tables for people.</param>
/// <param name="Quantities">What can be measured, by name.</param>
internal sealed record ModelExplanation(
    string Source, ParameterSet Parameters, LatticeSystem System, NetworkPlan Plan, ImmutableArray<TermView> Terms, IReadOnlyList<string> Quantities)
{
    public Model Model => Parameters.Model;

    /// <summary>The observables that the model declares, and the energy.</summary>
    public IEnumerable<LocalObservable> Observables => System.Observables.Where(o => Quantities.Contains(o.Name));

    /// <summary>Explains a model.</summary>
    /// <exception cref="ModelException">The model cannot be written in that form, or has no value at these parameters.</exception>
    public static ModelExplanation Of(string source, ParameterSet parameters, NetworkForm form)
    {
        Model model = parameters.Model;
        LatticeSystem system = model.System(parameters) ?? throw new ModelException($"The model '{model.Name}' is given by its network alone. Write it as a model file to have it explained.");
        NetworkPlan plan = model.Plan(parameters, form);
        return new ModelExplanation(source, parameters, system, plan, TermViews.Of(system, model.HasTemperature ? parameters.Temperature : 1), QuantityCatalogue.Defaults(parameters));
    }

    /// <summary>Whether an observable changes under the symmetry; null where that is not known.</summary>
    public bool? Breaks(LocalObservable observable) => Plan.Breaking?.Contains(observable.Name);

    /// <summary>Charges of a bond with the number of states of each, in the order of the bond.</summary>
    public static IReadOnlyList<(ImmutableArray<int> Charge, int States)> Charges(ImmutableArray<BondState> bond)
        => [.. bond.GroupBy(static s => string.Join(',', s.Charge)).Select(static g => (g.First().Charge, g.Count()))];
}
