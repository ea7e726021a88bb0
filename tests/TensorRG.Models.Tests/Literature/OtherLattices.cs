namespace TensorRG.Models.Tests.Literature;

/// <summary>Models on the sites of the triangular, the honeycomb and the kagome lattice.</summary>
internal static class OtherLattices
{
    public static LiteratureModel? Find(ParameterSet p, Torus t) => p.Model.Name switch
    {
        "ising-triangular" => Triangular(p, t),
        "ising-honeycomb" => Honeycomb(p, t),
        "ising-kagome" => Kagome(p, t),
        "potts-triangular" => Potts(p, t),
        "hard-hexagons" => LiteratureModel.Weighted(2, t.Cells, SquareSpins.Exclusion(p["z"], [.. t.Pairs(1, 0), .. t.Pairs(0, 1), .. t.Pairs(1, 1)]), ("density", static s => s.Sum())),
        _ => null,
    };

    private static int Spin(int s) => s == 0 ? 1 : -1;

    private static double Over((int I, int J)[] bonds, int[] s) => bonds.Sum(b => Spin(s[b.I]) * Spin(s[b.J]));

    // A triangle is frustrated when its spins are not all equal.
    private static double Frustrated(IEnumerable<int[]> triangles, int[] s) => triangles.Count(t => Math.Abs(t.Sum(i => Spin(s[i]))) == 1);

    // G. H. Wannier, Phys. Rev. 79, 357 (1950); R. M. F. Houtappel, Physica 16, 425 (1950): the square lattice with one diagonal of each face.
    private static LiteratureModel Triangular(ParameterSet p, Torus t)
    {
        (int, int)[] first = t.Pairs(1, 0), second = t.Pairs(0, 1), third = t.Pairs(1, 1);
        int[][] triangles = [.. first.Zip(third, static (a, b) => (int[])[a.Item1, a.Item2, b.Item2]), .. second.Zip(third, static (a, b) => (int[])[a.Item1, a.Item2, b.Item2])];
        return LiteratureModel.Thermal(2, t.Cells, p.Temperature,
            s => -(p["J1"] * Over(first, s)) - (p["J2"] * Over(second, s)) - (p["J3"] * Over(third, s)) - (p["h"] * s.Sum(Spin)),
            ("magnetisation", s => s.Sum(Spin)), ("frustrated", s => Frustrated(triangles, s)));
    }

    // R. M. F. Houtappel, Physica 16, 425 (1950): sites a = 2 c and b = 2 c + 1 of cell c; a meets b of its own cell, of the left and of the upper one.
    private static LiteratureModel Honeycomb(ParameterSet p, Torus t)
    {
        (int, int)[] own = Bonds(0, 0), left = Bonds(-1, 0), upper = Bonds(0, -1);
        return LiteratureModel.Thermal(2, 2 * t.Cells, p.Temperature,
            s => -(p["J1"] * Over(own, s)) - (p["J2"] * Over(left, s)) - (p["J3"] * Over(upper, s)) - (p["h"] * s.Sum(Spin)),
            ("magnetisation", s => s.Sum(Spin)), ("staggered", s => s.Select(static (x, i) => i % 2 == 0 ? Spin(x) : -Spin(x)).Sum()));

        (int, int)[] Bonds(int dx, int dy) => [.. t.Pairs(dx, dy).Select(static b => (2 * b.I, (2 * b.J) + 1))];
    }

    // I. Syozi, Prog. Theor. Phys. 6, 306 (1951): every bond is a side of one triangle; sites 3 c, 3 c + 1, 3 c + 2 of cell c.
    private static LiteratureModel Kagome(ParameterSet p, Torus t)
    {
        int[][] up = [.. Enumerable.Range(0, t.Cells).Select(static c => (int[])[3 * c, (3 * c) + 1, (3 * c) + 2])];
        int[][] down = [.. t.Pairs(-1, 0).Zip(t.Pairs(0, -1), static (b, c) => (int[])[3 * b.I, (3 * b.J) + 1, (3 * c.J) + 2])];
        int[][] triangles = [.. up, .. down];
        (int, int)[] sides = [.. triangles.SelectMany(static x => ((int, int)[])[(x[0], x[1]), (x[1], x[2]), (x[2], x[0])])];
        return LiteratureModel.Thermal(2, 3 * t.Cells, p.Temperature,
            s => -(p["J"] * Over(sides, s)) - (p["h"] * s.Sum(Spin)),
            ("magnetisation", s => s.Sum(Spin)), ("frustrated", s => Frustrated(triangles, s)));
    }

    // R. J. Baxter, H. N. V. Temperley, S. E. Ashley, Proc. R. Soc. Lond. A 358, 535 (1978).
    private static LiteratureModel Potts(ParameterSet p, Torus t)
    {
        int q = p.WholeNumber("q");
        (int I, int J)[] bonds = [.. t.Pairs(1, 0), .. t.Pairs(0, 1), .. t.Pairs(1, 1)];
        return LiteratureModel.Thermal(q, t.Cells, p.Temperature, s => -p["J"] * bonds.Count(b => s[b.I] == s[b.J]),
            ("magnetisation", s => ((q * s.Count(static x => x == 0)) - t.Cells) / (q - 1.0)));
    }
}
