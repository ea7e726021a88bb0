using System.Globalization;
using MathNet.Numerics.LinearAlgebra;
using TensorRG.Models.Tests.Literature;

namespace TensorRG.Models.Tests;

/// <summary>Exact references of the other models, and the list that each model declares.</summary>
public class ExactTests
{
    private const double Bound = 1e-14;

    // R. J. Baxter, J. Phys. C 6, L445 (1973); R. B. Potts, Proc. Camb. Phil. Soc. 48, 106 (1952): rows of
    // reference-values.json, the latent heats of which have twelve digits.
    [Theory]
    [InlineData(2)]
    [InlineData(3)]
    [InlineData(4)]
    [InlineData(5)]
    [InlineData(7)]
    [InlineData(10)]
    public void Potts_agrees_with_the_table(int q)
    {
        ParameterSet p = Set("potts", ("q", q));
        Near.Check(ReferenceValues.Get($"potts{q}-tc"), p.Temperature, Bound, "T");
        Near.Check(ReferenceValues.Get($"potts{q}-logz-tc"), Exact(Quantity.LogZPerSite, p), Bound, "ln Z");
        Near.Check(ReferenceValues.Get($"potts{q}-u-tc"), Exact(Quantity.EnergyPerSite, p), Bound, "u");
        Near.Check(ReferenceValues.Get($"potts{q}-latent"), Exact(Quantity.LatentHeat, p), 1e-12, "latent heat");
    }

    // Independent of the closed forms: to first order in 1/sqrt q the ordered phase is perfect (u = -2, ln Z = 2K) and in the
    // disordered one a bond is satisfied with probability exp(K)/q = 1/sqrt q, so the latent heat is 2 - 2/sqrt q.
    [Theory]
    [InlineData(25)]
    [InlineData(64)]
    public void Potts_with_many_states_approaches_two_ideal_phases(int q)
    {
        ParameterSet p = Set("potts", ("q", q));
        Near.Scaled(2 - (2 / Math.Sqrt(q)), Exact(Quantity.LatentHeat, p), 1, 10.0 / q, "latent heat");
        Near.Scaled(2 / p.Temperature, Exact(Quantity.LogZPerSite, p), 1, 2.0 / q, "ln Z");
    }

    [Fact]
    public void Off_the_transition_Potts_is_unknown_unless_it_is_Ising()
    {
        Model potts = ModelCatalogue.Find("potts");
        Assert.Null(potts.Exact(Quantity.LogZPerSite, Set("potts", ("q", 3), ("T", 0.995))));
        Assert.Null(potts.Exact(Quantity.LogZPerSite, Set("potts", ("q", 3), ("J", -1))));
        Assert.Null(potts.Exact(Quantity.SpecificHeatPerSite, Set("potts", ("q", 3))));
        Assert.NotNull(potts.Exact(Quantity.LogZPerSite, Set("potts", ("q", 2), ("T", 0.4))));
    }

    // The mappings are checked on finite tori, where both sides are sums over configurations.
    [Theory]
    [InlineData("potts", 2, 0.7, 0.5, 1, 1)]
    [InlineData("potts", 2, -0.7, 0.5, 1, 1)]
    [InlineData("clock", 2, 0.7, 1, 1, 0)]
    [InlineData("clock", 4, 0.7, 0.5, 2, 0)]
    [InlineData("clock", 4, -0.7, 0.5, 2, 0)]
    public void Mapped_models_follow_Ising_at_any_temperature(string name, int q, double j, double factor, int copies, double shift)
    {
        double t = 1.1;
        ParameterSet mapped = Set(name, ("q", q), ("J", j), ("T", t)), ising = Set("ising", ("J", factor * j), ("T", t));
        (double logZ, double u) = Configurations.Sum(mapped, 2, 3);
        (double isingLogZ, double isingU) = Configurations.Sum(ising, 2, 3);
        Near.Check(logZ, (copies * isingLogZ) + (6 * shift * j / t), Bound, "ln Z of the torus");
        Near.Check(u, (copies * isingU) - (6 * shift * j), Bound, "U of the torus");
        Near.Check((copies * Exact(Quantity.LogZPerSite, ising)) + (shift * j / t), Exact(Quantity.LogZPerSite, mapped), Bound, "ln Z");
        Near.Check((copies * Exact(Quantity.EnergyPerSite, ising)) - (shift * j), Exact(Quantity.EnergyPerSite, mapped), Bound, "u");
        Near.Check(copies * Exact(Quantity.SpecificHeatPerSite, ising), Exact(Quantity.SpecificHeatPerSite, mapped), Bound, "c");
        Near.Check(Exact(Quantity.SpontaneousMagnetisation, ising), Exact(Quantity.SpontaneousMagnetisation, mapped), Bound, "m");
    }

