namespace TensorRG.Tensors.Decompositions;

/// <summary>Applies a <see cref="CutRule"/> to the values of all sectors together.</summary>
internal static class SectorCut
{
    /// <summary>How many values to keep in each sector.</summary>
    /// <param name="sectors">Values of each charge, descending.</param>
    /// <param name="rule">The rule.</param>
    /// <param name="cutsMultiplet">Whether the cut falls inside a multiplet.</param>
    public static Dictionary<Charge, int> Counts(IReadOnlyDictionary<Charge, double[]> sectors, CutRule rule, out bool cutsMultiplet)
    {
        // Ties between sectors go to the smaller charge, so that the choice is the same on every run.
        (double Value, Charge Charge)[] all = [.. sectors
            .SelectMany(static pair => pair.Value.Select(v => (Value: v, Charge: pair.Key)))
            .OrderByDescending(static x => x.Value).ThenBy(static x => x.Charge)];
        int kept = rule.Count(Array.ConvertAll(all, static x => x.Value), out cutsMultiplet);
        var counts = sectors.Keys.ToDictionary(static q => q, static _ => 0);
        for (int i = 0; i < kept; i++)
            counts[all[i].Charge]++;
        return counts;
    }

    public static double SquaredSum(ReadOnlySpan<double> values)
    {
        double sum = 0;
        for (int i = values.Length - 1; i >= 0; i--)
            sum += values[i] * values[i];
        return sum;
    }
}
