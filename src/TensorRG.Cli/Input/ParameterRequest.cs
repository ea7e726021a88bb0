using System.Collections.Immutable;
using System.Globalization;
using TensorRG.Models;

namespace TensorRG.Cli.Input;

/// <summary>A model and what was given of its parameters.</summary>
/// <param name="Model">The model.</param>
/// <param name="Given">Values by the names that were used.</param>
/// <param name="AtCritical">Whether the exact critical temperature is asked for by that word.</param>
internal sealed record ParameterRequest(Model Model, ImmutableArray<KeyValuePair<string, double>> Given, bool AtCritical)
{
    /// <summary>Checks what was given as text.</summary>
    /// <exception cref="UsageException">Contradictory or unreadable options.</exception>
    public static ParameterRequest Create(Model model, string? temperature, string[] settings)
    {
        List<KeyValuePair<string, double>> given = [.. settings.SelectMany(s => ReadSetting(model, s))];
        if (temperature is null)
            return new ParameterRequest(model, [.. given], AtCritical: false);
        if (!model.HasTemperature)
            throw new UsageException($"The model '{model.Name}' is given by weights and has no temperature. Leave out --temperature; its parameters are {string.Join(", ", model.Parameters.Select(static p => p.Name))}.");
        if (!string.Equals(temperature, "critical", StringComparison.OrdinalIgnoreCase))
        {
            given.Add(KeyValuePair.Create(ParameterDefinition.TemperatureName, ReadNumber("--temperature", temperature)));
            return new ParameterRequest(model, [.. given], AtCritical: false);
        }

        if (given.Any(g => TemperatureOf(model).IsCalled(g.Key)))
            throw new UsageException("The temperature is set twice, by --temperature critical and by --set. Give one of them.");
        return new ParameterRequest(model, [.. given], AtCritical: true);
    }

    /// <summary>All parameters.</summary>
    /// <exception cref="ModelException">An unknown parameter, one that is set twice, or a value that is not allowed.</exception>
    public ParameterSet Parameters()
    {
        ParameterSet parameters = Model.CreateParameters(Given);
        return AtCritical ? Model.AtCriticalTemperature(parameters) : parameters;
    }

    /// <summary>The full names of the parameters that a name, a symbol or a shorthand sets.</summary>
    /// <exception cref="ModelException">The model has none of that name.</exception>
    public ImmutableArray<string> Resolve(string name)
    {
        ParameterShorthand? shorthand = Model.Shorthands.FirstOrDefault(s => string.Equals(s.Name, name, StringComparison.OrdinalIgnoreCase));
        return shorthand?.Targets ?? [Model.Parameters[Model.IndexOf(name)].Name];
    }

    /// <summary>A finite number.</summary>
    /// <exception cref="UsageException">The text is none.</exception>
    public static double ReadNumber(string option, string text)
    {
        if (double.TryParse(text.Trim(), NumberStyles.Float, CultureInfo.InvariantCulture, out double value) && double.IsFinite(value))
            return value;
        string hint = option == "--temperature" ? " or the word critical" : "";
        throw new UsageException($"{option} takes a finite number, such as 2.5{hint}, not '{text}'. Use a point, not a comma, for decimals.");
    }

    private static IEnumerable<KeyValuePair<string, double>> ReadSetting(Model model, string text)
    {
        int equals = text.IndexOf('=', StringComparison.Ordinal);
        if (equals <= 0)
            throw new UsageException($"--set takes NAME=VALUE, such as --set h=0.1, not '{text}'.");
        string name = text[..equals].Trim();
        return model.Settings(name, text[(equals + 1)..].Trim());
    }

    private static ParameterDefinition TemperatureOf(Model model)
        => model.Parameters.First(static p => p.Name == ParameterDefinition.TemperatureName);
}
