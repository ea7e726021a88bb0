using System.Diagnostics;
using System.Globalization;
using System.Text.Json;
using TensorRG.Models;
using TensorRG.Physics;
using TensorRG.Physics.Measurements;
using TensorRG.Tensors.Kernels;

namespace TensorRG.Benchmarks;

/// <summary>Measures every case of <see cref="ReferenceCases"/> and sets it against the published value, as a Markdown table on standard output.</summary>
internal static class ReferenceTable
{
    public static int Run(string referenceFile, string? only)
    {
        Dictionary<string, JsonElement> rows = JsonDocument.Parse(File.ReadAllText(referenceFile)).RootElement.GetProperty("values")
            .EnumerateArray().ToDictionary(static r => r.GetProperty("id").GetString()!);
        Console.WriteLine("| id | quantity | published | measured | bar | deviation | covered | chi | time | source |");
        Console.WriteLine("|---|---|---|---|---|---|---|---|---|---|");
        int missed = 0;
        foreach (ReferenceCase item in ReferenceCases.All.Where(c => only is null || c.Id.Contains(only, StringComparison.Ordinal)))
            missed += Report(item, rows[item.Id]) ? 0 : 1;
        Console.WriteLine();
        Console.WriteLine(FormattableString.Invariant($"{missed} not covered by the bar."));
        return 0;
    }

    private static bool Report(ReferenceCase item, JsonElement row)
    {
        long start = Stopwatch.GetTimestamp();
        Estimate estimate = Transform(item, Measure(item));
        double published = double.Parse(row.GetProperty("value").GetString()!.Split('(')[0], CultureInfo.InvariantCulture);
        double deviation = estimate.Value - published;
        bool covered = Math.Abs(deviation) <= estimate.Error;
        Console.WriteLine(FormattableString.Invariant(
            $"| {item.Id} | {row.GetProperty("quantity").GetString()} | {published:R} | {estimate.Value:R} | {estimate.Error:0.0e+00} | {deviation:0.0e+00} | {(covered ? "yes" : "NO")} | {item.BondDimension} | {Stopwatch.GetElapsedTime(start).TotalSeconds:0.0} s | {row.GetProperty("source").GetString()} |"));
        return covered;
    }

    private static Estimate Measure(ReferenceCase item)
    {
        var engine = new MeasurementEngine(Backends.Create(Backends.Default, Environment.ProcessorCount));
        ParameterSet parameters = ModelCatalogue.Find(item.Model).CreateParameters(item.Set.Select(static s => KeyValuePair.Create(s.Name, s.Value)));
        var inputs = new MeasurementInputs
        {
            Parameters = parameters,
            Quantities = [item.Quantity],
            BondDimension = item.BondDimension,
            TorusLength = item.Torus,
            Method = item.Torus is null ? "boundary" : "blocks",
        };
        return engine.Measure(inputs, null, CancellationToken.None).Values[0].Value;
    }

    /// <summary>exp(factor * x), its bar by the derivative.</summary>
    private static Estimate Transform(ReferenceCase item, Estimate measured)
    {
        if (item.Exponential is not { } factor)
            return measured;
        double value = Math.Exp(factor * measured.Value);
        return (measured.Times(factor) with { Value = value }) with { Parts = [.. measured.Parts.Select(p => p with { Value = p.Value * factor * value })] };
    }
}
