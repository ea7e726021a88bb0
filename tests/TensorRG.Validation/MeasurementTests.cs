using TensorRG.Models;
using TensorRG.Physics.Measurements;
using TensorRG.Tensors.Kernels;

namespace TensorRG.Validation;

/// <summary>Measured observables against published values; each must also lie inside its own bar.</summary>
public sealed class MeasurementTests
{
    private static readonly double Tc = 2 / Math.Log(1 + Math.Sqrt(2));

    // L. Onsager, Phys. Rev. 65, 117 (1944): energy and specific heat. C. N. Yang, Phys. Rev. 85, 808 (1952): spontaneous magnetisation.
    [Theory]
    [InlineData("ising-square-u-T2.0", 2.0, "energy", 24, 1e-10)]
    [InlineData("ising-square-u-T2.5", 2.5, "energy", 24, 1e-10)]
    [InlineData("ising-square-m-T2.0", 2.0, "magnetisation", 24, 1e-8)]
    [InlineData("ising-square-m-T2.2", 2.2, "magnetisation", 32, 1e-8)]
    [InlineData("ising-square-c-T2.0", 2.0, "specific-heat", 24, 1e-6)]
    [InlineData("ising-square-c-T3.0", 3.0, "specific-heat", 24, 1e-6)]
    public void Square_Ising_away_from_Tc(string id, double temperature, string quantity, int chi, double bound)
        => Check(PublishedValues.Of(id), Measure("ising", [("T", temperature)], quantity, chi), bound);

    // L. Onsager, Phys. Rev. 65, 117 (1944): U = -sqrt 2.
    [Fact]
    public void Square_Ising_energy_at_Tc() => Check(PublishedValues.Of("ising-square-u-tc"), Measure("ising", [("T", Tc)], "energy", 64), 1e-4);

    // Sources stand in the rows of reference-values.json: Wannier 1950, Lieb 1967, Kasteleyn 1961 and 1963.
    [Theory]
    [InlineData("ising-triangular-af-entropy", "ising-triangular", "T=0.02 J=-1", "entropy", 24)]
    [InlineData("ice-square", "six-vertex", "", "entropy", 24)]
    [InlineData("dimers-square", "dimers", "", "entropy", 24)]
    [InlineData("dimers-honeycomb", "dimers-honeycomb", "", "entropy", 24)]
    public void Residual_entropies_of_critical_ground_states(string id, string model, string settings, string quantity, int chi)
        => Check(PublishedValues.Of(id), Measure(model, Settings(settings), quantity, chi), 1e-4);

    // R. J. Baxter, Annals of Combinatorics 3, 191 (1999): kappa of hard squares at z = 1.
    [Fact]
    public void Hard_squares()
    {
        Measured measured = Measure("hard-squares", [("z", 1)], "ln-z", 32);
        Assert.InRange(Math.Abs(measured.Value.Value - Math.Log(PublishedValues.Of("hard-squares-z1"))), 0, measured.Value.Error);
        Assert.InRange(measured.Value.Error, 0, 1e-13);
    }

    // By the symmetry s -> -s on one sublattice: the antiferromagnet's staggered magnetisation is the ferromagnet's (C. N. Yang, Phys. Rev. 85, 808 (1952)).
    [Fact]
    public void The_staggered_magnetisation_of_the_antiferromagnet()
        => Check(PublishedValues.Of("ising-square-m-T2.0"), Measure("ising", [("T", 2.0), ("J", -1)], "staggered", 16), 1e-8);

    // The mean of s on the ferromagnet's bond lattice must not alternate: uniform order of the antiferromagnet is zero.
    [Fact]
    public void The_uniform_magnetisation_of_the_antiferromagnet_is_zero()
    {
        Measured measured = Measure("ising", [("T", 1.5), ("J", -1)], "magnetisation", 12);
        Assert.InRange(Math.Abs(measured.Value.Value), 0, 1e-8);
        Assert.True(measured.IsConverged, measured.Remark);
    }

    // Independent spins in an imaginary field i b: the mean spin is tanh(i b / T) = i tan(b / T) (textbook), and ln Z = ln(2 cos(b / T)).
    [Fact]
    public void An_imaginary_field_on_free_spins()
    {
        (string, double)[] settings = [("T", 2), ("J", 0), ("h.re", 0), ("h.im", 0.6)];
        Assert.Equal(Math.Tan(0.3), Measure("ising-imaginary-field", settings, "magnetisation", 8).ImaginaryPart, 1e-13);
        Assert.Equal(Math.Log(2 * Math.Cos(0.3)), Measure("ising-imaginary-field", settings, "ln-z", 8).Value.Value, 1e-13);
    }

