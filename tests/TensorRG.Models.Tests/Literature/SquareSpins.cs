using System.Numerics;

namespace TensorRG.Models.Tests.Literature;

/// <summary>Models with a few states on the sites of the square lattice.</summary>
internal static class SquareSpins
{
    public static LiteratureModel? Find(ParameterSet p, Torus t) => p.Model.Name switch
    {
        "ising" => Ising(p, t, p["Jx"], p["Jy"], 0, p["h"]),
        "ising-imaginary-field" => Ising(p, t, p["J"], p["J"], 0, new Complex(p["h.re"], p["h.im"])),
        "ising-next-nearest" => Ising(p, t, p["J1"], p["J1"], p["J2"], p["h"]),
        "spin-1" => SpinOne(p, t),
        "potts" => Potts(p, t),
        "clock" => Clock(p, t),
        "ashkin-teller" => AshkinTeller(p, t),
        "hard-squares" => HardSquares(p["z"], t),
        _ => null,
    };

    /// <summary>Sum over the pairs of sites at this distance.</summary>
    public static double Over(Torus t, int dx, int dy, Func<int, int, double> pair) => t.Pairs(dx, dy).Sum(b => pair(b.I, b.J));

    /// <summary>ln z for each particle, and minus infinity with two on a bond.</summary>
    public static Func<int[], Complex> Exclusion(double z, (int I, int J)[] bonds)
        => s => bonds.Any(b => s[b.I] + s[b.J] == 2) ? double.NegativeInfinity : s.Sum() * Math.Log(z);

    // E. Ising (1925), L. Onsager (1944): E = -Jx sum s s' - Jy sum s s' - J2 sum over both diagonals - h sum s.
    private static LiteratureModel Ising(ParameterSet p, Torus t, double jx, double jy, double diagonal, Complex h)
    {
        return LiteratureModel.Thermal(2, t.Cells, p.Temperature, Energy,
            ("magnetisation", s => s.Sum(Spin)),
            ("staggered", s => s.Select((x, i) => t.Sign(i) * Spin(x)).Sum()),
            ("stripes", s => Over(t, 1, 0, Pair(s)) - Over(t, 0, 1, Pair(s))));

        static int Spin(int s) => s == 0 ? 1 : -1;

        static Func<int, int, double> Pair(int[] s) => (i, j) => Spin(s[i]) * Spin(s[j]);

        Complex Energy(int[] s) => -(jx * Over(t, 1, 0, Pair(s))) - (jy * Over(t, 0, 1, Pair(s)))
            - (diagonal * (Over(t, 1, 1, Pair(s)) + Over(t, 1, -1, Pair(s)))) - (h * s.Sum(Spin));
    }

    // M. Blume, V. J. Emery, R. B. Griffiths, Phys. Rev. A 4, 1071 (1971): E = -J sum S S' - K sum S^2 S'^2 + D sum S^2 - h sum S.
    private static LiteratureModel SpinOne(ParameterSet p, Torus t)
    {
        return LiteratureModel.Thermal(3, t.Cells, p.Temperature, Energy, ("magnetisation", s => s.Sum(Spin)), ("density", s => s.Sum(x => Spin(x) * Spin(x))));

        static int Spin(int s) => 1 - s;

        Complex Energy(int[] s) => Over(t, 1, 0, Bond(s)) + Over(t, 0, 1, Bond(s)) + s.Sum(x => (p["D"] * Spin(x) * Spin(x)) - (p["h"] * Spin(x)));

        Func<int, int, double> Bond(int[] s) => (i, j) =>
        {
            int product = Spin(s[i]) * Spin(s[j]);
            return (-p["J"] * product) - (p["K"] * product * product);
        };
    }

    // R. B. Potts, Proc. Camb. Phil. Soc. 48, 106 (1952): E = -J sum delta(s, s').
    private static LiteratureModel Potts(ParameterSet p, Torus t)
    {
        int q = p.WholeNumber("q");
        double j = p["J"];
        return LiteratureModel.Thermal(q, t.Cells, p.Temperature,
            s => -j * (Over(t, 1, 0, (a, b) => s[a] == s[b] ? 1 : 0) + Over(t, 0, 1, (a, b) => s[a] == s[b] ? 1 : 0)),
            ("magnetisation", s => ((q * s.Count(static x => x == 0)) - t.Cells) / (q - 1.0)));
    }

    // The same: E = -J sum cos(2 pi (k - k')/q).
    private static LiteratureModel Clock(ParameterSet p, Torus t)
    {
        double q = p["q"], j = p["J"];
        return LiteratureModel.Thermal(p.WholeNumber("q"), t.Cells, p.Temperature,
            s => Over(t, 1, 0, Bond(s)) + Over(t, 0, 1, Bond(s)),
            ("magnetisation", s => s.Sum(k => Math.Cos(2 * Math.PI * k / q))));

        Func<int, int, double> Bond(int[] s) => (a, b) => -j * Math.Cos(2 * Math.PI * (s[a] - s[b]) / q);
    }

    // J. Ashkin, E. Teller, Phys. Rev. 64, 178 (1943), in the spins of C. Fan, Phys. Lett. A 39, 136 (1972); state 2 a + b.
    private static LiteratureModel AshkinTeller(ParameterSet p, Torus t)
    {
        return LiteratureModel.Thermal(4, t.Cells, p.Temperature, s => Over(t, 1, 0, Bond(s)) + Over(t, 0, 1, Bond(s)),
            ("magnetisation", s => s.Sum(First)), ("polarisation", s => s.Sum(x => First(x) * Second(x))));

        static int First(int s) => s < 2 ? 1 : -1;

        static int Second(int s) => s % 2 == 0 ? 1 : -1;

        Func<int, int, double> Bond(int[] s) => (i, j) =>
        {
            int sigma = First(s[i]) * First(s[j]), tau = Second(s[i]) * Second(s[j]);
            return -(p["J"] * (sigma + tau)) - (p["K"] * sigma * tau);
        };
    }

    // D. S. Gaunt, M. E. Fisher, J. Chem. Phys. 43, 2840 (1965): weight z for a particle, no two on neighbouring sites.
    private static LiteratureModel HardSquares(double z, Torus t) => LiteratureModel.Weighted(2, t.Cells, Exclusion(z, [.. t.Pairs(1, 0), .. t.Pairs(0, 1)]),
        ("density", s => s.Sum()), ("stagger", s => s.Select((n, i) => t.Sign(i) * n).Sum()));
}
