using System.Numerics;
using TensorRG.Models.Files;
using TensorRG.Models.Lattices;

namespace TensorRG.Models.Tests.Files;

/// <summary>What valid model files yield, key by key, against tables computed here.</summary>
public class ModelFileTests
{
    [Fact]
    public void A_file_describes_its_model()
    {
        FileModel model = Samples.Parse(Samples.Ising);
        Assert.Equal(("ising-file", "Ising model", "Spins up and down.", "square"), (model.Name, model.Title, model.Description, model.Lattice));
        Assert.Equal(Samples.Ising, model.Definition);
        Assert.Equal(Samples.Ising, ModelCatalogue.StoredText(model));
        Assert.Null(ModelCatalogue.StoredText(ModelCatalogue.Find("ising")));
        Assert.Equal(["temperature", "Jx", "Jy", "h"], model.Parameters.Select(p => p.Name));
        ParameterDefinition jx = model.Parameters[1];
        Assert.Equal((1, -5, 5, "energy", "Horizontal coupling", false), (jx.Default, jx.Minimum, jx.Maximum, jx.Unit, jx.Meaning, jx.IsInteger));
        Assert.Equal("T", model.Parameters[0].Symbol);
        Assert.True(model.Parameters[0].DefaultsToCritical);
        Assert.Equal("J: Jx, Jy", Assert.Single(model.Shorthands) is var s ? $"{s.Name}: {string.Join(", ", s.Targets)}" : "");
        Assert.Equal(["energy", "magnetisation"], model.ExactReferences.Select(r => r.Quantity));
    }

    [Theory]
    [InlineData(Samples.HardSquares, "hard-squares", "square", 1)]
    [InlineData(Samples.HoneycombVertices, "loops", "honeycomb (variables on the edges)", 2)]
    [InlineData(Samples.Field, "field", "kagome", 3)]
    [InlineData(Samples.Rotors, "rotors", "triangular", 1)]
    public void What_is_left_out_has_defaults(string text, string name, string lattice, int sites)
    {
        FileModel model = Samples.Parse(text);
        Assert.Equal((name, name, "", lattice, sites), (model.Name, model.Title, model.Description, model.Lattice, model.SitesPerVertex));
        Assert.Empty(model.ExactReferences);
    }

    [Fact]
    public void The_temperature_defaults_to_the_critical_one_where_the_file_knows_it()
    {
        FileModel model = Samples.Parse(Samples.Ising);
        double critical = 2 / Math.Log(1 + Math.Sqrt(2));
        Assert.Equal(critical, model.CreateParameters().Temperature, 1e-15);
        Assert.Equal(2 * critical, model.CreateParameters([new("J", 2)]).Temperature, 1e-15);
        Assert.Equal(2, model.CreateParameters([new("h", 1)]).Temperature);
        CriticalPoint none = model.CriticalTemperature(model.CreateParameters([new("h", 1)]));
        Assert.Contains("only where Jx == Jy", none.Reason, StringComparison.Ordinal);
        Assert.Contains("no temperature", Samples.Parse(Samples.HardSquares) is var hard ? hard.CriticalTemperature(hard.CreateParameters()).Reason : null, StringComparison.Ordinal);
    }

    [Fact]
    public void References_hold_where_they_say()
    {
        FileModel model = Samples.Parse(Samples.Ising);
        ExactValue energy = model.Exact("energy", model.CreateParameters([new("J", 3)]))!;
        Assert.Equal((-3 * Math.Sqrt(2), 1e-15), (energy.Value, energy.Uncertainty));
        Assert.Contains("Onsager", energy.Source, StringComparison.Ordinal);
        Assert.Equal(energy, model.Exact(Quantity.EnergyPerSite, model.CreateParameters([new("J", 3)])));
        Assert.Null(model.Exact("energy", model.CreateParameters([new("T", 3)])));
        Assert.Equal(0, model.Exact("magnetisation", model.CreateParameters([new("J", 0)]))!.Value);
        Assert.Null(model.Exact("entropy", model.CreateParameters()));
    }

