using System.Collections.Immutable;
using System.Globalization;
using System.Text.RegularExpressions;
using TensorRG.Models;
using TensorRG.Models.Lattices;

namespace TensorRG.Physics.Measurements;

/// <summary>What can be measured of a model, by name.</summary>
public static partial class QuantityCatalogue
{
    /// <summary>Name of the observable that sums the logarithms of all weights; the entropy needs it.</summary>
    internal const string LogWeight = "log-weight";

    private const string Energy = "energy";

    /// <summary>The names that make sense without being asked for: ln Z, thermodynamics, and the model's observables.</summary>
    /// <param name="parameters">The model's parameters.</param>
    /// <exception cref="ModelException">The model has no tables to measure from.</exception>
    public static IReadOnlyList<string> Defaults(ParameterSet parameters)
    {
        LatticeSystem system = SystemOf(parameters);
        var names = new List<string> { "ln-z" };
        if (parameters.Model.HasTemperature)
            names.Add("free-energy");
        names.AddRange(Own(system).Where(static o => o.Name == Energy).Select(static o => o.Name));
        if (system.HasPositiveWeights)
            names.Add("entropy");
        if (names.Contains(Energy))
            names.Add("specific-heat");
        names.AddRange(Own(system).Where(static o => o.Name != Energy && (!o.IsStaggered || o.IsOrderParameter)).Select(static o => o.Name));
        return names;
    }

    /// <summary>The model as tables.</summary>
    /// <param name="parameters">The model's parameters.</param>
    /// <exception cref="ModelException">The model has none.</exception>
    internal static LatticeSystem SystemOf(ParameterSet parameters)
        => parameters.Model.System(parameters)
        ?? throw new ModelException($"The model '{parameters.Model.Name}' is given by its network alone and has no observables. Write it as a model file to measure it.");

    /// <summary>Reads the names of a request.</summary>
    /// <param name="inputs">The request.</param>
    /// <exception cref="ModelException">An unknown name, or one that needs a torus, a temperature or positive weights that are not there.</exception>
    internal static ImmutableArray<QuantityRequest> Read(MeasurementInputs inputs)
    {
        LatticeSystem system = SystemOf(inputs.Parameters);
        return [.. inputs.Quantities.Select(name => Read(name, inputs, system))];
    }

    private static QuantityRequest Read(string name, MeasurementInputs inputs, LatticeSystem system)
    {
        ParameterSet p = inputs.Parameters;
        Match moment = MomentName().Match(name), variance = VarianceName().Match(name), binder = BinderName().Match(name);
        if (moment.Success)
            return Moment(name, Find(moment.Groups[1].Value, p, system), int.Parse(moment.Groups[2].Value, CultureInfo.InvariantCulture), inputs);
        if (variance.Success)
            return Variance(name, Find(variance.Groups[1].Value, p, system), 1, "none");
        if (binder.Success || name == "binder")
            return Binder(name, binder.Success ? Find(binder.Groups[1].Value, p, system) : OrderParameter(p, system), inputs);
        return name switch
        {
            "ln-z" => new(name, QuantityKind.LogZ, null, 1, 1, "ln Z per site", "none"),
            "free-energy" => new(name, QuantityKind.FreeEnergy, null, -Temperature(name, p), 1, "f = -T ln Z per site", "energy"),
            "entropy" => Entropy(name, p, system),
            "specific-heat" => Variance(name, Find(Energy, p, system), Math.Pow(Temperature(name, p), -2), "none") with { Meaning = "Specific heat per site, (<E^2> - <E>^2) / (N T^2)" },
            "susceptibility" => Susceptibility(name, p, system),
            _ => Mean(name, Find(name, p, system)),
        };
    }

    private static QuantityRequest Mean(string name, LocalObservable o) => new(name, QuantityKind.Mean, o, 1, 1, o.Meaning, o.Unit);

    private static QuantityRequest Variance(string name, LocalObservable o, double factor, string unit)
        => new(name, QuantityKind.Variance, o, factor, 2, $"Variance of {o.Name} per site", unit);

    private static QuantityRequest Entropy(string name, ParameterSet p, LatticeSystem system)
        => system.HasPositiveWeights
            ? new(name, QuantityKind.Entropy, Find(LogWeight, p, system), 1, 1, "Entropy per site, in units of k_B", "k_B")
            : throw new ModelException($"The entropy of '{p.Model.Name}' is not defined: its weights are not positive. Ask for ln-z.");

    private static QuantityRequest Susceptibility(string name, ParameterSet p, LatticeSystem system)
    {
        LocalObservable order = OrderParameter(p, system);
        double factor = p.Model.HasTemperature ? 1 / p.Temperature : 1;
        string meaning = $"(<O^2> - <O>^2) / N{(p.Model.HasTemperature ? " T" : "")} of the {order.Name}";
        return Variance(name, order, factor, "none") with { Meaning = meaning };
    }

    private static QuantityRequest Moment(string name, LocalObservable o, int power, MeasurementInputs inputs)
        => inputs.TorusLength is not null
            ? new(name, QuantityKind.Moment, o, 1, power, $"<O^{power}> / N^{power} of the {o.Name}", "none")
            : throw new ModelException($"'{name}' is a moment of a finite torus. Give its size with --torus, or ask for var({o.Name}).");

    private static QuantityRequest Binder(string name, LocalObservable o, MeasurementInputs inputs)
        => inputs.TorusLength is not null
            ? new(name, QuantityKind.Binder, o, 1, 4, $"Binder ratio 1 - <O^4> / (3 <O^2>^2) of the {o.Name}", "none")
            : throw new ModelException($"'{name}' is a ratio of moments of a finite torus. Give its size with --torus.");

    private static double Temperature(string name, ParameterSet p)
        => p.Model.HasTemperature ? p.Temperature : throw new ModelException($"'{name}' needs a temperature, and the model '{p.Model.Name}' is given by weights. Ask for ln-z or an observable.");

    private static LocalObservable OrderParameter(ParameterSet p, LatticeSystem system)
        => Own(system).FirstOrDefault(static o => o.IsOrderParameter)
        ?? throw new ModelException($"The model '{p.Model.Name}' names no order parameter. Mark an observable with order = true, or name it: var(NAME), binder(NAME).");

    private static LocalObservable Find(string name, ParameterSet p, LatticeSystem system)
    {
        LocalObservable? found = system.Observables.FirstOrDefault(o => o.Name == name);
        if (found is not null)
            return found;
        string[] known = ["ln-z", "free-energy", "entropy", "specific-heat", "susceptibility", .. Own(system).Select(static o => o.Name)];
        throw new ModelException($"The model '{p.Model.Name}' has no quantity '{name}'.{NameSuggestion.Text(name, known)} It has: {string.Join(", ", known)}, and var(NAME) of an observable; on a torus also NAME^2, NAME^4 and binder.");
    }

    private static IEnumerable<LocalObservable> Own(LatticeSystem system) => system.Observables.Where(static o => o.Name != LogWeight);

    [GeneratedRegex(@"^(.+)\^([1-4])$")]
    private static partial Regex MomentName();

    [GeneratedRegex(@"^var\((.+)\)$")]
    private static partial Regex VarianceName();

    [GeneratedRegex(@"^binder\((.+)\)$")]
    private static partial Regex BinderName();
}
