using System.CommandLine;
using TensorRG.Cli.Output;

namespace TensorRG.Cli.Input;

/// <summary>The options that choose how much is printed.</summary>
internal static class OutputOptions
{
    public static (Option<bool> Json, Option<bool> Quiet) Create() => (
        new Option<bool>("--json") { Description = "Print one JSON object and nothing else." },
        new Option<bool>("--quiet", "-q") { Description = "Print the summary alone, without the table of steps." });

    /// <param name="remark">What else is to say of the option.</param>
    public static Option<bool> Plot(string remark = "") => new("--plot")
    {
        Description = "Also draw X and the transfer-matrix levels against the length: flow.svg and flow.png in the run's folder." + remark,
    };

    /// <exception cref="UsageException">Both are given.</exception>
    public static OutputMode Read(ParseResult result, Option<bool> json, Option<bool> quiet)
    {
        if (result.GetValue(json) && result.GetValue(quiet))
            throw new UsageException("--json and --quiet contradict each other: --json prints the object alone. Give one of them.");
        if (result.GetValue(json))
            return OutputMode.Json;
        return result.GetValue(quiet) ? OutputMode.Quiet : OutputMode.Full;
    }

    /// <param name="mode">How much is printed.</param>
    /// <param name="label">Name of one run among many, whose steps are not listed; null for a run on its own.</param>
    public static IStepDisplay Display(OutputMode mode, string? label = null)
        => mode == OutputMode.Full ? new LiveDisplay(Consoles.Out, label) : new SilentDisplay(Consoles.Error);
}
