using System.Numerics;

namespace TensorRG.Models.Tests.Literature;

/// <summary>Models with an integral on every site of the square lattice.</summary>
internal static class SquareIntegrals
{
    public static LiteratureModel? Find(ParameterSet p, Torus t) => p.Model.Name switch
    {
        "xy" => Planar(p, t, 0) with { Observables = Planar(p, t, 0).Observables.Where(static o => o.Key != "density").ToDictionary() },
        "xy-density" => Planar(p, t, p["mu"]),
        "field" => Field(p, t),
        _ => null,
    };

    // P. Hasenfratz, F. Karsch, Phys. Lett. B 125, 308 (1983): steps in time carry cos(d - i mu) = cos d cosh mu + i sin d sinh mu. The integral over an angle by
    // the rule of trapezoids; the number of charges is d ln Z / d mu.
    private static LiteratureModel Planar(ParameterSet p, Torus t, double mu)
    {
        int nodes = p.WholeNumber("nodes");
        double j = p["J"];
        LiteratureModel model = LiteratureModel.Thermal(nodes, t.Cells, p.Temperature,
            s => -j * (Over(t.Pairs(1, 0), s, static d => Math.Cos(d)) + Over(t.Pairs(0, 1), s, d => new Complex(Math.Cos(d) * Math.Cosh(mu), Math.Sin(d) * Math.Sinh(mu)))),
            ("magnetisation", s => s.Sum(k => Math.Cos(Angle(k)))),
            ("density", s => j / p.Temperature * Over(t.Pairs(0, 1), s, d => new Complex(Math.Cos(d) * Math.Sinh(mu), Math.Sin(d) * Math.Cosh(mu)))));
        return model with { LogMeasure = _ => t.Cells * Math.Log(Angle(1)) };

        double Angle(int k) => 2 * Math.PI * k / nodes;

        Complex Over((int I, int J)[] bonds, int[] s, Func<double, Complex> pair)
            => bonds.Aggregate(Complex.Zero, (sum, b) => sum + pair(Angle(s[b.I]) - Angle(s[b.J])));
    }

    // K. G. Wilson, J. Kogut, Phys. Rep. 12, 75 (1974): E = sum (a m^2 + b m^4 - h m) + (1/2) sum (m - m')^2.
    private static LiteratureModel Field(ParameterSet p, Torus t)
    {
        double width = p["width"], a = p["a"], b = p["b"], h = p["h"];
        (double Node, double LogWeight)[] rule = Hermite(p.WholeNumber("nodes"));
        double[] m = [.. rule.Select(r => width * r.Node)];
        LiteratureModel model = LiteratureModel.Thermal(m.Length, t.Cells, p.Temperature, Energy,
            ("magnetisation", s => s.Sum(k => m[k])), ("square", s => s.Sum(k => Math.Pow(m[k], 2))), ("fourth", s => s.Sum(k => Math.Pow(m[k], 4))));
        return model with { LogMeasure = s => s.Sum(k => rule[k].LogWeight + Math.Log(width)) };

        Complex Energy(int[] s) => s.Sum(k => (a * Math.Pow(m[k], 2)) + (b * Math.Pow(m[k], 4)) - (h * m[k]))
            + ((SquareSpins.Over(t, 1, 0, (i, j) => Math.Pow(m[s[i]] - m[s[j]], 2)) + SquareSpins.Over(t, 0, 1, (i, j) => Math.Pow(m[s[i]] - m[s[j]], 2))) / 2);
    }

    // M. Abramowitz, I. A. Stegun, Handbook of Mathematical Functions (1964), 25.4.46: w = 2^(n-1) n! sqrt(pi) / (n H_(n-1)(x))^2 at the zeros x of H_n; returned is ln w + x^2.
    private static (double Node, double LogWeight)[] Hermite(int n)
    {
        double factor = Math.Pow(2, n - 1) * Enumerable.Range(1, n).Aggregate(1.0, static (f, k) => f * k) * Math.Sqrt(Math.PI);
        var zeros = new List<double>();
        const double Step = 0.0103;
        for (double x = -5; x < 5; x += Step)
        {
            if (Polynomial(n, x) * Polynomial(n, x + Step) <= 0)
                zeros.Add(Zero(n, x, x + Step));
        }
        Assert.Equal(n, zeros.Count);
        return [.. zeros.Select(x => (x, Math.Log(factor / Math.Pow(n * Polynomial(n - 1, x), 2)) + (x * x)))];
    }

    private static double Zero(int n, double low, double high)
    {
        for (int i = 0; i < 60; i++)
        {
            double middle = (low + high) / 2;
            (low, high) = Polynomial(n, low) * Polynomial(n, middle) <= 0 ? (low, middle) : (middle, high);
        }
        return (low + high) / 2;
    }

    private static double Polynomial(int n, double x) => n < 2 ? Math.Pow(2 * x, n) : (2 * x * Polynomial(n - 1, x)) - (2 * (n - 1) * Polynomial(n - 2, x));
}
