using System.Globalization;

namespace TensorRG.Cli.Execution;

/// <summary>What a run folder says about where it was begun; none of it is part of the run's identity.</summary>
internal static class RunLabels
{
    public static IReadOnlyDictionary<string, string> Now() => new Dictionary<string, string>
    {
        ["begun"] = DateTime.UtcNow.ToString("yyyy-MM-dd HH:mm:ss'Z'", CultureInfo.InvariantCulture),
        ["machine"] = Environment.MachineName,
        ["program"] = "tensorrg " + typeof(RunLabels).Assembly.GetName().Version?.ToString(3),
        ["runtime"] = System.Runtime.InteropServices.RuntimeInformation.FrameworkDescription,
    };
}
