using System.Collections.Immutable;
using System.Globalization;
using TensorRG.Models.Lattices;

namespace TensorRG.Models;

/// <summary>
/// A two-dimensional lattice model: what a person reads about it, its parameters, its vertex network and what is known
/// exactly. Built-in models derive from it, and so can anything that reads a description from elsewhere.
/// Conventions: k_B = 1, Z = sum over configurations of exp(-E/T).
/// </summary>
public abstract class Model
{
    /// <summary>Name on the command line: lower case, no spaces.</summary>
    public abstract string Name { get; }

    /// <summary>Title in a few words.</summary>
    public abstract string Title { get; }

    /// <summary>One paragraph: the Hamiltonian or weights, and what the model shows.</summary>
    public abstract string Description { get; }

    /// <summary>The lattice in words.</summary>
    public abstract string Lattice { get; }

    /// <summary>Lattice sites that one vertex of the network stands for.</summary>
    public abstract int SitesPerVertex { get; }

    /// <summary>The symmetry that the network's charges carry, in words.</summary>
    public abstract string Symmetry { get; }

    /// <summary>The parameters, in the order in which they are shown.</summary>
    public abstract IReadOnlyList<ParameterDefinition> Parameters { get; }

    /// <summary>Names that set several parameters at once.</summary>
    public virtual IReadOnlyList<ParameterShorthand> Shorthands => [];

    /// <summary>What is known exactly, and where.</summary>
    public abstract IReadOnlyList<ExactReference> ExactReferences { get; }

    /// <summary>The text that defines the model, where it comes from a file; null for a built-in one.</summary>
    public virtual string? Definition => null;

    /// <summary>True if the model has a temperature; a model given by weights has none.</summary>
    public bool HasTemperature => Parameters.Any(p => p.Name == ParameterDefinition.TemperatureName);

    /// <summary>
    /// A complete, checked set of parameters. What is not given takes its default; a temperature that defaults to the
    /// critical one takes it at the other values given.
    /// </summary>
    /// <param name="given">Values by name or symbol, in any case; shorthands are allowed.</param>
    /// <exception cref="ModelException">An unknown name, a parameter set twice, or a value that is not allowed.</exception>
    public ParameterSet CreateParameters(IEnumerable<KeyValuePair<string, double>> given)
    {
        ArgumentNullException.ThrowIfNull(given);
        double?[] values = Assign(given);
        ParameterSet set = new(this, [.. Parameters.Select((p, i) => values[i] ?? p.Default)]);
        for (int i = 0; i < Parameters.Count; i++)
        {
            if (values[i] is null && Parameters[i].DefaultsToCritical)
                return AtCriticalIfAllowed(set, Parameters[i]);
        }
        return set;
    }

    /// <summary>All parameters at their defaults.</summary>
    public ParameterSet CreateParameters() => CreateParameters([]);

    /// <summary>The set with its temperature moved to the exact critical one.</summary>
    /// <param name="parameters">A set of this model.</param>
    /// <exception cref="ModelException">No exact critical temperature is known there; the message says why.</exception>
    public ParameterSet AtCriticalTemperature(ParameterSet parameters)
    {
        CriticalPoint point = CriticalTemperature(parameters);
        if (point.Temperature is null)
            throw new ModelException($"Model '{Name}' has no exact critical temperature here: {point.Reason}. Give {(HasTemperature ? "the temperature as a number" : "the weights instead")}.");
        return parameters.With(ParameterDefinition.TemperatureName, point.Temperature.Value);
    }

    /// <summary>The exact critical temperature at the other parameters, or why there is none.</summary>
    /// <param name="parameters">A set of this model; its temperature does not matter.</param>
    public CriticalPoint CriticalTemperature(ParameterSet parameters) => FindCriticalTemperature(Own(parameters));

    /// <summary>The vertex network.</summary>
    /// <param name="parameters">A set of this model.</param>
    /// <param name="graded">False drops the charges: the same tensor in the same basis with the trivial group.</param>
    /// <param name="form">Form of the network; Auto lets the model choose.</param>
    /// <exception cref="ModelException">The model cannot be written in that form.</exception>
    public VertexNetwork Network(ParameterSet parameters, bool graded = true, NetworkForm form = NetworkForm.Auto)
    {
        VertexNetwork network = form == NetworkForm.Auto ? BuildNetwork(Own(parameters)) : OfForm(Own(parameters), form);
        return graded ? network : network.Ungraded();
    }

    /// <summary>
    /// The model as tables of local weights and observables: what can be measured, and what any sum over configurations needs.
    /// Null for a model that is given by its network alone.
    /// </summary>
    /// <param name="parameters">A set of this model.</param>
    public LatticeSystem? System(ParameterSet parameters) => DescribeSystem(Own(parameters));

    /// <summary>What <see cref="Network"/> gives, without its elements: form, symmetry, bonds.</summary>
    /// <param name="parameters">A set of this model.</param>
    /// <param name="form">Form of the network; Auto lets the model choose.</param>
    /// <exception cref="ModelException">The model cannot be written in that form, or has no tables.</exception>
    public NetworkPlan Plan(ParameterSet parameters, NetworkForm form = NetworkForm.Auto) => FindPlan(Own(parameters), form);

    /// <summary>An exact value, or null where none is known.</summary>
    /// <param name="quantity">Which quantity.</param>
    /// <param name="parameters">A set of this model.</param>
    public ExactValue? Exact(Quantity quantity, ParameterSet parameters) => Exact(QuantityNames.Name(quantity), parameters);

