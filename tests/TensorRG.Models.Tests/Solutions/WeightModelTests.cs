namespace TensorRG.Models.Tests.Solutions;

/// <summary>Solutions of models that are given by weights: eight-vertex, dimers, hard hexagons; and the Ashkin-Teller model.</summary>
public class WeightModelTests
{
    // Transfer matrices of 12 columns. All regions: each of the weights largest, none, and disordered ones that the symmetries bring to c > a + b + d.
    [Theory]
    [InlineData(1, 1.3, 6, 0.7)]
    [InlineData(6, 1, 0.8, 0.6)]
    [InlineData(0.5, 7, 1, 0.9)]
    [InlineData(1, 1, 0.6, 6)]
    [InlineData(1, 1.1, 0.9, 1.2)]
    [InlineData(2, 1.8, 2.5, 1.5)]
    [InlineData(0.01, 1, 5, 0.8)]
    [InlineData(1, 1.3, 6, 1e-5)]
    public void Eight_vertex_agrees_with_strips(double a, double b, double c, double d)
    {
        const int Width = 12;
        double strip = Strip.Vertex(Width, (u, l, dn, r) => Weight(a, b, c, d, u, l, dn, r)) / Width;
        Near.Check(strip, EightVertex(a, b, c, d), 2e-6, $"{a}, {b}, {c}, {d}");
    }

    [Fact]
    public void Eight_vertex_keeps_its_symmetries()
    {
        double value = EightVertex(1, 1.3, 5, 0.7);
        Near.Check(value, EightVertex(1.3, 1, 5, 0.7), 1e-14, "a and b");
        Near.Check(value, EightVertex(0.7, 5, 1.3, 1), 1e-14, "pairs");
        // (a +- b)/2 and (c +- d)/2 in another order.
        double[] w = [1.15, 0.15, 2.85, 2.15];
        Near.Check(value, EightVertex(w[2] + w[1], w[2] - w[1], w[3] + w[0], w[3] - w[0]), 1e-14, "duality");
    }

    // Without d it is the six-vertex model; at a = b = c = d every one of 2^(N+1) configurations counts 1, and Z = 2^(N+1).
    [Fact]
    public void Eight_vertex_has_its_limits()
    {
        foreach ((double a, double b, double c) in new[] { (1.0, 0.7, 5.0), (1.0, 0.7, 1.2), (3.0, 1.0, 1.5) })
        {
            double six = Ask.Value("six-vertex", "ln-z", ("a", a), ("b", b), ("c", c));
            Near.Check(six, EightVertex(a, b, c, 0), 1e-14, "d = 0");
            Near.Check(six, EightVertex(a, b, c, 1e-12), 1e-11, "d = 1e-12");
        }
        Near.Check(Math.Log(2), EightVertex(1, 1, 1, 1), 1e-14, "all equal");
        foreach (double e in new[] { 1e-3, 1e-6, 1e-9, 1e-12 })
        {
            // Across the critical surface c = a + b + d, where ln Z has slopes below 1 in c.
            double at = EightVertex(1, 0.8, 2.5, 0.7);
            Near.Scaled(at, EightVertex(1, 0.8, 2.5 + e, 0.7), e, 1, "above");
            Near.Scaled(at, EightVertex(1, 0.8, 2.5 - e, 0.7), e, 1, "below");
        }
    }

    // reference-values.json: P. W. Kasteleyn, Physica 27, 1209 (1961) and J. Math. Phys. 4, 287 (1963).
    [Fact]
    public void Dimers_agree_with_the_table()
    {
        Near.Check(ReferenceValues.Get("dimers-square"), Ask.Value("dimers-square", "entropy", ("x", 1), ("y", 1)), 1e-15, "square");
        Near.Check(ReferenceValues.Get("dimers-honeycomb"), Ask.Value("dimers-honeycomb", "entropy", ("x1", 1), ("x2", 1), ("x3", 1)), 1e-15, "honeycomb");
        Near.Check(0.25, Ask.Value("dimers-square", "horizontal", ("x", 3), ("y", 3)), 1e-15, "half of the dimers are horizontal");
        Near.Check(Math.Log(5) / 2, Ask.Value("dimers-honeycomb", "ln-z", ("x1", 5), ("x2", 1), ("x3", 2)), 1e-15, "one direction alone");
    }

    [Theory]
    [InlineData(1, 1, 2e-4)]
    [InlineData(1, 2.5, 1e-3)]
    [InlineData(1.3, 1, 5e-4)]
    public void Square_dimers_agree_with_strips(double x, double y, double bound)
    {
        double strip = Strip.Extrapolate([6, 8, 10], width => Strip.Vertex(width, (u, l, d, r) =>
            u + l + d + r == 1 ? Math.Sqrt(l + r == 1 ? x : y) : 0) / width);
        Near.Check(strip, Ask.Value("dimers-square", "ln-z", ("x", x), ("y", y)), bound, "ln Z");
    }

