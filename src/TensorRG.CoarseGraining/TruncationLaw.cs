namespace TensorRG.CoarseGraining;

/// <summary>
/// A scheme's law for the error that its truncations leave in ln Z per network vertex: near Factor * D, where
/// D = sum over steps of w_n^Power / N_n, with w_n the discarded weight of step n and N_n the vertices in each tensor that it cut. The power is
/// that of the leading term; the factor is an upper estimate measured on exactly solved models (results/ has the data).
/// </summary>
/// <param name="Power">1 where a cut acts on the tensor itself, 2 where it acts through a projector on the bonds.</param>
/// <param name="Factor">Multiplies D to give the error bar.</param>
public readonly record struct TruncationLaw(double Power, double Factor)
{
    /// <summary>D of a flow: zero if nothing was discarded.</summary>
    /// <param name="records">The records from step 0 on.</param>
    public double Measure(IReadOnlyList<StepRecord> records)
    {
        ArgumentNullException.ThrowIfNull(records);
        double sum = 0;
        for (int n = records.Count - 1; n >= 1; n--)
            sum += Math.Pow(records[n].DiscardedWeight, Power) / Math.Pow(2, n - 1);
        return sum;
    }
}
