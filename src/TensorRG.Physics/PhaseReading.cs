using System.Globalization;
using TensorRG.CoarseGraining;

namespace TensorRG.Physics;

/// <summary>What the degeneracy ratio X says about the phase.</summary>
/// <param name="Phases">Number of coexisting phases that X settled at, or null if it did not settle at an integer.</param>
/// <param name="SettledAt">Linear size in lattice constants from which X stays there; NaN if it does not settle.</param>
/// <param name="Plateau">A value other than an integer where X rested before, NaN if none: the mark of a critical region.</param>
/// <param name="Summary">One sentence for people.</param>
public sealed record PhaseReading(int? Phases, double SettledAt, double Plateau, string Summary)
{
    private const double IntegerTolerance = 0.02;
    private const double PlateauTolerance = 0.004;
    private const int ShortestPlateau = 6;

    /// <summary>Reads the phase from a flow.</summary>
    /// <param name="records">The records from step 0 on, at least one.</param>
    public static PhaseReading Of(IReadOnlyList<StepRecord> records)
    {
        ArgumentNullException.ThrowIfNull(records);
        ArgumentOutOfRangeException.ThrowIfZero(records.Count);
        StepRecord[] squares = [.. records.Where(static r => r.AspectRatio == 1)];
        double final = Math.Round(squares[^1].DegeneracyRatio);
        int settled = squares.Length;
        while (settled > 0 && final >= 1 && Math.Abs(squares[settled - 1].DegeneracyRatio - final) < IntegerTolerance)
            settled--;
        (int start, int length) = LongestRest(squares, settled);
        double plateau = length >= ShortestPlateau ? squares[start + (length / 2)].DegeneracyRatio : double.NaN;
        if (squares.Length - settled < 2)
            return new PhaseReading(null, double.NaN, plateau, Unsettled(squares, plateau, start));
        double size = squares[settled].LengthScale;
        return new PhaseReading((int)final, size, plateau, Settled((int)final, size, plateau, squares, start, length));
    }

    private static (int Start, int Length) LongestRest(StepRecord[] squares, int end)
    {
        (int Start, int Length) best = (0, 0);
        for (int start = 0; start < end; start++)
        {
            int stop = start + 1;
            while (stop < end && Math.Abs(squares[stop].DegeneracyRatio - squares[stop - 1].DegeneracyRatio) < PlateauTolerance)
                stop++;
            double middle = squares[start + ((stop - start) / 2)].DegeneracyRatio;
            if (stop - start > best.Length && Math.Abs(middle - Math.Round(middle)) > 2 * IntegerTolerance)
                best = (start, stop - start);
        }

        return best;
    }

    private static string Settled(int phases, double size, double plateau, StepRecord[] squares, int start, int length)
    {
        string state = phases == 1 ? "one phase, disordered" : $"{phases} coexisting phases, ordered";
        if (double.IsNaN(plateau))
            return FormattableString.Invariant($"X = {phases} from length {Length(size)} on: {state}.");
        return FormattableString.Invariant(
            $"X rests at {plateau:0.000} from length {Length(squares[start].LengthScale)} to {Length(squares[start + length - 1].LengthScale)}, then goes to {phases} ({state}): critical, or a correlation length beyond that; the bond dimension decides the side.");
    }

    private static string Unsettled(StepRecord[] squares, double plateau, int start)
        => double.IsNaN(plateau)
            ? FormattableString.Invariant($"X = {squares[^1].DegeneracyRatio:0.000} at length {Length(squares[^1].LengthScale)} has not settled: more steps are needed.")
            : FormattableString.Invariant($"X rests at {plateau:0.000} from length {Length(squares[start].LengthScale)} on: critical, as far as these steps reach.");

    private static string Length(double size)
        => size < 10000 ? size.ToString("0", CultureInfo.InvariantCulture) : FormattableString.Invariant($"2^{Math.Log2(size):0.#}");
}
