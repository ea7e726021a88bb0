using TensorRG.CoarseGraining;
using TensorRG.Models;
using TensorRG.Physics;
using TensorRG.Tensors;
using TensorRG.Tensors.Decompositions;
using TensorRG.Tensors.Kernels;

namespace TensorRG.Benchmarks;

/// <summary>
/// The measurements behind the error bars: D, bar and true error of ln Z per site on exactly solved models, for single runs and for the
/// limits of bond-dimension sequences, as CSV on standard output; coverage and sharpness on standard error.
/// </summary>
internal static class ErrorBarData
{
    private static readonly double[] Temperatures = [1.5, 1.8, 2.0, 2.1, 2.2, 2.25, 2.269185314213022, 2.28, 2.3, 2.4, 2.5, 2.75, 3.0, 3.5, 4.0];
    private static readonly List<(string Group, double BarOverError)> Found = [];

    public static int Run()
    {
        Console.WriteLine("scheme,model,parameters,chi,D,bar,error,barOverError");
        foreach (SchemeDefinition scheme in SchemeRegistry.All)
        {
            foreach ((string model, string name, double value) in Points())
                Measure(scheme, ModelCatalogue.Find(model).CreateParameters([KeyValuePair.Create(name, value)]), FormattableString.Invariant($"{name}={value}"));
        }

        foreach (IGrouping<string, double> group in Found.GroupBy(static f => f.Group, static f => f.BarOverError))
            Summarise(group.Key, [.. group.Order()]);
        return 0;
    }

    private static IEnumerable<(string Model, string Name, double Value)> Points()
        => Temperatures.Select(static t => ("ising", "temperature", t))
            .Concat(((int[])[3, 4, 5]).Select(static q => ("potts", "q", (double)q)))
            .Concat(((double[])[1, 1.5, 2.5]).Select(static c => ("six-vertex", "c", c)));

    private static void Measure(SchemeDefinition scheme, ParameterSet set, string parameters)
    {
        var points = new List<ChiPoint>();
        double exact = set.Model.Exact(Quantity.LogZPerSite, set)!.Value;
        foreach (int bondDimension in (int[])(scheme.Name == "hotrg" ? [6, 8, 10, 12, 14] : [6, 8, 10, 12, 16, 20, 24]))
        {
            FlowSummary summary = FlowSummary.Of(set, scheme, Records(scheme, set, bondDimension));
            points.Add(new ChiPoint(bondDimension, summary.LogZPerSite, summary.Measure));
            Report($"{scheme.Name} single run", $"{scheme.Name},{set.Model.Name},{parameters},{bondDimension}", summary.Measure, summary.LogZPerSite, exact);
        }

        ChiExtrapolation limit = ChiExtrapolation.Of(points[^5..]);
        string kind = limit.IsExtrapolated ? "limit" : "last";
        Report($"{scheme.Name} {(limit.IsExtrapolated ? "extrapolated" : "not extrapolated")}", $"{scheme.Name},{set.Model.Name},{parameters},{kind}", double.NaN, limit.Value, exact);
    }

    private static IReadOnlyList<StepRecord> Records(SchemeDefinition scheme, ParameterSet set, int bondDimension)
    {
        var algebra = new TensorAlgebra<double>(Backends.Create(Backends.Default, Environment.ProcessorCount));
        IScheme<double> engine = scheme.Create(algebra, new SchemeSettings(new CutRule(bondDimension)));
        var flow = new Flow<double>(engine, NetworkTensors.Build<double>(set.Model.Network(set)));
        while (flow.Step < 40)
            flow.Advance();
        return flow.Records;
    }

    private static void Report(string group, string key, double measure, Estimate value, double exact)
    {
        double error = value.Value - exact, ratio = value.Error / Math.Abs(error);
        Found.Add((group, ratio));
        string d = double.IsNaN(measure) ? "" : FormattableString.Invariant($"{measure:e3}");
        Console.WriteLine(FormattableString.Invariant($"{key},{d},{value.Error:e3},{error:e3},{ratio:g3}"));
    }

    private static void Summarise(string group, double[] ratios)
    {
        double covered = ratios.Count(static r => r >= 1) / (double)ratios.Length;
        Console.Error.WriteLine(FormattableString.Invariant(
            $"{group,-30} {ratios.Length,4} points, covered {100 * covered,5:0.0} %, bar over error: median {ratios[ratios.Length / 2],6:0.0}, least {ratios[0]:0.00}"));
    }
}
