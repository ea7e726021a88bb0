using System.Globalization;
using TensorRG.Models.Solutions;

namespace TensorRG.Models.Tests.Solutions;

/// <summary>The triangular, honeycomb and kagome Ising models.</summary>
public class IsingLatticeTests
{
    private const double Bound = 1e-14;

    // reference-values.json: G. H. Wannier, Phys. Rev. 79, 357 (1950), erratum Phys. Rev. B 7, 5017 (1973); R. M. F. Houtappel, Physica 16, 425 (1950).
    [Theory]
    [InlineData("ising-triangular")]
    [InlineData("ising-honeycomb")]
    public void Agrees_with_the_table_at_criticality(string name)
    {
        double t = Ask.Critical(name, Couplings(1, 1, 1, 1)).Temperature!.Value;
        Near.Check(ReferenceValues.Get(name + "-tc"), t, 4e-16, "Tc");
        Near.Check(ReferenceValues.Get(name + "-logz-tc"), Ask.Value(name, "ln-z", Couplings(t, 1, 1, 1)), Bound, "ln Z");
    }

    // The same row; and K. Kano, S. Naya, Prog. Theor. Phys. 10, 158 (1953), who give 0.50183 (from memory).
    [Fact]
    public void Antiferromagnets_keep_their_entropy()
    {
        Near.Check(ReferenceValues.Get("ising-triangular-af-entropy"), Ask.Value("ising-triangular", "entropy", Couplings(0.01, -1, -1, -1)), Bound, "triangular");
        Near.Check(0.50183, Ask.Value("ising-kagome", "entropy", ("T", 0.01), ("J", -1)), 5e-6, "kagome");
        Near.Check(0, Ask.Value("ising-honeycomb", "entropy", Couplings(0.01, -1, -1, -1)), Bound, "honeycomb");
        Near.Check(0, Ask.Value("ising-triangular", "entropy", Couplings(0.01, -1, -0.9, -0.8)), Bound, "unequal");
    }

    // data/ising-lattices-independent.csv, made by data/ising-lattices-independent.py in 50-digit arithmetic: frustrated and not, next to criticality too.
    [Fact]
    public void Agrees_with_an_independent_evaluation()
    {
        foreach (string line in File.ReadLines(ReferenceValues.PathOf("ising-lattices-independent.csv")).Skip(1))
        {
            string[] cells = line.Split(',');
            double[] v = [.. cells.Skip(1).Select(x => double.Parse(x, CultureInfo.InvariantCulture))];
            (string, double)[] set = cells[0] == "kagome" ? [("T", v[0]), ("J", v[1])] : Couplings(v[0], v[1], v[2], v[3]);
            Near.Check(v[4], Ask.Value("ising-" + cells[0], "ln-z", set), 4e-15, line + " ln Z");
            Near.Check(v[5], Ask.Value("ising-" + cells[0], "energy", set), Bound, line + " u");
            Near.Check(v[6], Ask.Value("ising-" + cells[0], "specific-heat", set), 1e-13, line + " c");
            Near.Check(v[4] + (v[5] / v[0]), Ask.Value("ising-" + cells[0], "entropy", set), Bound * Math.Max(1, Math.Abs(v[4])), line + " s");
        }
    }

