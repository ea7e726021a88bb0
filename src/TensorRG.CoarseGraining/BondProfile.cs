using System.Collections.Immutable;
using TensorRG.Tensors;

namespace TensorRG.CoarseGraining;

/// <summary>The sectors of a bond as text, for records.</summary>
internal static class BondProfile
{
    public static ImmutableArray<SectorSize> Of(Leg leg)
        => [.. leg.Sectors.Select(s => new SectorSize(leg.Group.Text(s.Charge), s.Dimension))];
}
