using System.Text.Json.Nodes;
using TensorRG.Reports;
using TensorRG.Runs.Points;

namespace TensorRG.Cli.Output;

/// <summary>A sweep as JSON: what is in sweep.json and what <c>sweep --json</c> prints. Nothing in it differs between reruns.</summary>
internal static class SweepJson
{
    public static JsonObject Of(SweepReport report, IEnumerable<string> files)
    {
        SweepInputs inputs = report.Inputs;
        JsonObject json = JsonText.Ordered(("model", inputs.Model.Name), ("identity", inputs.Identity));
        foreach ((string name, JsonNode? value) in MeasureJson.Settings(inputs.Measurement, inputs.Backend))
            json.Add(name, value?.DeepClone());
        json.Add("axes", new JsonArray([.. inputs.Axes.Select(Axis)]));
        json.Add("quantities", new JsonArray([.. report.Quantities.Select(static q => JsonValue.Create(q))]));
        json.Add("failed", report.Failed.Count());
        json.Add("notConverged", report.NotConverged);
        json.Add("files", new JsonArray([.. files.Select(static f => JsonValue.Create(f))]));
        json.Add("points", new JsonArray([.. Enumerable.Range(0, report.Points.Length).Select(i => Point(report, i))]));
        return json;
    }

    private static JsonObject Axis(SweepAxis axis) => JsonText.Ordered(
        ("name", axis.Name),
        ("parameters", new JsonArray([.. axis.Parameters.Select(static p => JsonValue.Create(p))])),
        ("values", new JsonArray([.. axis.Values.Select(static v => JsonText.Number(v))])));

    private static JsonObject Point(SweepReport report, int index)
    {
        PointResult point = report.Points[index];
        return JsonText.Ordered(
            ("parameters", SummaryJson.Parameters(report.Inputs.At(index).Parameters)),
            ("failure", point.Failure),
            ("values", point.Measurement is { } values ? MeasureJson.Values(values) : null),
            ("remarks", point.Measurement is { } measurement ? MeasureJson.Remarks(measurement) : null));
    }
}