    [Fact]
    public void Tables_of_the_ising_model()
    {
        FileModel model = Samples.Parse(Samples.Ising);
        ParameterSet p = model.CreateParameters([new("T", 2), new("Jx", 0.5), new("Jy", -1.5), new("h", 0.25)]);
        LatticeSystem system = model.System(p)!;
        Assert.Equal((LatticeKind.Square, false, 2), (system.Lattice, system.OnEdges, system.States));
        Assert.Equal("1 -1", string.Join(" ", system.StateLabels));
        Assert.All(system.LogMeasure, m => Assert.Equal(0, m));
        Check(system.LogWeights, (Cluster.Site, [0.125, -0.125]), (Cluster.Bond1, [0.25, -0.25, -0.25, 0.25]), (Cluster.Bond2, [-0.75, 0.75, 0.75, -0.75]));
        Assert.Equal(["energy", "magnetisation", "staggered", "link", "corner", "log-weight"], system.Observables.Select(o => o.Name));
        Check(system.Observables[0].Terms, (Cluster.Site, [-0.25, 0.25]), (Cluster.Bond1, [-0.5, 0.5, 0.5, -0.5]), (Cluster.Bond2, [1.5, -1.5, -1.5, 1.5]));
        Check(system.Observables[1].Terms, (Cluster.Site, [1, -1]));
        Check(system.Observables[3].Terms, (Cluster.Bond1, [1, -1, -1, 1]), (Cluster.Bond2, [1, -1, -1, 1]));
        Check(system.Observables[4].Terms, (Cluster.Site, [-0.25, 0.25]));
        Assert.Equal([false, true, false, false, false, false], system.Observables.Select(o => o.IsOrderParameter));
        Assert.Equal([false, false, true, false, false, false], system.Observables.Select(o => o.IsStaggered));
        Assert.Equal(("Mean spin", "none"), (system.Observables[1].Meaning, system.Observables[1].Unit));
        Check(system.Observables[^1].Terms, [.. system.LogWeights.Select(t => (t.Cluster, t.Values.Select(v => v.Real).ToArray()))]);
    }

    [Fact]
    public void Constraints_exclude_and_leave_the_log_weight_finite()
    {
        FileModel model = Samples.Parse(Samples.HardSquares);
        LatticeSystem system = model.System(model.CreateParameters([new("z", 3)]))!;
        Assert.Equal("empty occupied", string.Join(" ", system.StateLabels));
        double no = double.NegativeInfinity;
        Check(system.LogWeights, (Cluster.Site, [0, Math.Log(3)]), (Cluster.Bond1, [0, 0, 0, no]), (Cluster.Bond2, [0, 0, 0, no]));
        Assert.Equal(["density", "log-weight"], system.Observables.Select(o => o.Name));
        Check(system.Observables[1].Terms, (Cluster.Site, [0, Math.Log(3)]), (Cluster.Bond1, [0, 0, 0, 0]), (Cluster.Bond2, [0, 0, 0, 0]));
        Assert.Equal(NetworkForm.Bond, model.Form);
    }

    [Fact]
    public void Several_variables_and_all_terms_of_the_square_lattice()
    {
        FileModel model = Samples.Parse(Samples.Faces);
        ParameterSet p = model.CreateParameters([new("q", 2), .. model.Settings("h", "0.5-0.25i")]);
        LatticeSystem system = model.System(p)!;
        Assert.Equal("k=0, m=0; k=0, m=0.5; k=1, m=0; k=1, m=0.5", string.Join("; ", system.StateLabels));
        (double K, double M)[] state = [(0, 0), (0, 0.5), (1, 0), (1, 0.5)];
        Complex h = new(0.5, -0.25);
        Assert.Equal([Cluster.Site, Cluster.Bond1, Cluster.Bond2, Cluster.Diagonal, Cluster.Antidiagonal, Cluster.Face], system.LogWeights.Select(t => t.Cluster));
        CheckTable(system, Cluster.Site, 1, s => h * state[s[0]].K);
        CheckTable(system, Cluster.Bond1, 2, s => -state[s[0]].K * state[s[1]].M);
        CheckTable(system, Cluster.Diagonal, 2, s => -(0.1 * state[s[0]].K * state[s[1]].K) - (0.2 * state[s[0]].M));
        CheckTable(system, Cluster.Antidiagonal, 2, s => -(0.1 * state[s[0]].K * state[s[1]].K) - (0.3 * state[s[1]].M));
        CheckTable(system, Cluster.Face, 4, s => Same(s[0], s[2]) + (Same(s[1], s[3]) * state[s[0]].M));
        Assert.False(system.HasPositiveWeights);

        double Same(int a, int b) => state[a].K == state[b].K ? 1 : 0;
    }

