using System.Numerics;

namespace TensorRG.Models.Tests.Literature;

/// <summary>Models with variables on the bonds. Square: bond 2 i runs right of site i, bond 2 i + 1 below it.</summary>
internal static class EdgeModels
{
    public static LiteratureModel? Find(ParameterSet p, Torus t) => p.Model.Name switch
    {
        "six-vertex" => Arrows(t, p["a"], p["b"], p["c"]),
        "eight-vertex" => Lines(t, p["a"], p["b"], p["c"], p["d"]),
        "dimers" => Dimers(t, p["x"], p["y"]),
        "dimers-honeycomb" => HoneycombDimers(t, [p["x1"], p["x2"], p["x3"]]),
        _ => null,
    };

    private static (int North, int West, int South, int East)[] Legs(Torus t)
        => [.. t.Pairs(-1, 0).Zip(t.Pairs(0, -1), static (left, upper) => ((2 * upper.J) + 1, 2 * left.J, (2 * left.I) + 1, 2 * left.I))];

    private static Complex Log(IEnumerable<double> weights) => weights.Aggregate(0.0, static (sum, w) => sum + Math.Log(w));

    // E. H. Lieb, Phys. Rev. 162, 162 (1967). Arrow on each bond: 0 is right or down, 1 left or up.
    private static LiteratureModel Arrows(Torus t, double a, double b, double c)
    {
        (int North, int West, int South, int East)[] legs = Legs(t);
        return LiteratureModel.Weighted(2, 2 * t.Cells, s => Log(legs.Select(v => Weight(1 - s[v.West], 1 - s[v.East], 1 - s[v.North], 1 - s[v.South]))),
            ("polarisation", s => legs.Sum(v => s[v.North] == 0 ? 1 : -1)),
            ("stagger", s => legs.Select((v, i) => t.Sign(i) * (s[v.North] == 0 ? 1 : -1)).Sum()),
            ("turns", s => legs.Count(v => s[v.North] != s[v.South])));

        double Weight(int west, int east, int north, int south)
        {
            // A right or down arrow enters from the west or north and leaves to the east or south.
            int entering = west + north + (1 - east) + (1 - south);
            if (entering != 2)
                return 0;
            return west != east ? c : west == north ? a : b;
        }
    }

    // R. J. Baxter, Ann. Phys. 70, 193 (1972): an even number of lines at every vertex.
    private static LiteratureModel Lines(Torus t, double a, double b, double c, double d)
    {
        (int North, int West, int South, int East)[] legs = Legs(t);
        return LiteratureModel.Weighted(2, 2 * t.Cells, s => Log(legs.Select(v => Weight($"{s[v.North]}{s[v.East]}{s[v.South]}{s[v.West]}"))),
            ("polarisation", s => legs.Sum(v => 1 - (2 * s[v.North]))),
            ("stagger", s => legs.Select((v, i) => t.Sign(i) * (1 - (2 * s[v.North]))).Sum()),
            ("turns", s => legs.Count(v => s[v.North] != s[v.South])));

        // North, east, south, west, clockwise.
        double Weight(string lines) => lines switch
        {
            "0000" or "1111" => a,
            "1010" or "0101" => b,
            "1100" or "0011" => c,
            "1001" or "0110" => d,
            _ => 0,
        };
    }

    // P. W. Kasteleyn, Physica 27, 1209 (1961): one dimer at every site, activities x and y.
    private static LiteratureModel Dimers(Torus t, double x, double y)
    {
        (int North, int West, int South, int East)[] legs = Legs(t);
        return LiteratureModel.Weighted(2, 2 * t.Cells,
            s => legs.Any(v => s[v.North] + s[v.West] + s[v.South] + s[v.East] != 1) ? double.NegativeInfinity : (Along(s, 0) * Math.Log(x)) + (Along(s, 1) * Math.Log(y)),
            ("horizontal", s => Along(s, 0)), ("vertical", s => Along(s, 1)),
            ("stagger", s => Enumerable.Range(0, t.Cells).Sum(i => t.Sign(i) * s[2 * i])));

        int Along(int[] s, int direction) => Enumerable.Range(0, t.Cells).Sum(i => s[(2 * i) + direction]);
    }

    // P. W. Kasteleyn, J. Math. Phys. 4, 287 (1963): bond 3 c + k of site a of cell c leads to b of its own, of the left and of the upper cell.
    private static LiteratureModel HoneycombDimers(Torus t, double[] activities)
    {
        int[][] sites = [.. Enumerable.Range(0, t.Cells).Select(static c => (int[])[3 * c, (3 * c) + 1, (3 * c) + 2]),
            .. t.Pairs(1, 0).Zip(t.Pairs(0, 1), static (right, lower) => (int[])[3 * right.I, (3 * right.J) + 1, (3 * lower.J) + 2])];
        return LiteratureModel.Weighted(2, 3 * t.Cells,
            s => sites.Any(v => v.Sum(e => s[e]) != 1) ? double.NegativeInfinity : activities.Select((x, k) => Along(s, k) * Math.Log(x)).Sum(),
            ("direction-1", s => Along(s, 0)), ("direction-2", s => Along(s, 1)), ("direction-3", s => Along(s, 2)));

        int Along(int[] s, int direction) => Enumerable.Range(0, t.Cells).Sum(c => s[(3 * c) + direction]);
    }
}
