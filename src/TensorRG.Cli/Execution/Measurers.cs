using TensorRG.Physics.Measurements;
using TensorRG.Tensors.Kernels;

namespace TensorRG.Cli.Execution;

/// <summary>Makes what measures.</summary>
internal static class Measurers
{
    /// <summary>A measurer on a backend.</summary>
    public static IMeasurer Create(Backend backend) => new MeasurementEngine(backend);
}
