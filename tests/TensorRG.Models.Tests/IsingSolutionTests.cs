using System.Globalization;
using TensorRG.Models.Solutions;

namespace TensorRG.Models.Tests;

/// <summary>The infinite square Ising model to 1e-14.</summary>
public class IsingSolutionTests
{
    private const double Bound = 1e-14;

    private static double Critical => IsingSolution.CriticalTemperature(1, 1).Value;

    // L. Onsager, Phys. Rev. 65, 117 (1944); C. N. Yang, Phys. Rev. 85, 808 (1952): rows of reference-values.json.
    [Theory]
    [InlineData("1.5")]
    [InlineData("2.0")]
    [InlineData("2.2")]
    [InlineData("2.3")]
    [InlineData("2.5")]
    [InlineData("3.0")]
    public void Agrees_with_the_table(string temperature)
    {
        IsingSolution s = IsingSolution.At(double.Parse(temperature, CultureInfo.InvariantCulture), 1, 1);
        Near.Check(ReferenceValues.Get("ising-square-logz-T" + temperature), s.LogZPerSite, Bound, "ln Z");
        Near.Check(ReferenceValues.Get("ising-square-u-T" + temperature), s.EnergyPerSite, Bound, "u");
        Near.Check(ReferenceValues.Get("ising-square-c-T" + temperature), s.SpecificHeatPerSite, Bound, "c");
        Near.Check(ReferenceValues.Get("ising-square-m-T" + temperature), s.OrderParameter, Bound, "m");
    }

    [Fact]
    public void Agrees_with_the_table_at_criticality()
    {
        Assert.Equal(ReferenceValues.Get("ising-square-tc"), Critical);
        IsingSolution s = IsingSolution.At(Critical, 1, 1);
        Near.Check(ReferenceValues.Get("ising-square-logz-tc"), s.LogZPerSite, Bound, "ln Z");
        Near.Check(ReferenceValues.Get("ising-square-u-tc"), s.EnergyPerSite, Bound, "u");
    }

    public static TheoryData<double, double, double, double[]> IndependentRows()
    {
        var data = new TheoryData<double, double, double, double[]>();
        foreach (string line in File.ReadLines(ReferenceValues.PathOf("ising-independent.csv")).Skip(1))
        {
            double[] v = [.. line.Split(',').Select(x => double.Parse(x, CultureInfo.InvariantCulture))];
            data.Add(v[0], v[1], v[2], v[3..]);
        }
        return data;
    }

    // data/ising-independent.csv: another form of the integral and elliptic integrals in 80-digit arithmetic, made by
    // data/ising-independent.py; from T = 0.05 to 1e6 and to within 1e-15 of criticality, Jx = Jy and not.
    [Theory]
    [MemberData(nameof(IndependentRows))]
    public void Agrees_with_an_independent_evaluation(double t, double jx, double jy, double[] expected)
    {
        IsingSolution s = IsingSolution.At(t, jx, jy);
        Near.Check(expected[0], s.LogZPerSite, 2e-15, "ln Z");
        Near.Check(expected[1], s.EnergyPerSite, 2e-15, "u");
        Near.Check(expected[2], s.SpecificHeatPerSite, 2e-15, "c");
        Near.Check(expected[3], s.OrderParameter, 2e-15, "m");
    }

    [Theory]
    [InlineData(0.8)]
    [InlineData(2.2)]
    [InlineData(4.0)]
    public void Declared_uncertainties_cover_a_change_of_the_integrated_direction(double t)
    {
        Model model = ModelCatalogue.Find("ising");
        foreach (Quantity quantity in new[] { Quantity.LogZPerSite, Quantity.EnergyPerSite, Quantity.SpecificHeatPerSite, Quantity.SpontaneousMagnetisation })
        {
            ExactValue one = model.Exact(quantity, model.CreateParameters([new("T", t), new("Jx", 1.3), new("Jy", 0.4)]))!;
            ExactValue other = model.Exact(quantity, model.CreateParameters([new("T", t), new("Jx", 0.4), new("Jy", 1.3)]))!;
            Assert.True(Math.Abs(one.Value - other.Value) <= one.Uncertainty + other.Uncertainty, $"{quantity}: {one.Value:R} and {other.Value:R}");
        }
    }

