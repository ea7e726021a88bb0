using System.Collections.Immutable;
using System.Globalization;
using TensorRG.Models;
using TensorRG.Runs.Points;

namespace TensorRG.Cli.Input;

/// <summary>Reads the axes of a grid: <c>NAME=FROM:TO:COUNT</c> or <c>NAME=V1,V2,V3</c>.</summary>
internal static class GridText
{
    /// <summary>Most points of a grid: each has a file of its own.</summary>
    public const int MostPoints = 1_000_000;

    private const string Usage = "--over takes NAME=FROM:TO:COUNT, such as --over temperature=2:3:21, or a list NAME=V1,V2,V3";

    /// <summary>Up to here products of a decimal number with the number of points are exact.</summary>
    private const double LargestDecimal = 1e12;

    /// <summary>Reads all axes.</summary>
    /// <exception cref="UsageException">No axis, unreadable text, a value or a parameter that stands twice, too many points.</exception>
    /// <exception cref="ModelException">An unknown parameter or a value that is not allowed.</exception>
    public static ImmutableArray<SweepAxis> Read(ParameterRequest model, string[] texts)
    {
        if (texts.Length == 0)
            throw new UsageException("--over is missing: a sweep needs a parameter to sweep over. " + Usage + ". For a single point use 'tensorrg measure'.");
        ImmutableArray<SweepAxis> axes = [.. texts.Select(t => ReadAxis(model, t))];
        CheckConflicts(model, axes);
        double points = axes.Aggregate(1.0, static (product, axis) => product * axis.Values.Length);
        if (points > MostPoints)
            throw new UsageException(FormattableString.Invariant($"The grid has {points:0} points; at most {MostPoints} are allowed. Use fewer values on an axis, or several sweeps."));
        return axes;
    }

    private static SweepAxis ReadAxis(ParameterRequest model, string text)
    {
        int equals = text.IndexOf('=', StringComparison.Ordinal);
        if (equals <= 0 || equals == text.Length - 1)
            throw new UsageException($"{Usage}, not '{text}'.");
        string name = text[..equals].Trim();
        ImmutableArray<string> parameters = model.Resolve(name);
        ImmutableArray<double> values = ReadValues(name, text[(equals + 1)..]);
        if (values.GroupBy(static v => v).FirstOrDefault(static g => g.Count() > 1) is { } twice)
            throw new UsageException(FormattableString.Invariant($"--over {name} has the value {twice.Key} more than once. Give each value once; for one value use COUNT = 1 or --set."));
        foreach (string parameter in parameters)
        {
            ParameterDefinition definition = model.Model.Parameters[model.Model.IndexOf(parameter)];
            foreach (double value in values)
                definition.Check(value, model.Model.Name);
        }

        return new SweepAxis(parameters.Length == 1 ? parameters[0] : name, parameters, values);
    }

    private static ImmutableArray<double> ReadValues(string name, string text)
    {
        string[] parts = text.Split(':');
        if (parts.Length == 1)
            return [.. text.Split(',').Select(part => ParameterRequest.ReadNumber($"--over {name}", part))];
        if (parts.Length != 3)
            throw new UsageException($"{Usage}, not '{name}={text}'.");
        double from = ParameterRequest.ReadNumber($"--over {name}: FROM", parts[0]), to = ParameterRequest.ReadNumber($"--over {name}: TO", parts[1]);
        if (!int.TryParse(parts[2].Trim(), NumberStyles.None, CultureInfo.InvariantCulture, out int count) || count is < 1 or > MostPoints)
            throw new UsageException(FormattableString.Invariant($"--over {name}: COUNT takes a whole number from 1 to {MostPoints}, not '{parts[2].Trim()}'."));
        return count == 1 ? [from] : [.. Enumerable.Range(0, count).Select(i => Between(from, to, i, count - 1))];
    }

    /// <summary>Worked out in decimal where that is exact, so that 2:3:11 holds 2.3 and not its neighbour.</summary>
    private static double Between(double from, double to, int index, int last)
    {
        if (IsDecimal(from) && IsDecimal(to))
            return (double)((((decimal)from * (last - index)) + ((decimal)to * index)) / last);
        return ((from * (last - index)) + (to * index)) / last;
    }

    private static bool IsDecimal(double value) => Math.Abs(value) <= LargestDecimal && (double)(decimal)value == value;

    private static void CheckConflicts(ParameterRequest model, ImmutableArray<SweepAxis> axes)
    {
        var setBy = new Dictionary<string, string>(StringComparer.Ordinal);
        if (model.AtCritical)
            setBy[ParameterDefinition.TemperatureName] = "--temperature critical";
        foreach ((string name, _) in model.Given)
        {
            // Twice among the given ones is the model's to say.
            foreach (string parameter in model.Resolve(name))
                setBy[parameter] = parameter == ParameterDefinition.TemperatureName ? "--temperature or --set" : $"--set {name}";
        }

        foreach (SweepAxis axis in axes)
        {
            foreach (string parameter in axis.Parameters)
            {
                if (!setBy.TryAdd(parameter, $"--over {axis.Name}"))
                    throw new UsageException($"Parameter '{parameter}' is set twice, by {setBy[parameter]} and by --over {axis.Name}. Give one of them.");
            }
        }
    }
}
