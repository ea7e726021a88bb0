using TensorRG.Models.Files.Expressions;

namespace TensorRG.Models.Files;

/// <summary>The names that a file gives to parameters, constants and variables: each once, and none that the language uses.</summary>
/// <param name="source">The file.</param>
internal sealed class NameRegistry(SourceText source)
{
    private static readonly string[] Reserved = ["temperature", "up", "left", "down", "right", "e_1", "e_2", "e_3"];

    private readonly Dictionary<string, int> lines = [];

    // Parameters are found on the command line without regard to case.
    private readonly Dictionary<string, int> parameters = new(StringComparer.OrdinalIgnoreCase);

    /// <summary>True for an ASCII letter followed by letters, digits and underscores.</summary>
    /// <param name="name">Any text.</param>
    public static bool IsName(string name) => name.Length is > 0 and <= Limits.NameLength
        && char.IsAsciiLetter(name[0])
        && name.All(c => char.IsAsciiLetterOrDigit(c) || c == '_');

    /// <summary>Takes a name.</summary>
    /// <param name="name">The name.</param>
    /// <param name="start">Offset of its key.</param>
    /// <param name="what">What it names, for messages.</param>
    /// <exception cref="ModelFileException">It is no name, reserved, or taken.</exception>
    public void Add(string name, int start, string what)
    {
        if (!IsName(name))
            throw source.Error(start, $"The {what} {SourceText.Quote(name)} has no valid name. Use up to {Limits.NameLength} ASCII letters, digits and underscores, a letter first.");
        if (FunctionTable.IsReserved(name) || Reserved.Contains(name, StringComparer.OrdinalIgnoreCase))
            throw source.Error(start, $"The name '{name}' of a {what} is reserved. Choose another{(name.Equals("temperature", StringComparison.OrdinalIgnoreCase) ? "; the temperature is called T in files" : "")}.");
        Take(lines, name, start, what);
    }

    /// <summary>Takes the name of a parameter.</summary>
    /// <param name="name">The name.</param>
    /// <param name="start">Offset of its key.</param>
    /// <exception cref="ModelFileException">It is no name, reserved, or that of another parameter but for small and capital letters.</exception>
    public void AddParameter(string name, int start)
    {
        Add(name, start, "parameter");
        Take(parameters, name, start, "parameter");
    }

    /// <summary>Takes the names of a variable: its own, and those with the index of a site.</summary>
    /// <param name="name">The name.</param>
    /// <param name="start">Offset of its key.</param>
    /// <exception cref="ModelFileException">It is no name, reserved, or taken.</exception>
    public void AddVariable(string name, int start)
    {
        if (name.Contains('_', StringComparison.Ordinal) && IsName(name))
            throw source.Error(start, $"The variable '{name}' has an underscore, which is for the index of a site. Choose a name without.");
        Add(name, start, "variable");
        foreach (string index in ClusterKey.Indices)
            Take(lines, $"{name}_{index}", start, "variable");
    }

    private void Take(Dictionary<string, int> taken, string name, int start, string what)
    {
        if (taken.TryGetValue(name, out int earlier))
            throw source.Error(start, $"The name '{name}' of a {what} is taken in line {earlier}{(taken == parameters ? ", as small and capital letters count as equal" : "")}. Choose another.");
        taken.Add(name, source.Line(start));
    }
}