    [Theory]
    [InlineData(-1, 1)]
    [InlineData(1, -1)]
    [InlineData(-1, -1)]
    public void The_sign_of_a_coupling_changes_only_the_magnetisation(int signX, int signY)
    {
        Model model = ModelCatalogue.Find("ising");
        ParameterSet positive = model.CreateParameters([new("T", 1.7), new("Jx", 0.9), new("Jy", 1.2)]);
        ParameterSet negative = model.CreateParameters([new("T", 1.7), new("Jx", 0.9 * signX), new("Jy", 1.2 * signY)]);
        Assert.Equal(model.Exact(Quantity.LogZPerSite, positive), model.Exact(Quantity.LogZPerSite, negative));
        Assert.Equal(model.Exact(Quantity.EnergyPerSite, positive), model.Exact(Quantity.EnergyPerSite, negative));
        Assert.True(model.Exact(Quantity.SpontaneousMagnetisation, positive)!.Value > 0.5);
        Assert.Equal(0, model.Exact(Quantity.SpontaneousMagnetisation, negative)!.Value);
    }

    // E. Ising, Z. Phys. 31, 253 (1925): ln Z per site = ln(2 cosh K).
    [Theory]
    [InlineData(0.05)]
    [InlineData(1.0)]
    [InlineData(300.0)]
    public void Without_one_coupling_it_is_a_chain(double t)
    {
        double k = 0.7 / t, expected = k + Math.Log(1 + Math.Exp(-2 * k));
        Near.Check(expected, IsingSolution.At(t, 0.7, 0).LogZPerSite, 2e-15, "horizontal chain");
        Near.Check(expected, IsingSolution.At(t, 0, -0.7).LogZPerSite, 2e-15, "vertical chain");
        Near.Check(-0.7 * Math.Tanh(k), IsingSolution.At(t, 0, -0.7).EnergyPerSite, 2e-15, "energy");
        Near.Check(Math.Pow(k / Math.Cosh(k), 2), IsingSolution.At(t, 0.7, 0).SpecificHeatPerSite, 2e-15, "specific heat");
        Assert.Equal(0, IsingSolution.At(t, 0.7, 0).OrderParameter);
    }

    [Fact]
    public void Extreme_temperatures_stay_finite()
    {
        (double logZ, double u, double c, double m) = Values(IsingSolution.At(1e-9, 1, 1));
        Near.Check(2e9, logZ, 1e-15, "cold ln Z");
        Near.Check(-2, u, 1e-15, "cold u");
        Assert.Equal((0, 1), (c, m));
        (logZ, u, c, m) = Values(IsingSolution.At(1e9, 1, 1));
        Near.Check(Math.Log(2), logZ, 1e-15, "ln Z");
        // High-temperature series: u = -2J^2/T, to the rounding of J; c = 2(J/T)^2.
        Near.Scaled(-2e-9, u, 1, 1e-15, "u");
        Near.Scaled(2e-18, c, 2e-18, 1e-12, "c");
        Assert.Equal(0, m);
    }

    [Theory]
    [InlineData(1, 0.3)]
    [InlineData(0.3, -1)]
    [InlineData(1, 1e-5)]
    [InlineData(1e6, 1e-6)]
    [InlineData(1, 0.999999999999)]
    public void The_anisotropic_critical_temperature_solves_its_equation(double jx, double jy)
    {
        double t = IsingSolution.CriticalTemperature(jx, jy).Value;
        // The order parameter tells the two sides apart: the root lies within two units in the last place.
        Assert.True(IsingSolution.At(t * (1 - 4.5e-16), jx, jy).OrderParameter > 0);
        Assert.Equal(0, IsingSolution.At(t * (1 + 4.5e-16), jx, jy).OrderParameter);
    }

    [Fact]
    public void Bad_arguments_are_refused()
    {
        Assert.Throws<ArgumentOutOfRangeException>(() => IsingSolution.At(0, 1, 1));
        Assert.Throws<ArgumentOutOfRangeException>(() => IsingSolution.At(double.NaN, 1, 1));
        Assert.Throws<ArgumentOutOfRangeException>(() => IsingSolution.At(1, double.PositiveInfinity, 1));
        Assert.Throws<ArgumentOutOfRangeException>(() => IsingSolution.At(1e-300, 1e300, 1));
        Assert.Throws<ArgumentOutOfRangeException>(() => IsingSolution.CriticalTemperature(0, 1));
    }

    private static (double LogZ, double U, double C, double M) Values(IsingSolution s)
        => (s.LogZPerSite, s.EnergyPerSite, s.SpecificHeatPerSite, s.OrderParameter);
}
