namespace TensorRG.CoarseGraining;

/// <summary>
/// A scheme's law for the error that its truncations leave in ln Z per network vertex. With w_n the discarded weight of step n and N_n the
/// vertices in each tensor that it cut, the bar is Factor * D + AmplitudeFactor * S, where D = sum w_n^Power / N_n and
/// S = sum sqrt(w_n) / N_n. D is the leading term, in which what was cut meets itself; S is what an environment that
/// leans towards the discarded states can add, and matters far from criticality. The numbers are upper estimates measured on
/// exactly solved models (results/error-bars.csv).
/// </summary>
/// <param name="Power">1 where a cut acts on the tensor itself, 2 where it acts through a projector on the bonds.</param>
/// <param name="Factor">Multiplies D.</param>
/// <param name="AmplitudeFactor">Multiplies S.</param>
public readonly record struct TruncationLaw(double Power, double Factor, double AmplitudeFactor)
{
    /// <summary>D of a flow: zero if nothing was discarded.</summary>
    /// <param name="records">The records from step 0 on.</param>
    public double Measure(IReadOnlyList<StepRecord> records) => Sum(records, Power);

    /// <summary>The error bar of ln Z per network vertex.</summary>
    /// <param name="records">The records from step 0 on.</param>
    public double Bar(IReadOnlyList<StepRecord> records) => (Factor * Measure(records)) + (AmplitudeFactor * Sum(records, 0.5));

    private static double Sum(IReadOnlyList<StepRecord> records, double power)
    {
        ArgumentNullException.ThrowIfNull(records);
        double sum = 0;
        for (int n = records.Count - 1; n >= 1; n--)
            sum += Math.Pow(records[n].DiscardedWeight, power) / Math.Pow(2, n - 1);
        return sum;
    }
}
