using TensorRG.CoarseGraining;
using TensorRG.Models;
using TensorRG.Physics;
using TensorRG.Tensors;
using TensorRG.Tensors.Decompositions;
using TensorRG.Tensors.Kernels;

namespace TensorRG.Benchmarks;

/// <summary>
/// The measurements behind the schemes' truncation laws: D and the true error of ln Z per site on exactly solved models, as CSV on standard output.
/// </summary>
internal static class ErrorBarData
{
    private static readonly double[] Temperatures = [1.5, 1.8, 2.0, 2.1, 2.2, 2.25, 2.269185314213022, 2.28, 2.3, 2.4, 2.5, 2.75, 3.0, 3.5, 4.0];

    public static int Run()
    {
        Console.WriteLine("scheme,model,parameters,chi,D,bar,error,barOverError");
        foreach (SchemeDefinition scheme in SchemeRegistry.All)
        {
            foreach (int bondDimension in (int[])(scheme.Name == "hotrg" ? [6, 8, 10, 12, 14] : [6, 8, 10, 12, 16, 20, 24]))
            {
                foreach (double temperature in Temperatures)
                    Measure(scheme, bondDimension, "ising", ("temperature", temperature));
                Measure(scheme, bondDimension, "potts", ("q", 3));
                Measure(scheme, bondDimension, "potts", ("q", 4));
                Measure(scheme, bondDimension, "potts", ("q", 5));
                Measure(scheme, bondDimension, "six-vertex", ("c", 1));
                Measure(scheme, bondDimension, "six-vertex", ("c", 1.5));
                Measure(scheme, bondDimension, "six-vertex", ("c", 2.5));
            }
        }

        return 0;
    }

    private static void Measure(SchemeDefinition scheme, int bondDimension, string model, (string Name, double Value) parameter)
    {
        ParameterSet set = ModelCatalogue.Find(model).CreateParameters([KeyValuePair.Create(parameter.Name, parameter.Value)]);
        var algebra = new TensorAlgebra<double>(Backends.Create(Backends.Default, Environment.ProcessorCount));
        IScheme<double> engine = scheme.Create(algebra, new SchemeSettings(new CutRule(bondDimension)));
        var flow = new Flow<double>(engine, NetworkTensors.Build<double>(set.Model.Network(set)));
        while (flow.Step < 40)
            flow.Advance();
        FlowSummary summary = FlowSummary.Of(set, scheme, flow.Records);
        double error = summary.LogZPerSite.Value - summary.Exact!.Value, bar = summary.LogZPerSite.Error;
        Console.WriteLine(FormattableString.Invariant(
            $"{scheme.Name},{model},{parameter.Name}={parameter.Value},{bondDimension},{summary.Measure:e3},{bar:e3},{error:e3},{bar / Math.Abs(error):g3}"));
    }
}
