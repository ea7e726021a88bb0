using System.Globalization;

namespace TensorRG.Models;

/// <summary>One parameter of a model: what it means and which values it takes.</summary>
public sealed record ParameterDefinition
{
    /// <summary>The name of the temperature in every model that has one.</summary>
    public const string TemperatureName = "temperature";

    /// <summary>Name by which it is set; looked up without regard to case, and also found by <see cref="Symbol"/>.</summary>
    public required string Name { get; init; }

    /// <summary>Symbol in formulas, such as T.</summary>
    public required string Symbol { get; init; }

    /// <summary>What it means, in one line.</summary>
    public required string Meaning { get; init; }

    /// <summary>Unit in words, such as "coupling energy / k_B"; "none" for a pure number.</summary>
    public required string Unit { get; init; }

    /// <summary>Value taken when it is not given (and, with <see cref="DefaultsToCritical"/>, where no exact critical value in the allowed range is known).</summary>
    public required double Default { get; init; }

    /// <summary>Smallest allowed value, included.</summary>
    public required double Minimum { get; init; }

    /// <summary>Largest allowed value, included.</summary>
    public required double Maximum { get; init; }

    /// <summary>Only whole numbers are allowed.</summary>
    public bool IsInteger { get; init; }

    /// <summary>When not given, it takes the exact critical value at the other parameters, where one is known.</summary>
    public bool DefaultsToCritical { get; init; }

    /// <summary>The allowed values in words, such as "a whole number from 2 to 64".</summary>
    public string RangeText => IsInteger
        ? $"a whole number from {Short(Minimum)} to {Short(Maximum)}"
        : $"a number from {Short(Minimum)} to {Short(Maximum)}";

    /// <summary>The default in words.</summary>
    public string DefaultText => DefaultsToCritical
        ? string.Create(CultureInfo.InvariantCulture, $"critical where known exactly, else {Default}")
        : Default.ToString(CultureInfo.InvariantCulture);

    /// <summary>True if <paramref name="name"/> names this parameter.</summary>
    /// <param name="name">A name or symbol, in any case.</param>
    public bool IsCalled(string name)
        => string.Equals(name, Name, StringComparison.OrdinalIgnoreCase)
        || string.Equals(name, Symbol, StringComparison.OrdinalIgnoreCase);

    /// <summary>True if the parameter may take that value; false for NaN.</summary>
    /// <param name="value">Any value.</param>
    public bool Allows(double value)
        => value >= Minimum && value <= Maximum && (!IsInteger || value == Math.Floor(value));

    /// <summary>Checks a value.</summary>
    /// <param name="value">Value to check.</param>
    /// <param name="modelName">Model named in the message.</param>
    /// <exception cref="ModelException">NaN, infinite, outside the range, or not whole where it must be.</exception>
    public void Check(double value, string modelName)
    {
        if (Allows(value))
            return;
        string got = double.IsNaN(value) ? "not a number" : value.ToString(CultureInfo.InvariantCulture);
        throw new ModelException(
            $"Parameter '{Name}' of model '{modelName}' is {got}; it must be {RangeText}. {Meaning}.");
    }

    /// <summary>The temperature, T, in units of the coupling energies (k_B = 1).</summary>
    /// <param name="fallback">Default where no exact critical temperature is known.</param>
    public static ParameterDefinition Temperature(double fallback) => new()
    {
        Name = TemperatureName,
        Symbol = "T",
        Meaning = "Temperature, in the unit of the coupling energies (k_B = 1)",
        Unit = "energy / k_B",
        Default = fallback,
        Minimum = 1e-9,
        Maximum = 1e9,
        DefaultsToCritical = true,
    };

    /// <summary>An energy: a coupling or a field.</summary>
    /// <param name="name">Name, also the symbol.</param>
    /// <param name="defaultValue">Value taken when it is not given.</param>
    /// <param name="meaning">What it means.</param>
    public static ParameterDefinition Energy(string name, double defaultValue, string meaning) => new()
    {
        Name = name,
        Symbol = name,
        Meaning = meaning,
        Unit = "energy",
        Default = defaultValue,
        Minimum = -1e6,
        Maximum = 1e6,
    };

    /// <summary>The number of states of a spin, q.</summary>
    /// <param name="defaultValue">Value taken when it is not given.</param>
    public static ParameterDefinition States(int defaultValue) => new()
    {
        Name = "q",
        Symbol = "q",
        Meaning = "Number of states of a spin",
        Unit = "none",
        Default = defaultValue,
        Minimum = 2,
        Maximum = 64,
        IsInteger = true,
    };

    /// <summary>A bound as people write it: 64, 1e-9, -1e6.</summary>
    private static string Short(double bound) => bound != 0 && Math.Abs(Math.Log10(Math.Abs(bound))) >= 5
        ? bound.ToString("0.##e0", CultureInfo.InvariantCulture)
        : bound.ToString(CultureInfo.InvariantCulture);
}
