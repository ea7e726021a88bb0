using System.Collections.Immutable;
using System.Numerics;

namespace TensorRG.Models.Files;

/// <summary>The states of a site: all combinations of the values of its variables, those of the last variable fastest.</summary>
internal sealed class StateSpace
{
    private StateSpace(ImmutableArray<string> labels, ImmutableArray<double> logMeasure, Complex[] values)
        => (Labels, LogMeasure, Values) = (labels, logMeasure, values);

    /// <summary>The states for people.</summary>
    public ImmutableArray<string> Labels { get; }

    /// <summary>Logarithm of the weight of each state in sums.</summary>
    public ImmutableArray<double> LogMeasure { get; }

    /// <summary>Values of the variables of state 0, of state 1, ...</summary>
    public Complex[] Values { get; }

    /// <summary>The states at given parameters.</summary>
    /// <param name="variables">The variables.</param>
    /// <param name="work">The parameters.</param>
    /// <exception cref="ModelFileException">There are too many, or values that are not right.</exception>
    public static StateSpace Of(ImmutableArray<SiteVariable> variables, Workspace work)
    {
        List<ImmutableArray<StateValue>> states = [[]];
        foreach (SiteVariable variable in variables)
        {
            ImmutableArray<StateValue> values = variable.Values(work);
            if (states.Count * values.Length > Limits.States)
                throw variable.Node.Error($"The variables have {states.Count * values.Length} states together, but at most {Limits.States} fit. Use fewer values, or set the parameters in them lower.");
            states = [.. states.SelectMany(s => values.Select(v => s.Add(v)))];
        }
        return new(
            [.. states.Select(s => Label(variables, s))],
            [.. states.Select(s => s.Sum(v => v.LogMeasure))],
            [.. states.SelectMany(s => s.Select(v => v.Value))]);
    }

    private static string Label(ImmutableArray<SiteVariable> variables, ImmutableArray<StateValue> state) => variables.Length == 1
        ? state[0].Label
        : string.Join(", ", variables.Zip(state, (v, s) => $"{v.Name}={s.Label}"));
}
