namespace TensorRG.CoarseGraining;

/// <summary>
/// Everything a computation needs to go on from a step as if it had never stopped: named arrays and texts. Names are
/// paths with '/' between parts (<c>tensors/site/elements</c>), so that a store may keep them as nested groups.
/// </summary>
/// <remarks>
/// A snapshot says nothing about how it is stored. Numbers must come back bit by bit, NaN payloads included.
/// </remarks>
public sealed class Snapshot
{
    /// <summary>A snapshot taken after a number of completed steps.</summary>
    /// <param name="step">Completed steps, at least 0.</param>
    /// <param name="numbers">Arrays of reals by name.</param>
    /// <param name="integers">Arrays of integers by name.</param>
    /// <param name="texts">Texts by name.</param>
    public Snapshot(
        int step,
        IReadOnlyDictionary<string, double[]> numbers,
        IReadOnlyDictionary<string, long[]> integers,
        IReadOnlyDictionary<string, string> texts)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(step);
        Step = step;
        Numbers = numbers;
        Integers = integers;
        Texts = texts;
    }

    /// <summary>Completed steps.</summary>
    public int Step { get; }

    /// <summary>Arrays of reals by name.</summary>
    public IReadOnlyDictionary<string, double[]> Numbers { get; }

    /// <summary>Arrays of integers by name.</summary>
    public IReadOnlyDictionary<string, long[]> Integers { get; }

    /// <summary>Texts by name.</summary>
    public IReadOnlyDictionary<string, string> Texts { get; }
}
