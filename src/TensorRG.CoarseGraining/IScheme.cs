using System.Numerics;
using TensorRG.Tensors;

namespace TensorRG.CoarseGraining;

/// <summary>
/// A coarse-graining of uniform square networks. A step makes one tensor of two. A scheme knows neither the model nor
/// the symmetry, keeps no state of its own, and gives the same bits for the same arguments.
/// </summary>
/// <typeparam name="T">Element type.</typeparam>
public interface IScheme<T>
    where T : unmanaged, INumberBase<T>
{
    /// <summary>After how many steps the block that a tensor stands for has the same shape again.</summary>
    int ShapePeriod { get; }

    /// <summary>The state before the first step.</summary>
    /// <param name="site">A[u, l, d, r] as in <see cref="InitialNetwork{T}"/>.</param>
    NetworkState<T> Begin(Tensor<T> site);

    /// <summary>One step.</summary>
    /// <param name="state">The present network.</param>
    /// <param name="step">Number of this step, from 1: it seeds random blocks and alternates directions.</param>
    CoarseStep<T> Step(NetworkState<T> state, int step);

    /// <summary>
    /// M[u, d]: one tensor closed horizontally on itself, bond weights included. Its trace is Z of the torus made of
    /// one tensor, the trace of its square that of two tensors stacked.
    /// </summary>
    /// <param name="state">The network.</param>
    Tensor<T> TransferMatrix(NetworkState<T> state);

    /// <summary>The network with every tensor multiplied by a factor.</summary>
    /// <param name="state">The network.</param>
    /// <param name="factor">The factor.</param>
    NetworkState<T> Rescale(NetworkState<T> state, double factor);

    /// <summary>The vertical and the horizontal bond.</summary>
    /// <param name="state">The network.</param>
    (Leg Vertical, Leg Horizontal) Bonds(NetworkState<T> state);

    /// <summary>Height over width of the block that one tensor stands for.</summary>
    /// <param name="step">Completed steps.</param>
    double AspectRatio(int step);
}
