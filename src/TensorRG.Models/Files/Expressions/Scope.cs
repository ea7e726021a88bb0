namespace TensorRG.Models.Files.Expressions;

/// <summary>The names that an expression may use, each with the slot that holds its value.</summary>
/// <param name="slots">Slot by name.</param>
/// <param name="hint">A remedy for a name that is not there, or null to list those that are.</param>
internal sealed class Scope(IReadOnlyDictionary<string, int> slots, Func<string, string?>? hint = null)
{
    /// <summary>No names at all.</summary>
    public static Scope Empty { get; } = new(new Dictionary<string, int>());

    /// <summary>The names and their slots.</summary>
    public IReadOnlyDictionary<string, int> Slots { get; } = slots;

    /// <summary>What to do about an unknown name.</summary>
    /// <param name="name">The name.</param>
    public string Remedy(string name)
    {
        if (hint?.Invoke(name) is { } special)
            return special;
        string suggestion = NameSuggestion.Text(name, Slots.Keys.Concat(FunctionTable.Names)).Trim();
        string known = Slots.Count == 0 ? "No names are known here besides functions, pi, e and i." : $"Known here: {string.Join(", ", Slots.Keys.Take(40))}{(Slots.Count > 40 ? ", ..." : "")}.";
        return suggestion.Length == 0 ? known : $"{suggestion} {known}";
    }

    /// <summary>The same scope with more names.</summary>
    /// <param name="more">Names and slots; each is new.</param>
    /// <param name="moreHint">A remedy for a name that is not there.</param>
    public Scope With(IEnumerable<KeyValuePair<string, int>> more, Func<string, string?>? moreHint = null)
    {
        Dictionary<string, int> all = new(Slots.Count);
        foreach ((string name, int slot) in more.Concat(Slots))
            all[name] = slot;
        return new(all, moreHint ?? hint);
    }
}
