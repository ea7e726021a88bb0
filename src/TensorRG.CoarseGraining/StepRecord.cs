using System.Collections.Immutable;

namespace TensorRG.CoarseGraining;

/// <summary>
/// What one state of the flow says: the network after <see cref="Step"/> steps, on tensors that each stand for
/// <see cref="SitesPerTensor"/> lattice sites. Per site always means per lattice site.
/// </summary>
public sealed record StepRecord
{
    /// <summary>Completed steps; 0 is the initial network.</summary>
    public required int Step { get; init; }

    /// <summary>Linear size of one tensor in lattice constants: the square root of its number of network vertices.</summary>
    public required double LengthScale { get; init; }

    /// <summary>Height over width of the block that one tensor stands for: 1 for a square, tilted or not.</summary>
    public required double AspectRatio { get; init; }

    /// <summary>Lattice sites per tensor.</summary>
    public required double SitesPerTensor { get; init; }

    /// <summary>States kept on the vertical bonds, by charge.</summary>
    public required ImmutableArray<SectorSize> VerticalBond { get; init; }

    /// <summary>States kept on the horizontal bonds, by charge.</summary>
    public required ImmutableArray<SectorSize> HorizontalBond { get; init; }

    /// <summary>Largest discarded weight of this step's truncations, relative to the total: sum of discarded squared singular values over the sum of all.</summary>
    public required double DiscardedWeight { get; init; }

    /// <summary>ln |Z| per site of the torus made of one tensor; minus infinity where Z is zero.</summary>
    public required double LogZTorusPerSite { get; init; }

    /// <summary>Argument of Z of that torus, in (-pi, pi]; 0 for positive weights.</summary>
    public required double TorusPhase { get; init; }

    /// <summary>
    /// ln Z per site of the infinite lattice, estimated from this step and an earlier one of the same shape:
    /// (ln Z' - ln Z) / (N' - N), which drops the universal factor of the torus. NaN where there is no earlier step or one of the two is zero.
    /// </summary>
    public required double LogZPerSite { get; init; }

    /// <summary>Degeneracy ratio X = (Tr M)^2 / Tr M^2 of the transfer matrix M of one tensor.</summary>
    public required double DegeneracyRatio { get; init; }

    /// <summary>Leading transfer-matrix eigenvalues, descending.</summary>
    public required ImmutableArray<SpectrumLine> Spectrum { get; init; }

    /// <summary>Wall-clock time of the step in seconds. The only field that differs between reruns.</summary>
    public required double Seconds { get; init; }

    /// <summary>Notices of the step, such as a cut that fell inside a multiplet.</summary>
    public ImmutableArray<string> Notices { get; init; } = [];

    /// <summary>Total number of states on a vertical bond.</summary>
    public int VerticalDimension => VerticalBond.Sum(s => s.Dimension);

    /// <summary>Total number of states on a horizontal bond.</summary>
    public int HorizontalDimension => HorizontalBond.Sum(s => s.Dimension);
}
