using System.Numerics;
using TensorRG.Tensors;
using TensorRG.Tensors.Decompositions;

namespace TensorRG.Boundary;

/// <summary>
/// The surroundings of one row of a network: its fixed points from above and from below as uniform matrix product states, and
/// the environments of the strip that they make with the row.
/// </summary>
/// <typeparam name="T">Element type.</typeparam>
public sealed record BoundaryState<T>
    where T : unmanaged, INumberBase<T>
{
    /// <summary>Fixed point from above; its vertical leg meets leg u of the row.</summary>
    public required UniformState<T> Upper { get; init; }

    /// <summary>Fixed point from below; its vertical leg meets leg d of the row. Contracted as it is, not conjugated.</summary>
    public required UniformState<T> Lower { get; init; }

    /// <summary>FL[x, a, l], everything left of a vertex: legs meet AC of the lower state, AC of the upper state, leg l of the row.</summary>
    public required Tensor<T> FL { get; init; }

    /// <summary>FR[r, b, y], everything right of a vertex: leg r of the row, upper, lower. Scaled so that FL C C FR = 1.</summary>
    public required Tensor<T> FR { get; init; }

    /// <summary>ln of the partition function per vertex; the imaginary part, its phase, is in (-pi, pi] and zero for positive weights.</summary>
    public required Complex LogEigenvalue { get; init; }

    /// <summary>
    /// The larger of |AC - AL C| and |AC - C AR|, of both fixed points. The error of <see cref="LogEigenvalue"/> that is left to iterate away is of the order of its square.
    /// </summary>
    public required double Residual { get; init; }

    /// <summary>Whether the residual of both fixed points reached the tolerance.</summary>
    public required bool IsConverged { get; init; }

    /// <summary>Rounds of the iteration, over all bond dimensions and both fixed points.</summary>
    public required int Iterations { get; init; }

    /// <summary>Schmidt values of the upper fixed point with their charges, descending in each sector.</summary>
    public required BondWeights Schmidt { get; init; }

    /// <summary>States on the bond of the upper fixed point: fewer than asked for where more would have no weight.</summary>
    public int BondDimension => Upper.BondDimension;
}