    // One coupling zero leaves the square lattice.
    [Theory]
    [InlineData(0.5, 1, 0.6)]
    [InlineData(1.5, 1, -0.6)]
    [InlineData(2.2691853142130221, 1, 1)]
    [InlineData(2.2691853, 1, 1)]
    [InlineData(30, -1, -0.3)]
    public void A_triangular_lattice_without_one_direction_is_square(double t, double jx, double jy)
    {
        IsingSolution square = IsingSolution.At(t, jx, jy);
        foreach ((string, double)[] set in new[] { Couplings(t, jx, jy, 0), Couplings(t, 0, jx, jy), Couplings(t, jx, 0, jy) })
        {
            Near.Check(square.LogZPerSite, Ask.Value("ising-triangular", "ln-z", set), 4e-15, "ln Z");
            Near.Check(square.EnergyPerSite, Ask.Value("ising-triangular", "energy", set), 4e-15, "u");
            Near.Check(square.EntropyPerSite, Ask.Value("ising-triangular", "entropy", set), 4e-15, "s");
            Near.Check(square.SpecificHeatPerSite, Ask.Value("ising-triangular", "specific-heat", set), 1e-13, "c");
            Near.Check(jy > 0 && jx > 0 ? square.OrderParameter : 0, Ask.Value("ising-triangular", "magnetisation", set), Bound, "m");
        }
        Near.Check(IsingSolution.CriticalTemperature(jx, jy).Value, Ask.Critical("ising-triangular", Couplings(1, jx, 0, jy)).Temperature!.Value, 1e-15, "Tc");
    }

    // Transfer matrices of 10 columns (8 for the larger cells), off criticality where they have converged.
    [Theory]
    [InlineData(9, 1, 1, 1, 1e-7)]
    [InlineData(1.5, 1, 1, 1, 1e-7)]
    [InlineData(6, 1, 0.5, -0.8, 1e-7)]
    [InlineData(4, -1, -1, -1, 1e-7)]
    [InlineData(0.6, 1, -0.4, 1, 1e-6)]
    public void Triangular_agrees_with_strips(double t, double j1, double j2, double j3, double bound)
    {
        const int Width = 10;
        double strip = Strip.LogLargest(Strip.Rows(Width), (row, next) => Math.Exp(Enumerable.Range(0, Width).Sum(x =>
            (j1 * S(next, x) * S(next, x + 1)) + (j2 * S(row, x) * S(next, x)) + (j3 * S(row, x) * S(next, x + 1))) / t)) / Width;
        Near.Check(strip, Ask.Value("ising-triangular", "ln-z", Couplings(t, j1, j2, j3)), bound, "ln Z");

        static int S(int row, int x) => Strip.Spin(row, x, Width);
    }

    [Theory]
    [InlineData(3.5, 1, 1, 1)]
    [InlineData(0.7, 1, 1, 1)]
    [InlineData(2.5, 1, -0.5, 0.8)]
    public void Honeycomb_agrees_with_strips(double t, double j1, double j2, double j3)
    {
        const int Width = 8;
        double strip = Strip.LogLargest(Strip.Rows(Width), (row, next) => Enumerable.Range(0, Width).Aggregate(1.0, (product, x) =>
            product * 2 * Math.Cosh(((j1 * S(next, x)) + (j2 * S(next, x - 1)) + (j3 * S(row, x))) / t))) / (2 * Width);
        Near.Check(strip, Ask.Value("ising-honeycomb", "ln-z", Couplings(t, j1, j2, j3)), 1e-6, "ln Z");

        static int S(int row, int x) => Strip.Spin(row, x, Width);
    }

    [Theory]
    [InlineData(6, 1)]
    [InlineData(1, 1)]
    [InlineData(3, -1)]
    [InlineData(0.7, -1)]
    public void Kagome_agrees_with_strips(double t, double j)
    {
        const int Width = 8;
        double k = j / t;
        double strip = Strip.LogLargest(Strip.Rows(Width), (row, next) => Strip.Ring(Width, (x, left, right) =>
        {
            int c = Strip.Spin(next, x, Width), above = Strip.Spin(row, x, Width), b = 1 - (2 * right), before = 1 - (2 * left);
            return Math.Exp(k * ((b * c) + (before * above))) * 2 * Math.Cosh(k * (b + c + before + above));
        })) / (3 * Width);
        Near.Check(strip, Ask.Value("ising-kagome", "ln-z", ("T", t), ("J", j)), 1e-7, "ln Z");
    }