    [Fact]
    public void Complex_parameters_are_two_real_ones()
    {
        FileModel model = Samples.Parse(Samples.Faces);
        Assert.Equal(["temperature", "q", "h.re", "h.im"], model.Parameters.Select(p => p.Name));
        Assert.Equal(0, model.CreateParameters()["h.re"]);
        Assert.Equal(0.1, model.CreateParameters()["h.im"]);
        Assert.Equal("Field, imaginary part", model.Parameters[3].Meaning);
        Assert.Equal([new("h.re", 0.2), new("h.im", 0.1)], model.Settings("H", "0.2+0.1i"));
        Assert.Equal([new("h.re", -0.5), new("h.im", 0)], model.Settings("h", "-0.5"));
        Assert.Equal([new("h.im", 0.5)], model.Settings("h.im", "0.5"));
        Assert.Equal([new("q", 3)], model.Settings("q", "3"));
        Assert.Contains("0.2+0.1i", Assert.Throws<ModelException>(() => model.Settings("h", "no")).Message, StringComparison.Ordinal);
        Assert.Contains("finite number", Assert.Throws<ModelException>(() => model.Settings("q", "1,5")).Message, StringComparison.Ordinal);
    }

    [Fact]
    public void Rows_of_a_vertex_table_and_a_weight_expression_agree_with_the_built_in_model()
    {
        string expression = Samples.Vertices[..Samples.Vertices.IndexOf("table", StringComparison.Ordinal)]
            + "weight = \"if(up + left == down + right, if(up == left, a, if(up == down, b, c)), 0)\"";
        Model built = ModelCatalogue.Find("six-vertex");
        KeyValuePair<string, double>[] given = [new("a", 0.7), new("b", 1.1), new("c", 1.9)];
        VertexNetwork network = built.Network(built.CreateParameters(given));
        foreach (string text in new[] { Samples.Vertices, expression })
        {
            FileModel model = Samples.Parse(text);
            LatticeSystem system = model.System(model.CreateParameters(given))!;
            Assert.True(system.OnEdges);
            ClusterTable table = Assert.Single(system.LogWeights);
            Assert.Equal(Cluster.Vertex, table.Cluster);
            for (int n = 0; n < 16; n++)
            {
                double element = network.RealElement(n >> 3, (n >> 2) & 1, (n >> 1) & 1, n & 1) * Math.Exp(network.LogPrefactor);
                Assert.Equal(element, Math.Exp(table.Values[n].Real), 1e-14);
                Assert.Equal(0, table.Values[n].Imaginary);
            }
        }
        FileModel six = Samples.Parse(Samples.Vertices);
        LatticeSystem observed = six.System(six.CreateParameters())!;
        Assert.Equal(["lines", "turns", "log-weight"], observed.Observables.Select(o => o.Name));
        Check(observed.Observables[0].Terms, (Cluster.Vertex, [0, 0, 0, 0, 0, 0.5, 0.5, 0, 0, 0.5, 0.5, 0, 0, 0, 0, 1]));
        Assert.Equal(1, observed.Observables[1].Terms[0].Values[0b1001].Real);
    }

    [Fact]
    public void Vertices_of_the_honeycomb_lattice()
    {
        FileModel model = Samples.Parse(Samples.HoneycombVertices);
        LatticeSystem system = model.System(model.CreateParameters([new("T", 2)]))!;
        double no = double.NegativeInfinity;
        Check(system.LogWeights, (Cluster.Vertex, [0, no, no, -1.5, no, -1.5, -1, no]));
        Check(system.Observables[0].Terms, (Cluster.Vertex, [0, 0, 0, 3, 0, 3, 2, 0]));
    }

