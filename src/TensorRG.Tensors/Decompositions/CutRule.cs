namespace TensorRG.Tensors.Decompositions;

/// <summary>How many singular values (or eigenvalues) a truncation keeps, counted over all charges together.</summary>
/// <param name="MaxDimension">Largest number kept, at least 1: the bond dimension chi.</param>
/// <param name="MultipletGap">
/// Values are one multiplet when neighbours differ by less than this fraction; a cut that would fall inside a multiplet
/// moves down to its upper edge. 0 allows a cut anywhere.
/// </param>
/// <param name="RelativeFloor">Values below this fraction of the largest are round-off and never kept.</param>
public sealed record CutRule(int MaxDimension, double MultipletGap = CutRule.DefaultMultipletGap, double RelativeFloor = CutRule.DefaultFloor)
{
    /// <summary>The relative gap within which values count as degenerate, unless told otherwise.</summary>
    public const double DefaultMultipletGap = 1e-8;

    /// <summary>The relative size below which a value is round-off, unless told otherwise.</summary>
    public const double DefaultFloor = 1e-15;

    /// <summary>Round-off of a computed value relative to the largest: added to the gap when multiplets are recognised.</summary>
    private const double AbsoluteNoise = 4e-15;

    /// <summary>Largest number kept, at least 1.</summary>
    public int MaxDimension { get; } = MaxDimension >= 1
        ? MaxDimension
        : throw new ArgumentOutOfRangeException(nameof(MaxDimension), MaxDimension, "A bond keeps at least one state.");

    /// <summary>The number of values to keep.</summary>
    /// <param name="descending">All known values, descending, non-negative.</param>
    /// <param name="cutsMultiplet">
    /// True if the cut had to fall inside a multiplet: allowed by a zero gap, or the multiplet starts at the first value.
    /// </param>
    /// <returns>Between 1 and the bond dimension; 0 if there is no positive value.</returns>
    public int Count(ReadOnlySpan<double> descending, out bool cutsMultiplet)
    {
        cutsMultiplet = false;
        if (descending.IsEmpty || !(descending[0] > 0))
            return 0;
        double floor = descending[0] * RelativeFloor;
        int kept = Math.Min(MaxDimension, descending.Length);
        while (kept > 1 && descending[kept - 1] <= floor)
            kept--;
        int limit = kept;
        double gap = MultipletGap > 0 ? MultipletGap : DefaultMultipletGap;
        while (kept < descending.Length && kept > 0 && Same(descending[kept - 1], descending[kept], gap, descending[0]))
            kept--;
        cutsMultiplet = kept < limit && (MultipletGap <= 0 || kept == 0);
        return cutsMultiplet ? limit : kept;
    }

    private static bool Same(double upper, double lower, double gap, double largest)
        => upper - lower <= (gap * upper) + (AbsoluteNoise * largest);
}