    // The number of dimers of direction 3 between two rows never changes: one block of the matrix for each. The largest eigenvalue is in the block of the mean
    // density t_3/pi, which the widths must fit: equal activities 1/3, a right-angled triangle 1/2.
    [Theory]
    [InlineData(1, 1, 1, new[] { 6, 9, 12 }, 3, 1e-4)]
    [InlineData(1, 1.7320508075688772, 2, new[] { 6, 8, 10 }, 2, 1e-3)]
    public void Honeycomb_dimers_agree_with_strips(double x1, double x2, double x3, int[] widths, int share, double bound)
    {
        double strip = Strip.Extrapolate(widths, width => Block(width, width / share, x1, x2, x3) / (2 * width));
        Near.Check(strip, Ask.Value("dimers-honeycomb", "ln-z", ("x1", x1), ("x2", x2), ("x3", x3)), bound, "ln Z");
    }

    private static double Block(int width, int count, double x1, double x2, double x3)
    {
        int[] rows = [.. Strip.Rows(width).Where(r => int.PopCount(r) == count)];
        return Strip.LogLargest(rows, (row, next) => Strip.Ring(width, (x, left, right) =>
        {
            // Site a: e1 + e2(left) + e3(row) = 1; site b: e1 + e2(right) + e3(next) = 1.
            int up = Strip.Bit(row, x, width), down = Strip.Bit(next, x, width), one = 1 - left - up;
            bool fits = one >= 0 && one + right + down == 1;
            return fits ? Math.Pow(x1, one) * Math.Pow(x2, right) * Math.Pow(x3, down) : 0;
        }));
    }

    [Fact]
    public void Dimer_numbers_are_derivatives()
    {
        const double H = 1e-4;
        double horizontal = (Ask.Value("dimers-square", "ln-z", ("x", 1.7 * Math.Exp(H)), ("y", 0.9)) - Ask.Value("dimers-square", "ln-z", ("x", 1.7 * Math.Exp(-H)), ("y", 0.9))) / (2 * H);
        Near.Check(horizontal, Ask.Value("dimers-square", "horizontal", ("x", 1.7), ("y", 0.9)), 1e-8, "horizontal");
        double first = (Ask.Value("dimers-honeycomb", "ln-z", ("x1", 1.2 * Math.Exp(H)), ("x2", 0.9), ("x3", 1)) - Ask.Value("dimers-honeycomb", "ln-z", ("x1", 1.2 * Math.Exp(-H)), ("x2", 0.9), ("x3", 1))) / (2 * H);
        Near.Check(first, Ask.Value("dimers-honeycomb", "direction-1", ("x1", 1.2), ("x2", 0.9), ("x3", 1)), 1e-8, "direction 1");
    }

    // reference-values.json: R. J. Baxter, J. Phys. A 13, L61 (1980). Next to z_c, where the density has the slope |z - z_c|^(-1/3).
    [Fact]
    public void Hard_hexagons_agree_with_the_table()
    {
        double critical = ReferenceValues.Get("hard-hexagons-zc");
        foreach (double e in new[] { 0, 1e-14, -1e-14, 1e-12, -1e-12, 1e-9, -1e-9 })
        {
            double z = critical * (1 + e), scale = Math.Max(1e-14, Math.Abs(e));
            Near.Check(Math.Log(ReferenceValues.Get("hard-hexagons-kappac")), Ask.Value("hard-hexagons", "ln-z", ("z", z)), Math.Max(1e-14, scale), $"kappa, {e}");
            Near.Check(ReferenceValues.Get("hard-hexagons-rhoc"), Ask.Value("hard-hexagons", "density", ("z", z)), Math.Pow(scale, 2 / 3.0), $"density, {e}");
        }
    }

    // Strips of rows without neighbours; 12 and 15 columns fit the ordered phase.
    [Theory]
    [InlineData(0.1, 12, 1e-9)]
    [InlineData(1, 12, 1e-7)]
    [InlineData(200, 15, 1e-6)]
    public void Hard_hexagons_agree_with_strips(double z, int width, double bound)
    {
        int[] rows = [.. Strip.Rows(width).Where(r => (r & Turn(r, width)) == 0)];
        double strip = Strip.LogLargest(rows, (row, next) => (row & next) == 0 && (row & Turn(next, width)) == 0 ? Math.Pow(z, (int.PopCount(row) + int.PopCount(next)) / 2.0) : 0) / width;
        Near.Check(strip, Ask.Value("hard-hexagons", "ln-z", ("z", z)), bound, $"z = {z}");

        static int Turn(int row, int width) => (row >> 1) | ((row & 1) << (width - 1));
    }

