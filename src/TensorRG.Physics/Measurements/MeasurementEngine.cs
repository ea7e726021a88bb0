using TensorRG.Models;
using TensorRG.Tensors.Kernels;

namespace TensorRG.Physics.Measurements;

/// <summary>Measures by the method that the inputs name.</summary>
/// <param name="backend">Where the linear algebra runs.</param>
public sealed class MeasurementEngine(Backend backend) : IMeasurer
{
    /// <summary>The methods there are.</summary>
    public static IReadOnlyList<string> Methods { get; } = ["boundary", "blocks"];

    /// <inheritdoc/>
    public Measurement Measure(MeasurementInputs inputs, IProgress<string>? progress, CancellationToken stop)
    {
        ArgumentNullException.ThrowIfNull(inputs);
        return inputs.Method switch
        {
            "boundary" when inputs.TorusLength is null => new BoundaryMeasurer(backend).Measure(inputs, progress, stop),
            "boundary" => throw new ModelException("The boundary method knows the infinite lattice alone. Use --method blocks for a torus."),
            "blocks" => new BlockMeasurer(backend).Measure(inputs, progress, stop),
            _ => throw new ModelException($"There is no method '{inputs.Method}'. There are: {string.Join(", ", Methods)}."),
        };
    }
}