    // R. B. Potts, Phys. Rev. 88, 352 (1952), and S. Naya, Prog. Theor. Phys. 11, 53 (1954), in their own forms.
    [Fact]
    public void Magnetisations_are_the_published_formulas()
    {
        double x = Math.Exp(-2 / 3.0), triangular = Math.Pow(1 - (16 * Math.Pow(x, 6) / ((1 + (3 * x * x)) * Math.Pow(1 - (x * x), 3))), 0.125);
        Near.Check(triangular, Ask.Value("ising-triangular", "magnetisation", Couplings(3, 1, 1, 1)), Bound, "triangular");
        double z = Math.Exp(-2 / 1.3), honeycomb = Math.Pow(1 - (16 * Math.Pow(z, 3) * (1 + Math.Pow(z, 3)) / (Math.Pow(1 - z, 3) * Math.Pow(1 - (z * z), 3))), 0.125);
        Near.Check(honeycomb, Ask.Value("ising-honeycomb", "magnetisation", Couplings(1.3, 1, 1, 1)), Bound, "honeycomb");
        // Low temperature on the kagome lattice: a reversed spin breaks 4 bonds, two neighbours (2 pairs a site) or a triangle (2/3 a site) 6.
        double w = Math.Exp(-2 / 0.5);
        Near.Scaled(1 - (2 * Math.Pow(w, 4)) - (12 * Math.Pow(w, 6)), Ask.Value("ising-kagome", "magnetisation", ("T", 0.5), ("J", 1)), Math.Pow(w, 6), 0.05, "kagome");
    }

    [Theory]
    [InlineData("ising-triangular", 1, 0.7, 0.4)]
    [InlineData("ising-triangular", -1, 0.7, 0.4)]
    [InlineData("ising-triangular", 1, 1e-3, 1e-3)]
    [InlineData("ising-honeycomb", 1, 0.7, 0.4)]
    [InlineData("ising-honeycomb", -1, 1e-3, 1)]
    public void Order_begins_at_the_critical_temperature(string name, double j1, double j2, double j3)
    {
        double t = Ask.Critical(name, Couplings(1, j1, j2, j3)).Temperature!.Value;
        double sign = j1 > 0 ? 1 : 0;
        Assert.Equal(sign > 0, Ask.Value(name, "magnetisation", Couplings(t * (1 - 2e-15), j1, j2, j3)) > 0);
        Assert.Equal(0, Ask.Value(name, "magnetisation", Couplings(t * (1 + 2e-15), j1, j2, j3)));
        double below = Ask.Value(name, "specific-heat", Couplings(t * (1 - 1e-9), j1, j2, j3)), above = Ask.Value(name, "specific-heat", Couplings(t * (1 + 1e-9), j1, j2, j3));
        double farther = Ask.Value(name, "specific-heat", Couplings(t * (1 + 1e-6), j1, j2, j3));
        Near.Check(below, above, 1e-4, "the logarithm has equal amplitudes on both sides");
        Assert.True(above > farther, "the specific heat grows towards Tc");
    }

    [Fact]
    public void Frustration_and_fields_leave_no_critical_temperature()
    {
        Assert.Null(Ask.Critical("ising-triangular", Couplings(1, -1, -1, -1)).Temperature);
        Assert.Null(Ask.Critical("ising-triangular", Couplings(1, 1, 0, 0)).Temperature);
        Assert.Null(Ask.Critical("ising-honeycomb", Couplings(1, 1, 1, 0)).Temperature);
        Assert.Null(Ask.Critical("ising-kagome", ("T", 1), ("J", -1)).Temperature);
        Near.Check(2.143319440105504, Ask.Critical("ising-kagome", ("T", 1), ("J", 1)).Temperature!.Value, 1e-15, "4 / ln(3 + 2 sqrt 3)");
        Assert.Null(Ask.Exact("ising-triangular", "ln-z", [.. Couplings(1, 1, 1, 1), ("h", 0.1)]));
        Assert.NotNull(Ask.Exact("ising-triangular", "ln-z", [.. Couplings(1, 1, 1, 1), ("h", 0)]));
    }

    private static (string, double)[] Couplings(double t, double j1, double j2, double j3) => [("T", t), ("J1", j1), ("J2", j2), ("J3", j3)];
}
