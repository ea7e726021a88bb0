using System.CommandLine;
using System.CommandLine.Parsing;
using System.Globalization;

namespace TensorRG.Cli.Input;

/// <summary>Options that take numbers in the invariant culture and say what they want when they get something else.</summary>
internal static class NumberOption
{
    /// <summary>A whole number between bounds.</summary>
    public static Option<int> Whole(string name, string description, int fallback, int minimum, int maximum = int.MaxValue)
        => new(name)
        {
            Description = description,
            DefaultValueFactory = _ => fallback,
            CustomParser = result => (int)Read(result, name, minimum, maximum),
        };

    /// <summary>A whole number of 64 bits.</summary>
    public static Option<long> Long(string name, string description, long fallback)
        => new(name)
        {
            Description = description,
            DefaultValueFactory = _ => fallback,
            CustomParser = result => Read(result, name, long.MinValue, long.MaxValue),
        };

    /// <summary>A list of ascending whole numbers between bounds, separated by commas.</summary>
    public static Option<int[]> Ascending(string name, string description, int[] fallback, int minimum, int maximum)
        => new(name)
        {
            Description = description,
            DefaultValueFactory = _ => fallback,
            CustomParser = result => ReadList(result, name, minimum, maximum),
        };

    /// <summary>A real number between bounds.</summary>
    public static Option<double?> Real(string name, string description, double minimum, double maximum)
        => new(name)
        {
            Description = description,
            CustomParser = result =>
            {
                string text = result.Tokens[0].Value;
                if (double.TryParse(text, NumberStyles.Float, CultureInfo.InvariantCulture, out double value) && value >= minimum && value <= maximum)
                    return value;
                result.AddError(FormattableString.Invariant($"{name} takes a number from {minimum} to {maximum}, not '{text}'."));
                return null;
            },
        };

    private static long Read(ArgumentResult result, string name, long minimum, long maximum)
    {
        string text = result.Tokens[0].Value;
        if (long.TryParse(text, NumberStyles.AllowLeadingSign, CultureInfo.InvariantCulture, out long value) && value >= minimum && value <= maximum)
            return value;
        result.AddError($"{name} takes a whole number{Range(minimum, maximum)}, not '{text}'.");
        return minimum;
    }

    private static string Range(long minimum, long maximum)
    {
        if (minimum == long.MinValue)
            return "";
        return maximum >= int.MaxValue
            ? FormattableString.Invariant($" of at least {minimum}")
            : FormattableString.Invariant($" from {minimum} to {maximum}");
    }

    private static int[] ReadList(ArgumentResult result, string name, int minimum, int maximum)
    {
        string text = result.Tokens[0].Value;
        var values = new List<int>();
        foreach (string part in text.Split(','))
        {
            if (int.TryParse(part.Trim(), NumberStyles.None, CultureInfo.InvariantCulture, out int value) && value >= minimum && value <= maximum
                && (values.Count == 0 || value > values[^1]))
            {
                values.Add(value);
                continue;
            }

            result.AddError(FormattableString.Invariant($"{name} takes ascending whole numbers{Range(minimum, maximum)}, separated by commas, such as 8,16,24; '{part.Trim()}' in '{text}' does not fit."));
            return [];
        }

        return [.. values];
    }
}
