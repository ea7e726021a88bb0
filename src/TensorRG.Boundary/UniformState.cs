using System.Numerics;
using TensorRG.Tensors;
using TensorRG.Tensors.Decompositions;

namespace TensorRG.Boundary;

/// <summary>
/// A uniform matrix product state in mixed canonical form: AL[a, p, b] an isometry from b to (a, p), AR[a, p, b] one from a to
/// (p, b), C[a, b] the matrix between them, AC[a, p, b] the tensor of one vertex. At the fixed point AL C = AC = C AR.
/// </summary>
/// <typeparam name="T">Element type.</typeparam>
/// <param name="AL">Tensor of the vertices to the left: bond a (ingoing), vertical leg p, bond b (outgoing).</param>
/// <param name="AR">Tensor of the vertices to the right, with the same legs.</param>
/// <param name="AC">Tensor of the central vertex, with the same legs; norm 1.</param>
/// <param name="C">Matrix on the central bond: a (ingoing), b (outgoing); norm 1. Its singular values are the Schmidt values.</param>
public sealed record UniformState<T>(Tensor<T> AL, Tensor<T> AR, Tensor<T> AC, Tensor<T> C)
    where T : unmanaged, INumberBase<T>
{
    /// <summary>The bond, as it enters a tensor.</summary>
    public Leg Bond => C.Legs[0];

    /// <summary>Number of states on the bond.</summary>
    public int BondDimension => Bond.Dimension;

    /// <summary>The Schmidt values with their charges, descending in each sector; their squares add up to 1.</summary>
    /// <param name="algebra">Where the decomposition runs.</param>
    /// <exception cref="Tensors.Kernels.DecompositionException">The state holds NaN or infinity.</exception>
    public BondWeights SchmidtValues(TensorAlgebra<T> algebra)
    {
        ArgumentNullException.ThrowIfNull(algebra);
        return DenseSvd.Compute(algebra.Kernels, C, [0], [1], UnitaryFactor.KeepAll).Weights;
    }

    /// <summary>The same state with the vertical leg turned round, as it is seen in the network turned upside down.</summary>
    internal UniformState<T> Turned() => new(AL.ReverseArrow(1), AR.ReverseArrow(1), AC.ReverseArrow(1), C);
}
