namespace TensorRG.Models;

/// <summary>Finds the name that a person most likely meant.</summary>
public static class NameSuggestion
{
    /// <summary>" Did you mean 'x'?" for the known name nearest in edits (Levenshtein distance without regard to case), or nothing where none is near. For a single letter only the other case counts as near.</summary>
    /// <param name="name">The name that was given.</param>
    /// <param name="known">The names there are.</param>
    public static string Text(string name, IEnumerable<string> known)
    {
        ArgumentNullException.ThrowIfNull(name);
        ArgumentNullException.ThrowIfNull(known);
        string? nearest = known.MinBy(k => Distance(name, k));
        int allowed = name.Length == 1 ? 0 : Math.Max(1, name.Length / 2);
        return nearest is not null && Distance(name, nearest) <= allowed ? $" Did you mean '{nearest}'?" : "";
    }

    // Levenshtein distance, ignoring case.
    private static int Distance(string a, string b)
    {
        int[] row = [.. Enumerable.Range(0, b.Length + 1)];
        for (int i = 1; i <= a.Length; i++)
        {
            int diagonal = row[0];
            row[0] = i;
            for (int j = 1; j <= b.Length; j++)
            {
                bool same = char.ToUpperInvariant(a[i - 1]) == char.ToUpperInvariant(b[j - 1]);
                int replace = diagonal + (same ? 0 : 1);
                diagonal = row[j];
                row[j] = Math.Min(replace, 1 + Math.Min(row[j], row[j - 1]));
            }
        }
        return row[b.Length];
    }
}