    /// <summary>An exact value by name, or null where none is known.</summary>
    /// <param name="quantity">One of <see cref="QuantityNames"/>, or the name of an observable.</param>
    /// <param name="parameters">A set of this model.</param>
    public ExactValue? Exact(string quantity, ParameterSet parameters) => FindExact(quantity, Own(parameters));

    /// <summary>What a setting sets: pairs of a parameter's name and its value.</summary>
    /// <param name="name">Name or symbol of a parameter or a shorthand, in any case.</param>
    /// <param name="text">The value as written; a number in the invariant culture.</param>
    /// <exception cref="ModelException">The text is no number.</exception>
    public virtual IEnumerable<KeyValuePair<string, double>> Settings(string name, string text)
    {
        if (!double.TryParse(text, NumberStyles.Float, CultureInfo.InvariantCulture, out double value) || !double.IsFinite(value))
            throw new ModelException($"Parameter '{name}' takes a finite number, such as 0.5 or 1e-3, not '{text}'. Use a point, not a comma, for decimals.");
        return [KeyValuePair.Create(name, value)];
    }

    /// <summary>Position of a parameter in <see cref="Parameters"/>.</summary>
    /// <param name="name">Name or symbol, in any case.</param>
    /// <exception cref="ModelException">There is none; the message lists those there are and suggests the nearest.</exception>
    public int IndexOf(string name)
    {
        for (int i = 0; i < Parameters.Count; i++)
        {
            if (Parameters[i].IsCalled(name))
                return i;
        }
        IReadOnlyList<string> known = [.. Parameters.Select(p => p.Name), .. Shorthands.Select(s => s.Name)];
        throw new ModelException($"Model '{Name}' has no parameter '{name}'.{NameSuggestion.Text(name, known)} It has: {string.Join(", ", known)}.");
    }

    /// <summary>See <see cref="CriticalTemperature"/>; the set is known to be this model's.</summary>
    /// <param name="parameters">A set of this model.</param>
    protected abstract CriticalPoint FindCriticalTemperature(ParameterSet parameters);

    /// <summary>The graded network; the set is known to be this model's.</summary>
    /// <param name="parameters">A set of this model.</param>
    protected abstract VertexNetwork BuildNetwork(ParameterSet parameters);

    /// <summary>See <see cref="System"/>; the set is known to be this model's.</summary>
    /// <param name="parameters">A set of this model.</param>
    protected virtual LatticeSystem? DescribeSystem(ParameterSet parameters) => null;

    /// <summary>See <see cref="Plan"/>; the set is known to be this model's.</summary>
    /// <param name="parameters">A set of this model.</param>
    /// <param name="form">Form of the network.</param>
    protected virtual NetworkPlan FindPlan(ParameterSet parameters, NetworkForm form)
        => NetworkBuilder.Plan(Tables(parameters), form);

    /// <summary>See <see cref="Exact(Quantity, ParameterSet)"/>; the set is known to be this model's.</summary>
    /// <param name="quantity">Which quantity.</param>
    /// <param name="parameters">A set of this model.</param>
    protected virtual ExactValue? FindExact(Quantity quantity, ParameterSet parameters) => null;

    /// <summary>See <see cref="Exact(string, ParameterSet)"/>; the set is known to be this model's.</summary>
    /// <param name="quantity">One of <see cref="QuantityNames"/>, or the name of an observable.</param>
    /// <param name="parameters">A set of this model.</param>
    protected virtual ExactValue? FindExact(string quantity, ParameterSet parameters)
        => QuantityNames.Find(quantity) is { } known ? FindExact(known, parameters) : null;

    private VertexNetwork OfForm(ParameterSet parameters, NetworkForm form)
        => NetworkBuilder.Build(Tables(parameters), new NetworkOptions { Form = form }).Network;

    private LatticeSystem Tables(ParameterSet parameters)
        => DescribeSystem(parameters) ?? throw new ModelException($"The model '{Name}' is given by one network alone: leave the form to the tool.");

    private ParameterSet AtCriticalIfAllowed(ParameterSet set, ParameterDefinition temperature)
        => FindCriticalTemperature(set).Temperature is { } critical && temperature.Allows(critical.Value)
            ? set.With(temperature.Name, critical.Value)
            : set;

    private double?[] Assign(IEnumerable<KeyValuePair<string, double>> given)
    {
        var values = new double?[Parameters.Count];
        var setBy = new string?[Parameters.Count];
        foreach ((string name, double value) in given)
        {
            foreach (int index in Targets(name))
            {
                if (setBy[index] is { } earlier)
                    throw new ModelException($"Parameter '{Parameters[index].Name}' of model '{Name}' is set twice, by '{earlier}' and by '{name}'. Give one of them.");
                Parameters[index].Check(value, Name);
                (values[index], setBy[index]) = (value, name);
            }
        }
        return values;
    }

    private IEnumerable<int> Targets(string name)
    {
        ParameterShorthand? shorthand = Shorthands.FirstOrDefault(s => string.Equals(s.Name, name, StringComparison.OrdinalIgnoreCase));
        ImmutableArray<string> names = shorthand?.Targets ?? [name];
        return names.Select(IndexOf);
    }

    private ParameterSet Own(ParameterSet parameters)
    {
        ArgumentNullException.ThrowIfNull(parameters);
        if (!ReferenceEquals(parameters.Model, this))
            throw new ArgumentException($"The parameters belong to model '{parameters.Model.Name}', not to '{Name}'. Make them with this model's CreateParameters.", nameof(parameters));
        return parameters;
    }
}