    [Fact]
    public void Angles_and_circles_differ_in_their_measure()
    {
        FileModel model = Samples.Parse(Samples.Rotors);
        LatticeSystem system = model.System(model.CreateParameters([new("N", 4)]))!;
        Assert.Equal(8, system.States);
        Assert.All(system.LogMeasure, m => Assert.Equal(Math.Log(Math.PI / 4), m, 1e-15));
        CheckTable(system, Cluster.Bond1, 2, s => Math.Cos(Math.PI / 4 * (s[0] - s[1])));
        CheckTable(system, Cluster.Bond3, 2, s => Math.Cos(Math.PI / 4 * (s[0] - s[1])) - 0.5);
        CheckTable(system, Cluster.UpTriangle, 3, s => -(0.1 * Math.Cos(Math.PI / 4 * s.Sum())) - (0.2 * Math.Cos(Math.PI / 4 * s[0])));
        CheckTable(system, Cluster.DownTriangle, 3, s => -(0.1 * Math.Cos(Math.PI / 4 * s.Sum())) - (0.3 * Math.Cos(Math.PI / 4 * s[0])));
        FileModel clock = Samples.Parse(Samples.Rotors.Replace("circle", "angles", StringComparison.Ordinal));
        Assert.All(clock.System(clock.CreateParameters())!.LogMeasure, m => Assert.Equal(0, m));
    }

    [Theory]
    [InlineData(1)]
    [InlineData(2)]
    [InlineData(9)]
    [InlineData(24)]
    [InlineData(63)]
    [InlineData(256)]
    public void The_field_rule_integrates_gaussians_times_polynomials(int nodes)
    {
        FileModel model = Samples.Parse(Samples.Field.Replace("field = 9", $"field = {nodes}", StringComparison.Ordinal)
            .Replace("triangle = ", "site = ", StringComparison.Ordinal).Replace("phi_i*phi_j*phi_k", "0*phi", StringComparison.Ordinal)
            .Replace("site = \"phi^2 + phi_i^4/10\"\n", "", StringComparison.Ordinal).Replace("c = { angles = 2 }\n", "", StringComparison.Ordinal)
            .Replace("bond = \"cos(c_i - c_j)\"", "", StringComparison.Ordinal) + "\n[observables]\nphi = \"phi\"");
        LatticeSystem system = model.System(model.CreateParameters())!;
        double[] phi = [.. system.Observables.Single(o => o.Name == "phi").Terms[0].Values.Select(v => v.Real)];
        double[] weight = [.. system.LogMeasure.Select(Math.Exp)];
        Assert.Equal(nodes, phi.Length);
        for (int power = 0, factor = 1; power <= Math.Min(4, (2 * nodes) - 1); power += 2, factor *= power - 1)
        {
            double sum = phi.Zip(weight, (x, w) => w * Math.Pow(x / 1.5, power) * Math.Exp(-x * x / 2.25)).Sum();
            double exact = 1.5 * Math.Sqrt(Math.PI) * factor / Math.Pow(2, power / 2.0);
            Assert.True(Math.Abs(sum - exact) <= 1e-13 * exact, $"{nodes} nodes, power {power}: {sum:R} instead of {exact:R}");
        }
        Assert.Equal(phi.Order(), phi);
        Assert.Equal(phi.Select(x => -x).Reverse(), phi);
    }

    [Fact]
    public void A_field_and_an_angle_make_pairs()
    {
        FileModel model = Samples.Parse(Samples.Field);
        LatticeSystem system = model.System(model.CreateParameters())!;
        Assert.Equal((18, 3), (system.States, system.SitesPerCell));
        Assert.StartsWith("phi=", system.StateLabels[0], StringComparison.Ordinal);
        Assert.Equal(system.LogMeasure[0], system.LogMeasure[1]);
        Assert.True(system.HasPositiveWeights);
    }

