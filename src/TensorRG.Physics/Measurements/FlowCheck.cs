using System.Numerics;
using TensorRG.CoarseGraining;
using TensorRG.Models;
using TensorRG.Tensors;
using TensorRG.Tensors.Decompositions;
using TensorRG.Tensors.Kernels;

namespace TensorRG.Physics.Measurements;

/// <summary>
/// A quick second opinion on ln Z: a short flow of the default scheme. A fixed-point iteration can settle on a state that is not the dominant one - a frozen
/// sector, one of two rows that take turns - and then every number is that of another state; coarse-graining cannot.
/// </summary>
internal static class FlowCheck
{
    private const int BondDimension = 16;
    private const int Steps = 40;

    /// <summary>Bars by which two methods may differ by chance.</summary>
    private const double Bars = 4;

    /// <summary>ln |Z| per site of a network with its bar.</summary>
    /// <param name="network">The network.</param>
    /// <param name="backend">Where the linear algebra runs.</param>
    public static Estimate LogZ(VertexNetwork network, Backend backend)
        => network.IsReal ? Run<double>(network, backend) : Run<Complex>(network, backend);

    /// <summary>How far a value is from the flow's, or 0 if the bars explain it.</summary>
    /// <param name="value">The value.</param>
    /// <param name="flow">The flow's.</param>
    public static double Disagreement(Estimate value, Estimate flow)
    {
        double difference = Math.Abs(value.Value - flow.Value);
        return difference <= Bars * (value.Error + flow.Error) ? 0 : difference;
    }

    private static Estimate Run<T>(VertexNetwork network, Backend backend)
        where T : unmanaged, INumberBase<T>
    {
        SchemeDefinition scheme = SchemeRegistry.Default;
        var flow = new Flow<T>(scheme.Create(new TensorAlgebra<T>(backend), new SchemeSettings(new CutRule(BondDimension))), NetworkTensors.Build<T>(network));
        while (flow.Step < Steps)
            flow.Advance();
        return FreeEnergy.LogZPerSite(flow.Records, scheme, network.SitesPerVertex);
    }
}
