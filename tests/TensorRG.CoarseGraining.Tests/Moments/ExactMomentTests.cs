using System.Numerics;
using TensorRG.CoarseGraining.Moments;
using TensorRG.Tensors;

namespace TensorRG.CoarseGraining.Tests.Moments;

/// <summary>Moments without truncation on small tori against sums over all configurations.</summary>
public sealed class ExactMomentTests
{
    private const int Uncut = 300;
    private const double Bound = 1e-12;

    /// <summary>2 x 2, 2 x 4 (two columns, four rows) and 4 x 4 sites, at, below and above the critical coupling.</summary>
    [Theory]
    [InlineData(true)]
    [InlineData(false)]
    public void Magnetisation_and_energy_of_small_Ising_tori_are_exact(bool graded)
    {
        foreach (double coupling in (double[])[0.5, Sites.CriticalCoupling, 1 / 3.0])
        {
            MomentFlow<double> flow = MomentCase.Run(
                Sites.Ising(coupling, graded), [MomentCase.Spin(coupling, graded), MomentCase.Energy(coupling, graded)], Uncut, 4);
            foreach (MomentRecord record in flow.Records.Skip(2))
            {
                (int columns, int rows) = Size(record);
                Compare(MomentCase.Sum(columns, rows, coupling, 0, static (s, _, _) => s), record, 0);
                Compare(MomentCase.Sum(columns, rows, coupling, 0, static (s, u, l) => -s * (u + l)), record, 1);
            }
        }
    }

    /// <summary>A network without any reflection symmetry, a field that gives odd moments, and an observable of three spins.</summary>
    [Fact]
    public void Functions_of_a_spin_and_its_neighbours_are_exact_with_the_spin_on_the_legs()
    {
        const double K = 0.35, H = 0.08;
        foreach (Func<int, int, int, double> o in (Func<int, int, int, double>[])[static (s, _, _) => s, static (s, u, l) => (s * u) + (0.3 * l) - (0.7 * s * u * l)])
        {
            Tensor<double> site = MomentCase.OnLegs(K, H, o, 0);
            Tensor<double>[] insertions = [.. Enumerable.Range(1, 4).Select(n => MomentCase.OnLegs(K, H, o, n))];
            foreach (MomentRecord record in MomentCase.Run(site, [insertions], Uncut, 4).Records.Skip(2))
            {
                (int columns, int rows) = Size(record);
                Compare(MomentCase.Sum(columns, rows, K, H, o), record, 0);
            }
        }
    }

    /// <summary>
    /// Any vertex tensors in place of powers: &lt;O^n&gt; Z = n! [x^n] of the torus of sum_k x^k T^(k) / k!, read off the values of that polynomial at roots of unity.
    /// </summary>
    [Fact]
    public void Arbitrary_insertions_on_arbitrary_bonds_follow_the_product_rule()
    {
        foreach (SiteKind kind in Enum.GetValues<SiteKind>())
        {
            CheckRandom<double>(kind, 31, 3);
            CheckRandom<Complex>(kind, 32, 4);
        }
    }

    private static void CheckRandom<T>(SiteKind kind, int seed, int order)
        where T : unmanaged, INumberBase<T>
    {
        var random = new RandomSite(seed);
        Tensor<T>[] tensors = [.. Enumerable.Range(0, order + 1).Select(_ => random.Positive<T>(kind))];
        const double SitesPerTensor = 3;
        MomentFlow<T> flow = MomentCase.Run(tensors[0], [tensors[1..]], Uncut, 3, sitesPerTensor: SitesPerTensor);
        foreach (MomentRecord record in flow.Records)
        {
            var torus = Torus.After(record.Step, record.AspectRatio);
            Assert.Equal(torus.Vertices * SitesPerTensor, record.Sites);
            Complex[] sums = Coefficients(tensors, torus, order);
            double scale = 1;
            for (int n = 1; n <= order; n++)
            {
                scale *= n / record.Sites;
                Complex expected = sums[n] / sums[0] * scale;
                SchemeCase.Near(expected, record.Moments[0][n - 1], expected.Magnitude, 1e-11, $"{kind} moment {n} on {torus}");
            }
        }
    }

    /// <summary>Coefficients of x^0 .. x^order of Z(x), whose degree is order times the vertices.</summary>
    private static Complex[] Coefficients<T>(Tensor<T>[] tensors, Torus torus, int order)
        where T : unmanaged, INumberBase<T>
    {
        int points = (order * torus.Vertices) + 1;
        var result = new Complex[order + 1];
        for (int j = 0; j < points; j++)
        {
            var x = Complex.FromPolarCoordinates(1, 2 * Math.PI * j / points);
            Complex z = torus.Z(Generating(tensors, x)).Value;
            for (int n = 0; n <= order; n++)
                result[n] += z * Complex.FromPolarCoordinates(1.0 / points, -2 * Math.PI * j * n / points);
        }

        return result;
    }

    private static Tensor<Complex> Generating<T>(Tensor<T>[] tensors, Complex x)
        where T : unmanaged, INumberBase<T>
        => Tensor<Complex>.FromFunction(tensors[0].Legs, p =>
        {
            Complex sum = Complex.Zero, factor = Complex.One;
            for (int k = 0; k < tensors.Length; factor *= x / ++k)
                sum += factor * Scalar.ToComplex(tensors[k].At(p.Span));
            return sum;
        });

    private static (int Columns, int Rows) Size(MomentRecord record)
    {
        var torus = Torus.After(record.Step, record.AspectRatio);
        return (torus.Columns, torus.Rows);
    }

    private static void Compare(double[] expected, MomentRecord record, int observable)
    {
        Complex[] central = MomentCase.Central([.. expected.Select(static m => (Complex)m)]);
        for (int n = 1; n <= 4; n++)
        {
            string what = FormattableString.Invariant($"moment {n} of observable {observable} on {record.Sites} sites");
            SchemeCase.Near(expected[n - 1], record.Moments[observable][n - 1], Math.Max(Math.Abs(expected[n - 1]), 1e-3), Bound, what);
            SchemeCase.Near(central[n - 1], record.CentralMoments[observable][n - 1], 1, Bound, "central " + what);
        }
    }
}
