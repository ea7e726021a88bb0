namespace TensorRG.Benchmarks;

/// <summary>The measurement for every row of reference-values.json that is a number of a model at given parameters.</summary>
internal static class ReferenceCases
{
    private static readonly double IsingTc = 2 / Math.Log(1 + Math.Sqrt(2));

    /// <summary>All cases, in the order of the table.</summary>
    public static IEnumerable<ReferenceCase> All =>
    [
        .. SquareIsing(),
        .. Tori(),
        .. OtherIsing(),
        .. Potts(),
        .. Vertices(),
        .. Exclusion(),
    ];

    private static IEnumerable<ReferenceCase> SquareIsing()
    {
        foreach (double t in (double[])[1.5, 2.0, 2.2, 2.3, 2.5, 3.0])
        {
            string suffix = FormattableString.Invariant($"T{t:0.0}");
            foreach ((string row, string quantity) in new[] { ("logz", "ln-z"), ("u", "energy"), ("c", "specific-heat"), ("m", "magnetisation") })
                yield return new ReferenceCase($"ising-square-{row}-{suffix}", "ising", [("T", t)], quantity, 32);
        }

        yield return new ReferenceCase("ising-square-logz-tc", "ising", [("T", IsingTc)], "ln-z", 64);
        yield return new ReferenceCase("ising-square-u-tc", "ising", [("T", IsingTc)], "energy", 64);
    }

    private static IEnumerable<ReferenceCase> Tori()
    {
        yield return new ReferenceCase("ising-torus-4x4", "ising", [("T", IsingTc)], "ln-z", 16) { Torus = 4, Exponential = 16 };
        foreach (int length in (int[])[8, 16, 32, 64, 256, 1024])
            yield return new ReferenceCase(FormattableString.Invariant($"ising-torus-{length}"), "ising", [("T", IsingTc)], "ln-z", 20) { Torus = length };
    }

    private static IEnumerable<ReferenceCase> OtherIsing() =>
    [
        new("ising-triangular-logz-tc", "ising-triangular", [("T", 4 / Math.Log(3)), ("J", 1)], "ln-z", 48),
        new("ising-triangular-af-entropy", "ising-triangular", [("T", 0.02), ("J", -1)], "entropy", 24),
        new("ising-honeycomb-logz-tc", "ising-honeycomb", [("T", 2 / Math.Log(2 + Math.Sqrt(3))), ("J", 1)], "ln-z", 48),
    ];

    private static IEnumerable<ReferenceCase> Potts()
    {
        foreach (int q in (int[])[2, 3, 4, 5, 7, 10])
        {
            (string, double)[] set = [("q", q), ("T", 1 / Math.Log(1 + Math.Sqrt(q)))];
            yield return new ReferenceCase(FormattableString.Invariant($"potts{q}-logz-tc"), "potts", set, "ln-z", 32);
            if (q <= 4)
                yield return new ReferenceCase(FormattableString.Invariant($"potts{q}-u-tc"), "potts", set, "energy", 32);
        }
    }

    private static IEnumerable<ReferenceCase> Vertices() =>
    [
        new("ice-square", "six-vertex", [], "entropy", 32),
        new("f-model-tc", "six-vertex", [("a", 0.5), ("b", 0.5), ("c", 1)], "ln-z", 48),
        new("dimers-square", "dimers", [], "entropy", 32),
        new("dimers-honeycomb", "dimers-honeycomb", [], "entropy", 32),
    ];

    private static IEnumerable<ReferenceCase> Exclusion()
    {
        double critical = Math.Pow((1 + Math.Sqrt(5)) / 2, 5);
        return
        [
            new("hard-squares-z1", "hard-squares", [("z", 1)], "ln-z", 32) { Exponential = 1 },
            new("hard-hexagons-kappac", "hard-hexagons", [("z", critical)], "ln-z", 48) { Exponential = 1 },
            new("hard-hexagons-rhoc", "hard-hexagons", [("z", critical)], "density", 48),
        ];
    }
}
