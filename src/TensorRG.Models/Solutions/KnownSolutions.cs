namespace TensorRG.Models.Solutions;

/// <summary>The exact solutions that a model file can name. One line each.</summary>
public static class KnownSolutions
{
    /// <summary>All of them, in the order in which they are listed.</summary>
    public static IReadOnlyList<IKnownSolution> All { get; } =
    [
        new KnownIsingSquare(),
        new KnownIsingTriangular(),
        new KnownIsingHoneycomb(),
        new KnownIsingKagome(),
        new KnownPottsSquare(),
        new KnownClockSquare(),
        new KnownAshkinTeller(),
        new KnownSixVertex(),
        new KnownEightVertex(),
        new KnownDimersSquare(),
        new KnownDimersHoneycomb(),
        new KnownHardHexagons(),
    ];

    /// <summary>Their names.</summary>
    public static IReadOnlyList<string> Names { get; } = [.. All.Select(s => s.Name)];

    /// <summary>The solution of that name, or null.</summary>
    /// <param name="name">Name in model files, in any case.</param>
    public static IKnownSolution? Find(string name)
        => All.FirstOrDefault(s => string.Equals(s.Name, name, StringComparison.OrdinalIgnoreCase));
}
