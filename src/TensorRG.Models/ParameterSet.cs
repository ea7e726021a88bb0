using System.Collections.Immutable;

namespace TensorRG.Models;

/// <summary>
/// A value for every parameter of one model: checked, complete and immutable. Made by
/// <see cref="Model.CreateParameters(IEnumerable{KeyValuePair{string, double}})"/>.
/// </summary>
public sealed class ParameterSet
{
    private readonly ImmutableArray<double> values;

    internal ParameterSet(Model model, ImmutableArray<double> values)
    {
        Model = model;
        this.values = values;
    }

    /// <summary>The model whose parameters these are.</summary>
    public Model Model { get; }

    /// <summary>Every parameter with its value, in the order of <see cref="Model.Parameters"/>.</summary>
    public IReadOnlyList<KeyValuePair<string, double>> Values
        => [.. Model.Parameters.Select((p, i) => KeyValuePair.Create(p.Name, values[i]))];

    /// <summary>The temperature.</summary>
    /// <exception cref="ModelException">The model has no temperature.</exception>
    public double Temperature => this[ParameterDefinition.TemperatureName];

    /// <summary>The value of one parameter.</summary>
    /// <param name="name">Name or symbol, in any case.</param>
    /// <exception cref="ModelException">The model has no such parameter.</exception>
    public double this[string name] => values[Model.IndexOf(name)];

    /// <summary>The value of one whole-number parameter.</summary>
    /// <param name="name">Name or symbol, in any case.</param>
    /// <exception cref="ModelException">The model has no such parameter.</exception>
    public int WholeNumber(string name) => (int)this[name];

    /// <summary>The same set with one value changed. Nothing else moves, a temperature that was filled in as critical included.</summary>
    /// <param name="name">Name or symbol, in any case.</param>
    /// <param name="value">The new value.</param>
    /// <exception cref="ModelException">The model has no such parameter, or the value is not allowed.</exception>
    public ParameterSet With(string name, double value)
    {
        int index = Model.IndexOf(name);
        Model.Parameters[index].Check(value, Model.Name);
        return new ParameterSet(Model, values.SetItem(index, value));
    }
}
