using System.Collections.Immutable;

namespace TensorRG.Cli.Input;

/// <summary>The list of what to measure. Whether a model has a quantity the measurer says.</summary>
internal static class QuantityList
{
    /// <summary>Reads names separated by commas.</summary>
    /// <exception cref="UsageException">A name is empty or stands twice.</exception>
    public static ImmutableArray<string> Read(string text)
    {
        ImmutableArray<string> names = [.. text.Split(',').Select(static n => n.Trim())];
        if (names.Any(static n => n.Length == 0))
            throw new UsageException($"--observables takes names separated by commas, such as ln-z,energy; one in '{text}' is empty. Leave --observables out for all.");
        if (names.GroupBy(static n => n).FirstOrDefault(static g => g.Count() > 1) is { } twice)
            throw new UsageException($"--observables names '{twice.Key}' twice. Give it once.");
        return names;
    }
}