    [Fact]
    public void Weights_may_be_negative_or_complex()
    {
        FileModel model = Samples.Parse(Samples.HardSquares.Replace("z^n", "if(n == 1, -2, 1)", StringComparison.Ordinal).Replace("n_i*n_j == 0\"", "true\"\n[energy]", StringComparison.Ordinal).Replace("[energy]", "", StringComparison.Ordinal));
        Assert.Equal(new Complex(Math.Log(2), Math.PI), model.System(model.CreateParameters())!.LogWeights[0].Values[1]);
        FileModel phase = Samples.Parse(Samples.HardSquares.Replace("z^n", "exp(i*pi*n/2)", StringComparison.Ordinal));
        Assert.Equal(Math.PI / 2, phase.System(phase.CreateParameters())!.LogWeights[0].Values[1].Imaginary, 1e-15);
    }

    [Fact]
    public void Energies_are_not_evaluated_where_the_configuration_is_excluded()
    {
        FileModel model = Samples.Parse("""
            name = "x"
            lattice = "honeycomb"
            [parameters]
            T = 1
            [site]
            s = "1..3"
            [energy]
            bond = "1/(s_i - s_j)"
            [require]
            bond = "s_i != s_j"
            """);
        LatticeSystem system = model.System(model.CreateParameters())!;
        Assert.Equal([Cluster.Bond1, Cluster.Bond2, Cluster.Bond3], system.LogWeights.Select(t => t.Cluster));
        CheckTable(system, Cluster.Bond3, 2, s => s[0] == s[1] ? double.NegativeInfinity : -1.0 / (s[0] - s[1]));
    }

    [Fact]
    public void Tables_of_256_states_fill()
    {
        FileModel model = Samples.Parse(Samples.HardSquares.Replace("\"occupation\"", "\"0..255\"", StringComparison.Ordinal).Replace("n_i*n_j == 0", "abs(n_i - n_j) <= 100 and n_i != 7", StringComparison.Ordinal));
        Assert.Equal(65536, model.System(model.CreateParameters())!.LogWeights[1].Values.Length);
    }

    [Fact]
    public void Files_load_from_disk_with_or_without_byte_order_mark_and_with_any_line_ends()
    {
        string path = Path.Combine(Path.GetTempPath(), $"tensorrg-{Guid.NewGuid():N}.toml");
        try
        {
            foreach (string text in new[] { Samples.Ising, "\uFEFF" + Samples.Ising, Samples.Ising.Replace("\n", "\r\n", StringComparison.Ordinal) })
            {
                File.WriteAllText(path, text);
                Assert.Equal("ising-file", ModelFile.Load(path).Name);
            }
        }
        finally
        {
            File.Delete(path);
        }
    }

    private static void Check(IReadOnlyList<ClusterTable> tables, params (Cluster Cluster, double[] Values)[] expected)
    {
        Assert.Equal(expected.Select(e => e.Cluster), tables.Select(t => t.Cluster));
        for (int i = 0; i < expected.Length; i++)
        {
            Assert.Equal(expected[i].Values, tables[i].Values.Select(v => v.Real + 0.0));
            Assert.All(tables[i].Values, v => Assert.Equal(0, v.Imaginary));
        }
    }

    // log weight times the temperature against a function of the states, with T = 1 or 1.5 as the sample has it.
    private static void CheckTable(LatticeSystem system, Cluster cluster, int sites, Func<int[], Complex> minusEnergy)
    {
        ClusterTable table = system.LogWeights.Single(t => t.Cluster == cluster);
        double temperature = cluster == Cluster.Face || system.States == 4 ? 1.5 : 1;
        Assert.Equal((int)Math.Pow(system.States, sites), table.Values.Length);
        for (int n = 0; n < table.Values.Length; n++)
        {
            int rest = n;
            int[] states = new int[sites];
            for (int site = sites - 1; site >= 0; site--, rest /= system.States)
                states[site] = rest % system.States;
            Complex expected = minusEnergy(states) / temperature;
            bool equal = double.IsNegativeInfinity(expected.Real) ? double.IsNegativeInfinity(table.Values[n].Real) : Complex.Abs(expected - table.Values[n]) <= 1e-14;
            Assert.True(equal, $"{cluster} {string.Join(",", states)}: {table.Values[n]} instead of {expected}");
        }
    }
}
