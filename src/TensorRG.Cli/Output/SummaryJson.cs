using System.Text.Json.Nodes;
using TensorRG.Cli.Execution;
using TensorRG.Models;
using TensorRG.Physics;
using TensorRG.Reports;

namespace TensorRG.Cli.Output;

/// <summary>The result of a run as JSON.</summary>
internal static class SummaryJson
{
    /// <summary>The object that <c>--json</c> prints.</summary>
    public static JsonObject Of(RunReport report)
    {
        JsonObject json = JsonText.Ordered(
            ("model", report.Parameters.Model.Name),
            ("parameters", Parameters(report.Parameters)),
            ("scheme", report.Scheme.Name),
            ("bondDimension", report.Folder.Inputs.BondDimension),
            ("steps", report.Folder.Inputs.Steps));
        foreach ((string name, JsonNode? value) in Numbers(report.Summary))
            json.Add(name, value?.DeepClone());
        json.Add("run", ShownPath.Of(report.Folder.Path));
        json.Add("identity", report.Folder.Identity);
        json.Add("backend", report.Backend.Name);
        json.Add("backendDescription", report.Backend.Description);
        json.Add("threads", report.Threads);
        json.Add("seconds", JsonText.Number(report.Seconds));
        return json;
    }

    /// <summary>What depends on the inputs alone: stored as the run's result, the same bits on every rerun.</summary>
    public static JsonObject Numbers(FlowSummary summary) => JsonText.Ordered(
        ("logZPerSite", JsonText.Number(summary.LogZPerSite.Value)),
        ("logZPerSiteError", JsonText.Number(summary.LogZPerSite.Error)),
        ("errorParts", Parts(summary.LogZPerSite)),
        ("freeEnergyPerSite", summary.FreeEnergyPerSite is null ? null : JsonText.Number(summary.FreeEnergyPerSite.Value)),
        ("freeEnergyPerSiteError", summary.FreeEnergyPerSite is null ? null : JsonText.Number(summary.FreeEnergyPerSite.Error)),
        ("exact", Exact(summary)),
        ("degeneracyRatio", JsonText.Number(summary.DegeneracyRatio)),
        ("phases", summary.Phase.Phases),
        ("phase", summary.Phase.Summary),
        ("discardedMeasure", JsonText.Number(summary.Measure)));

    /// <summary>Parameters by name.</summary>
    public static JsonObject Parameters(ParameterSet parameters)
    {
        var json = new JsonObject();
        foreach ((string name, double value) in parameters.Values)
            json.Add(name, JsonText.Number(value));
        return json;
    }

    /// <summary>The parts of an error bar.</summary>
    public static JsonArray Parts(Estimate estimate)
        => [.. estimate.Parts.Select(static p => JsonText.Ordered(("name", p.Name), ("value", JsonText.Number(p.Value)), ("basis", p.Basis)))];

    private static JsonObject? Exact(FlowSummary summary) => summary.Exact is not { } exact
        ? null
        : JsonText.Ordered(
            ("logZPerSite", JsonText.Number(exact.Value)),
            ("relativeDeviation", JsonText.Number(summary.RelativeDeviation)),
            ("insideErrorBar", summary.IsCovered),
            ("source", exact.Source));
}