    [Theory]
    [InlineData(1e-6)]
    [InlineData(0.5)]
    [InlineData(8)]
    [InlineData(10.9)]
    [InlineData(11.3)]
    [InlineData(30)]
    [InlineData(1e5)]
    public void The_density_of_hard_hexagons_is_a_derivative(double z)
    {
        const double H = 1e-4;
        double[] f = [.. new[] { -2, -1, 1, 2 }.Select(i => Ask.Value("hard-hexagons", "ln-z", ("z", z * Math.Exp(i * H))))];
        Near.Check(((8 * (f[2] - f[1])) - (f[3] - f[0])) / (12 * H), Ask.Value("hard-hexagons", "density", ("z", z)), 1e-9, "density");
        Near.Check(Ask.Value("hard-hexagons", "ln-z", ("z", z)) - (Ask.Value("hard-hexagons", "density", ("z", z)) * Math.Log(z)), Ask.Value("hard-hexagons", "entropy", ("z", z)), 1e-14, "entropy");
    }

    // Mayer's series of the lattice gas: pairs exclude 7 sites, hence -7/2; the third term from memory, and by strips above.
    [Fact]
    public void Hard_hexagons_begin_with_their_cluster_series()
    {
        const double Z = 1e-4;
        Near.Scaled(Z - (3.5 * Z * Z) + (58 / 3.0 * Z * Z * Z), Ask.Value("hard-hexagons", "ln-z", ("z", Z)), Z * Z * Z, 0.02, "ln kappa");
    }

    // Strips of 3, 4, 5 columns with the two leading corrections removed; the Potts point and two Ising models are exact.
    [Theory]
    [InlineData(1, 0.5, 1e-3)]
    [InlineData(1, -0.5, 1e-3)]
    [InlineData(1, -0.9, 1e-3)]
    public void Ashkin_Teller_agrees_with_strips_on_its_critical_line(double j, double k, double bound)
    {
        double t = Ask.Critical("ashkin-teller", ("T", 1), ("J", j), ("K", k)).Temperature!.Value;
        double strip = Strip.Extrapolate([3, 4, 5], width => AshkinTeller(width, j / t, k / t) / width);
        Near.Check(Math.Exp(-2 * k / t), Math.Sinh(2 * j / t), 1e-14, "self-dual");
        Near.Check(strip, Ask.Value("ashkin-teller", "ln-z", ("T", t), ("J", j), ("K", k)), bound, "ln Z");
    }

    [Fact]
    public void Ashkin_Teller_has_its_known_points()
    {
        double t = Ask.Critical("ashkin-teller", ("T", 1), ("J", 1), ("K", 1)).Temperature!.Value;
        Near.Check(4 * ReferenceValues.Get("potts4-tc"), t, 1e-15, "Tc of the Potts point");
        Near.Check(ReferenceValues.Get("potts4-logz-tc") - (2 / t), Ask.Value("ashkin-teller", "ln-z", ("T", t), ("J", 1), ("K", 1)), 1e-14, "Potts");
        double c = Ask.Critical("ashkin-teller", ("T", 1), ("J", 1), ("K", 0)).Temperature!.Value, near = Ask.Critical("ashkin-teller", ("T", 1), ("J", 1), ("K", 1e-9)).Temperature!.Value;
        Near.Check(2 * ReferenceValues.Get("ising-square-logz-tc"), Ask.Value("ashkin-teller", "ln-z", ("T", c), ("J", 1), ("K", 0)), 1e-14, "two Ising models");
        Near.Check(2 * ReferenceValues.Get("ising-square-logz-tc"), Ask.Value("ashkin-teller", "ln-z", ("T", near), ("J", 1), ("K", 1e-9)), 1e-8, "next to them, by the other formula");
        Near.Check(ReferenceValues.Get("ising-square-logz-T2.0") + Math.Log(2), Ask.Value("ashkin-teller", "ln-z", ("T", 2), ("J", 0), ("K", 1)), 1e-14, "J = 0");
        Assert.Null(Ask.Exact("ashkin-teller", "ln-z", ("T", 2), ("J", 1), ("K", 0.5)));
        Assert.Null(Ask.Critical("ashkin-teller", ("T", 1), ("J", 1), ("K", 1.5)).Temperature);
    }

    private static double AshkinTeller(int width, double j, double k)
    {
        int[] rows = [.. Enumerable.Range(0, 1 << (2 * width))];
        return Strip.LogLargest(rows, (row, next) => Math.Exp(Enumerable.Range(0, width).Sum(x =>
            Bond(row, x, next, x) + ((Bond(row, x, row, (x + 1) % width) + Bond(next, x, next, (x + 1) % width)) / 2))));

        double Bond(int left, int x, int right, int y)
        {
            int differ = (left >> (2 * x)) ^ (right >> (2 * y)), s = 1 - (2 * (differ & 1)), tau = 1 - (differ & 2);
            return (j * (s + tau)) + (k * s * tau);
        }
    }

    private static double EightVertex(double a, double b, double c, double d) => Ask.Value("eight-vertex", "ln-z", ("a", a), ("b", b), ("c", c), ("d", d));

    private static double Weight(double a, double b, double c, double d, int up, int left, int down, int right) => (up, left, down, right) switch
    {
        _ when ((up + left + down + right) & 1) == 1 => 0,
        _ when up == down && up == left => a,
        _ when up == down => b,
        _ when up == right => c,
        _ => d,
    };
}
