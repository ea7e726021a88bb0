using TensorRG.CoarseGraining;
using TensorRG.Models;
using TensorRG.Physics;
using TensorRG.Tensors;
using TensorRG.Tensors.Decompositions;
using TensorRG.Tensors.Kernels;

namespace TensorRG.Validation;

/// <summary>Runs a flow the way the command line does.</summary>
internal static class Computation
{
    public static IReadOnlyList<StepRecord> Run(
        string scheme,
        int bondDimension,
        int steps,
        string model = "ising",
        (string Name, double Value)[]? parameters = null,
        bool anywhere = false,
        bool graded = true,
        DecompositionMode mode = DecompositionMode.Auto)
    {
        ParameterSet set = Parameters(model, parameters);
        var settings = new SchemeSettings(new CutRule(bondDimension, anywhere ? 0 : CutRule.DefaultMultipletGap)) { Decomposition = mode };
        var algebra = new TensorAlgebra<double>(Backends.Create(Backends.Default, Environment.ProcessorCount));
        IScheme<double> engine = SchemeRegistry.Find(scheme)!.Create(algebra, settings);
        var flow = new Flow<double>(engine, NetworkTensors.Build<double>(set.Model.Network(set, graded)));
        while (flow.Step < steps)
            flow.Advance();
        return flow.Records;
    }

    public static ParameterSet Parameters(string model, (string Name, double Value)[]? parameters)
        => ModelCatalogue.Find(model).CreateParameters((parameters ?? []).Select(static p => KeyValuePair.Create(p.Name, p.Value)));

    public static double RelativeDeviation(IReadOnlyList<StepRecord> records, double exact)
        => Math.Abs(records[^1].LogZPerSite - exact) / Math.Abs(exact);
}
