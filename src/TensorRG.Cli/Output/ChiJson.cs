using System.Text.Json.Nodes;
using TensorRG.Reports;

namespace TensorRG.Cli.Output;

/// <summary>A bond-dimension scan as JSON.</summary>
internal static class ChiJson
{
    /// <summary>The object that <c>converge --json</c> prints and stores: the fields of the last run, then points and the extrapolation.</summary>
    public static JsonObject Of(ChiReport report, IReadOnlyList<string> files, double seconds)
    {
        JsonObject json = SummaryJson.Of(report.Runs[^1]);
        json["seconds"] = JsonText.Number(seconds);
        json.Add("points", Points(report));
        json.Add("extrapolated", JsonText.Ordered(
            ("logZPerSite", JsonText.Number(report.Extrapolation.Value.Value)),
            ("logZPerSiteError", JsonText.Number(report.Extrapolation.Value.Error)),
            ("errorParts", SummaryJson.Parts(report.Extrapolation.Value)),
            ("isExtrapolated", report.Extrapolation.IsExtrapolated),
            ("verdict", report.Extrapolation.Verdict),
            ("relativeDeviation", report.Exact is null ? null : JsonText.Number(report.RelativeDeviation))));
        json.Add("files", new JsonArray([.. files.Select(static f => JsonValue.Create(f))]));
        return json;
    }

    private static JsonArray Points(ChiReport report)
    {
        JsonArray points = report.Table.ToJson();
        for (int i = 0; i < points.Count; i++)
            points[i]!.AsObject().Add("run", ShownPath.Of(report.Runs[i].Folder.Path));
        return points;
    }
}