    // B. Kaufman, Phys. Rev. 76, 1232 (1949): Z of the 4 x 4 torus at Tc is 5509120; the moments are those of the sum over all 65536 configurations.
    [Fact]
    public void The_torus_of_sixteen_spins()
    {
        (double squared, double fourth) = Moments(4, Tc);
        Measurement measured = MeasureAll("ising", [("T", Tc)], ["ln-z", "magnetisation^2", "binder"], 32, torus: 4);
        Assert.Equal(Math.Log(5509120) / 16, measured.Values[0].Value.Value, 1e-13);
        Assert.Equal(squared, measured.Values[1].Value.Value, 1e-12);
        Assert.Equal(1 - (fourth / (3 * squared * squared)), measured.Values[2].Value.Value, 1e-12);
    }

    // Two methods: boundary fixed points and blocks agree within their joint bars where no exact solution is known.
    [Theory]
    [InlineData("spin-1", "T=1.2 D=0.5", "density")]
    [InlineData("ising-next-nearest", "T=3 J2=0.3", "energy")]
    [InlineData("ising", "T=2.6 h=0.1", "magnetisation")]
    public void Two_methods_agree(string model, string settings, string quantity)
    {
        Measured boundary = Measure(model, Settings(settings), quantity, 16);
        Measured blocks = MeasureAll(model, Settings(settings), [quantity], 12, method: "blocks").Values[0];
        Assert.InRange(Math.Abs(boundary.Value.Value - blocks.Value.Value), 0, boundary.Value.Error + blocks.Value.Error);
        Assert.InRange(blocks.Value.Error, 0, 0.05);
    }

    private static void Check(double published, Measured measured, double bound)
    {
        double deviation = Math.Abs(measured.Value.Value - published);
        Assert.True(deviation <= bound, FormattableString.Invariant($"{measured.Name}: {measured.Value.Value:R} deviates by {deviation:0.0e+00}, bound {bound:0.0e+00}"));
        Assert.True(deviation <= measured.Value.Error, FormattableString.Invariant($"{measured.Name}: deviation {deviation:0.0e+00} outside the bar {measured.Value.Error:0.0e+00}"));
    }

    private static Measured Measure(string model, (string Name, double Value)[] settings, string quantity, int chi)
        => MeasureAll(model, settings, [quantity], chi).Values[0];

    private static Measurement MeasureAll(
        string model, (string Name, double Value)[] settings, string[] quantities, int chi, int? torus = null, string method = "boundary")
    {
        var inputs = new MeasurementInputs
        {
            Parameters = ModelCatalogue.Find(model).CreateParameters(settings.Select(static s => KeyValuePair.Create(s.Name, s.Value))),
            Quantities = [.. quantities],
            BondDimension = chi,
            TorusLength = torus,
            Method = torus is null ? method : "blocks",
        };
        return new MeasurementEngine(Backends.Create(Backends.Default, 2)).Measure(inputs, null, CancellationToken.None);
    }

    private static (string Name, double Value)[] Settings(string text)
        => [.. text.Split(' ', StringSplitOptions.RemoveEmptyEntries).Select(static t => (t.Split('=')[0], double.Parse(t.Split('=')[1], System.Globalization.CultureInfo.InvariantCulture)))];

    /// <summary>Moments of the mean spin of a square torus by the sum over all configurations.</summary>
    private static (double Squared, double Fourth) Moments(int length, double temperature)
    {
        double z = 0, second = 0, fourth = 0;
        for (int bits = 0; bits < 1 << (length * length); bits++)
        {
            int energy = 0;
            for (int site = 0; site < length * length; site++)
                energy -= Spin(bits, site) * (Spin(bits, Right(site, length)) + Spin(bits, (site + length) % (length * length)));
            double weight = Math.Exp(-energy / temperature), m = ((2.0 * int.PopCount(bits)) / (length * length)) - 1;
            (z, second, fourth) = (z + weight, second + (weight * m * m), fourth + (weight * m * m * m * m));
        }

        return (second / z, fourth / z);
    }

    private static int Right(int site, int length) => (site / length * length) + ((site + 1) % length);

    private static int Spin(int bits, int site) => ((bits >> site) & 1) == 1 ? 1 : -1;
}
