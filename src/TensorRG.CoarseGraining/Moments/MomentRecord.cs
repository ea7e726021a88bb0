using System.Collections.Immutable;
using System.Numerics;

namespace TensorRG.CoarseGraining.Moments;

/// <summary>What one state of a <see cref="MomentFlow{T}"/> says of the torus made of one block. Per site always means per lattice site.</summary>
public sealed record MomentRecord
{
    /// <summary>Completed steps; 0 is one vertex closed on itself.</summary>
    public required int Step { get; init; }

    /// <summary>N, the lattice sites of the torus.</summary>
    public required double Sites { get; init; }

    /// <summary>Height over width of the torus: 1 for a square, 2 after an odd number of steps.</summary>
    public required double AspectRatio { get; init; }

    /// <summary>States on the larger of the two bonds.</summary>
    public required int BondDimension { get; init; }

    /// <summary>ln |Z| per site of the torus; minus infinity where Z is zero.</summary>
    public required double LogZTorusPerSite { get; init; }

    /// <summary>Argument of Z, in (-pi, pi]; 0 for positive weights.</summary>
    public required double TorusPhase { get; init; }

    /// <summary>For each observable the moments &lt;O^n&gt; / N^n, n = 1 .. order, O being its sum over the torus. NaN where Z is zero.</summary>
    public required ImmutableArray<ImmutableArray<Complex>> Moments { get; init; }

    /// <summary>
    /// For each observable the central moments &lt;(O - &lt;O&gt;)^n&gt; / N^n, n = 1 .. order. They are kept apart from the others all along, so
    /// that the second one, of size 1 / N, is not the difference of two numbers of size 1. The first is zero but for round-off.
    /// </summary>
    public required ImmutableArray<ImmutableArray<Complex>> CentralMoments { get; init; }

    /// <summary>Discarded weight of this step's truncation, relative to the total.</summary>
    public required double DiscardedWeight { get; init; }

    /// <summary>Notices of the step, such as a cut that fell inside a multiplet.</summary>
    public ImmutableArray<string> Notices { get; init; } = [];
}