    [Fact]
    public void The_three_state_clock_model_is_a_Potts_model()
    {
        ParameterSet clock = Set("clock", ("q", 3), ("J", 0.6)), potts = Set("potts", ("q", 3), ("J", 0.9));
        Near.Check(potts.Temperature, clock.Temperature, 1e-15, "T");
        double t = clock.Temperature;
        Near.Check(Configurations.Sum(potts, 3, 2).LogZ - (6 * 0.6 / t), Configurations.Sum(clock, 3, 2).LogZ, Bound, "ln Z of the torus");
        Near.Check(Exact(Quantity.LogZPerSite, potts) - (0.6 / t), Exact(Quantity.LogZPerSite, clock), Bound, "ln Z");
        Near.Check(Exact(Quantity.EnergyPerSite, potts) + 0.6, Exact(Quantity.EnergyPerSite, clock), Bound, "u");
        Assert.Null(clock.Model.Exact(Quantity.LogZPerSite, clock.With("T", 1.5)));
        Near.Check(ReferenceValues.Get("clock4-tc"), Set("clock", ("q", 4)).Temperature, 1e-15, "q = 4");
    }

    // R. J. Baxter, H. N. V. Temperley, S. E. Ashley, Proc. R. Soc. Lond. A 358, 535 (1978): v^3 + 3 v^2 = q with v = exp(J/T) - 1.
    [Theory]
    [InlineData(2)]
    [InlineData(3)]
    [InlineData(4)]
    [InlineData(5)]
    [InlineData(64)]
    public void The_transition_of_the_triangular_Potts_model_solves_its_equation(int q)
    {
        double v = Math.Exp(0.8 / Set("potts-triangular", ("q", q), ("J", 0.8)).Temperature) - 1;
        Near.Check(q, (v * v * v) + (3 * v * v), 4e-15, "q");
    }

    // E. H. Lieb, Phys. Rev. 162, 162 (1967) and Phys. Rev. Lett. 18, 1046 (1967): rows of reference-values.json.
    [Fact]
    public void Square_ice_and_the_F_model_agree_with_the_table()
    {
        Near.Check(ReferenceValues.Get("ice-square"), Exact(Quantity.LogZPerSite, Set("six-vertex")), 1e-15, "ice");
        Near.Check(ReferenceValues.Get("f-model-tc"), Exact(Quantity.LogZPerSite, Weights(0.5, 0.5, 1)), 1e-15, "F model");
    }

    // data/six-vertex-independent.csv, made by data/six-vertex-independent.py in 50-digit arithmetic: all phases, next to
    // their boundaries too.
    [Fact]
    public void Six_vertex_agrees_with_an_independent_evaluation()
    {
        foreach (string line in File.ReadLines(ReferenceValues.PathOf("six-vertex-independent.csv")).Skip(1))
        {
            double[] v = [.. line.Split(',').Select(x => double.Parse(x, CultureInfo.InvariantCulture))];
            Near.Check(v[3], Exact(Quantity.LogZPerSite, Weights(v[0], v[1], v[2])), 2e-15, line);
        }
    }

    // The row-to-row transfer matrix of L = 6, 8, 10 columns, half of them occupied, diagonalised. Critical: the finite-size
    // correction is a series in 1/L^2 (I. Affleck, Phys. Rev. Lett. 56, 746, 1986), two terms of which are removed.
    // Antiferroelectric: it is exponentially small in L.
    [Theory]
    [InlineData(1, 1, 1, 2e-5)]
    [InlineData(1, 0.7, 1.2, 2e-5)]
    [InlineData(0.7, 1, 0.9, 5e-5)]
    [InlineData(1, 1, 1.8, 1e-4)]
    [InlineData(1, 1.3, 0.6, 2e-4)]
    [InlineData(1, 1, 5, 1e-5)]
    [InlineData(1.2, 0.6, 6, 1e-5)]
    public void Six_vertex_agrees_with_transfer_matrices(double a, double b, double c, double bound)
    {
        double[] f = [.. new[] { 6, 8, 10 }.Select(l => LogLargestPerSite(a, b, c, l))];
        double limit = c > a + b ? f[2] : Extrapolate(f);
        Near.Check(limit, Exact(Quantity.LogZPerSite, Weights(a, b, c)), bound, $"{a}, {b}, {c}");
    }

    [Theory]
    [InlineData(3, 1, 1.5)]
    [InlineData(1, 3, 2)]
    public void A_frozen_six_vertex_model_is_one_configuration(double a, double b, double c)
    {
        Assert.Equal(Math.Log(Math.Max(a, b)), Exact(Quantity.LogZPerSite, Weights(a, b, c)));
        // Half-filled rows have no larger eigenvalue than the empty and the full one, a^L + b^L (equal to it at Delta = 1).
        double empty = Math.Log(Math.Pow(a, 8) + Math.Pow(b, 8)) / 8;
        Assert.True(LogLargestPerSite(a, b, c, 8) <= empty + 1e-12);
    }

