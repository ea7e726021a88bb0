using System.Globalization;
using System.Text.RegularExpressions;

namespace TensorRG.Runs;

/// <summary>The names of the files in a run folder.</summary>
internal static partial class RunFiles
{
    public const string Run = "run.json";
    public const string Flow = "flow.csv";
    public const string Result = "result.json";
    public const string Lock = "run.lock";
    public const string Owner = "run.owner";
    public const string Aside = ".tmp";
    public const string Damaged = ".damaged";

    /// <summary>Inputs of a sweep.</summary>
    public const string Inputs = "inputs.json";

    /// <summary>Folder of a sweep's points.</summary>
    public const string Points = "points";

    /// <summary>The text of a sweep's model that came from a file.</summary>
    public const string ModelText = "model.toml";

    /// <summary>The name of the checkpoint after a number of steps; six digits, so that names sort.</summary>
    public static string State(int step) => string.Create(CultureInfo.InvariantCulture, $"state-{step:D6}.h5");

    /// <summary>The step in a checkpoint's name.</summary>
    public static bool TryReadState(string name, out int step)
    {
        step = -1;
        Match match = StateName().Match(name);
        return match.Success
            && int.TryParse(match.Groups[1].Value, NumberStyles.None, CultureInfo.InvariantCulture, out step)
            && State(step) == name;
    }

    /// <summary>The name of a point of a sweep; six digits, so that names sort.</summary>
    public static string Point(int index) => string.Create(CultureInfo.InvariantCulture, $"{index:D6}.json");

    /// <summary>Whether a name is that of a half-written file which a killed process left.</summary>
    public static bool IsLeftover(string name)
    {
        if (!name.EndsWith(Aside, StringComparison.Ordinal))
            return false;
        string final = name[..^Aside.Length];
        return final is Run or Flow or Result or Inputs or ModelText
            || TryReadState(final, out _) || PointName().IsMatch(final) || ReportName().IsMatch(final);
    }

    /// <summary>Whether a name is one that a killed creation may leave in an otherwise empty folder.</summary>
    public static bool IsFromCreation(string name) => name is Lock or Owner || IsLeftover(name);

    [GeneratedRegex(@"^state-(\d{6,})\.h5\z", RegexOptions.CultureInvariant)]
    private static partial Regex StateName();

    [GeneratedRegex(@"^\d{6,}\.json\z", RegexOptions.CultureInvariant)]
    private static partial Regex PointName();

    /// <summary>A table or figure of a sweep, and the process that was writing it.</summary>
    [GeneratedRegex(@"^sweep\.(?:csv|json|svg|png)\.\d+\z", RegexOptions.CultureInvariant)]
    private static partial Regex ReportName();
}
