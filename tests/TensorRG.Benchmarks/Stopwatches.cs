using System.Diagnostics;

namespace TensorRG.Benchmarks;

/// <summary>Side-by-side timing: the candidates take turns, and each keeps its best round.</summary>
internal static class Stopwatches
{
    /// <summary>Seconds per call of each candidate.</summary>
    /// <param name="rounds">How often each candidate is timed.</param>
    /// <param name="secondsPerRound">Calls are repeated until a round lasts about this long.</param>
    /// <param name="candidates">What to time; null entries give NaN.</param>
    public static double[] Best(int rounds, double secondsPerRound, params Action?[] candidates)
    {
        var best = new double[candidates.Length];
        var repeats = new int[candidates.Length];
        for (int i = 0; i < candidates.Length; i++)
        {
            best[i] = candidates[i] is null ? double.NaN : double.PositiveInfinity;
            repeats[i] = candidates[i] is { } action ? Repeats(action, secondsPerRound) : 0;
        }

        for (int round = 0; round < rounds; round++)
        {
            for (int i = 0; i < candidates.Length; i++)
            {
                if (candidates[i] is { } action)
                    best[i] = Math.Min(best[i], Time(action, repeats[i]));
            }
        }

        return best;
    }

    private static int Repeats(Action action, double seconds)
    {
        action();
        int repeats = 1;
        while (true)
        {
            double each = Time(action, repeats);
            if (each * repeats >= seconds / 4)
                return Math.Max(1, (int)(seconds / each));
            repeats *= 4;
        }
    }

    private static double Time(Action action, int repeats)
    {
        long start = Stopwatch.GetTimestamp();
        for (int i = 0; i < repeats; i++)
            action();
        return Stopwatch.GetElapsedTime(start).TotalSeconds / repeats;
    }
}