    [Fact]
    public void Six_vertex_is_continuous_across_its_phase_boundaries()
    {
        // At c = a + b: both sides and the point itself, on the scale of the change of c (slope about 2/3 here).
        double at = LogZ(0.5, 0.5, 1);
        foreach (double e in new[] { 1e-3, 1e-5, 1e-7, 1e-8, 1e-9, 1e-11, 1e-13 })
        {
            Near.Scaled(at, LogZ(0.5, 0.5, 1 + e), e, 0.7, $"c above by {e}");
            Near.Scaled(at, LogZ(0.5, 0.5, 1 - e), e, 0.7, $"c below by {e}");
        }
        // At a = b + c the frozen phase begins.
        foreach (double e in new[] { 1e-3, 1e-6, 1e-9, 1e-12 })
            Assert.InRange(LogZ(2, 1, 1 + e) - Math.Log(2), -1e-15, e);
        // The sum gives way to its Euler-Maclaurin form at lambda = 1e-4, with lambda^2/12 the leading change.
        Near.Check(Reduced(9.99e-5), Reduced(1.001e-4), 1e-15, "the switch at small lambda");
        Assert.Equal(LogZ(0.3, 1.1, 0.9), LogZ(1.1, 0.3, 0.9));

        double LogZ(double a, double b, double c) => Exact(Quantity.LogZPerSite, Weights(a, b, c));
        double Reduced(double lambda) => LogZ(0.5, 0.5, Math.Cosh(lambda / 2)) - (lambda * lambda / 12);
    }

    [Theory]
    [InlineData(1e-6, 1e-6, 1e6)]
    [InlineData(1e6, 1e-6, 1e6)]
    [InlineData(1e6, 1e6, 1e-6)]
    public void Six_vertex_extremes_stay_between_their_bounds(double a, double b, double c)
    {
        double value = Exact(Quantity.LogZPerSite, Weights(a, b, c));
        double largest = Math.Log(Math.Max(a, Math.Max(b, c)));
        Assert.InRange(value, largest - 1e-14, largest + Math.Log(2));
    }

    [Fact]
    public void The_declared_exact_references_are_those_that_are_given()
    {
        foreach (Model model in ModelCatalogue.All)
        {
            ParameterSet[] sets = [.. Samples(model)];
            foreach (string quantity in Enum.GetValues<Quantity>().Select(QuantityNames.Name).Concat(model.ExactReferences.Select(r => r.Quantity)).Distinct())
            {
                ExactValue[] values = [.. sets.Select(p => model.Exact(quantity, p)).OfType<ExactValue>()];
                bool declared = model.ExactReferences.Any(r => r.Quantity == quantity);
                Assert.True(declared == (values.Length > 0), $"{model.Name}: {quantity} is {(declared ? "declared but never given" : "given but not declared")}");
                Assert.All(values, v => Assert.True(double.IsFinite(v.Value) && v.Uncertainty >= 0 && v.Source.Length > 0 && v.Note.Length > 0));
            }
        }
    }

    private static IEnumerable<ParameterSet> Samples(Model model)
    {
        bool hasStates = model.Parameters.Any(p => p.Name == "q");
        foreach (double q in hasStates ? [2.0, 3, 4, 5, 6] : new double[] { 0 })
        {
            ParameterSet p = model.CreateParameters(hasStates ? [new("q", q)] : []);
            yield return p;
            if (model.HasTemperature)
                yield return p.With("T", 1.9);
        }
        if (Special(model.Name) is { Length: > 0 } special)
            yield return Set(model.Name, special);
    }

    // Where a model is solved, if not at its defaults.
    private static (string Name, double Value)[] Special(string model) => model switch
    {
        "ashkin-teller" => [("K", 0)],
        "field" => [("b", 0), ("a", 1)],
        "ising-imaginary-field" or "xy" or "xy-density" => [("J", 0)],
        "spin-1" => [("K", 3), ("D", 8)],
        _ => [],
    };

    private static double LogLargestPerSite(double a, double b, double c, int columns)
    {
        VertexNetwork network = Weights(a, b, c).Model.Network(Weights(a, b, c));
        double[,] row = TorusContraction.RowMatrix(network.RealElement, 2, 2, columns);
        int[] half = [.. Enumerable.Range(0, row.GetLength(0)).Where(s => int.PopCount(s) == columns / 2)];
        Matrix<double> sector = Matrix<double>.Build.Dense(half.Length, half.Length, (i, j) => row[half[i], half[j]]);
        double largest = sector.Evd().EigenValues.Max(e => e.Magnitude);
        return network.LogPrefactor + (Math.Log(largest) / columns);
    }

    // f(L) = f + A/L^2 + B/L^4 through L = 6, 8, 10.
    private static double Extrapolate(double[] f)
    {
        Matrix<double> system = Matrix<double>.Build.Dense(3, 3, (i, j) => Math.Pow(6 + (2 * i), -2 * j));
        return system.Solve(Vector<double>.Build.Dense(f))[0];
    }

    private static ParameterSet Weights(double a, double b, double c) => Set("six-vertex", ("a", a), ("b", b), ("c", c));

    private static ParameterSet Set(string name, params (string Name, double Value)[] given)
        => ModelCatalogue.Find(name).CreateParameters([.. given.Select(g => KeyValuePair.Create(g.Name, g.Value))]);

    private static double Exact(Quantity quantity, ParameterSet p) => p.Model.Exact(quantity, p)!.Value;
}
