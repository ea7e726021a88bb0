using System.Numerics;
using TensorRG.Tensors;

namespace TensorRG.CoarseGraining.Tests;

/// <summary>The oracle of the contract tests against things known without it.</summary>
public sealed class TorusTests
{
    /// <summary>Z = sum over configurations, written out: two vertices, each the right, left, upper and lower neighbour of the other.</summary>
    [Fact]
    public void The_tilted_torus_of_two_vertices_is_the_explicit_sum()
    {
        Tensor<double> a = new RandomSite(1).Positive<double>(SiteKind.Oblong);
        double sum = 0;
        for (int u = 0; u < 2; u++)
        {
            for (int d = 0; d < 2; d++)
            {
                for (int l = 0; l < 3; l++)
                {
                    for (int r = 0; r < 3; r++)
                        sum += a.At(u, l, d, r) * a.At(d, r, u, l);
                }
            }
        }

        SchemeCase.Near(sum, Torus.After(1, 1).Z(a).Value.Real, 1e-14, "Z");
    }

    /// <summary>Ising: Z of the 2 x 2 torus is 2 e^{8K} + 12 + 2 e^{-8K} (each pair of neighbours is joined twice).</summary>
    [Fact]
    public void The_two_by_two_Ising_torus_has_its_textbook_value()
    {
        const double K = 0.3;
        Tensor<double> a = Sites.Ising(K);
        SchemeCase.Near((2 * Math.Exp(8 * K)) + 12 + (2 * Math.Exp(-8 * K)), new Torus(2, 2, 0).Z(a).Value.Real, 1e-14, "Z");
    }

    /// <summary>A shift by all columns is none, and a torus on its side is the torus of the turned tensor.</summary>
    [Fact]
    public void Equal_tori_have_equal_sums()
    {
        Tensor<Complex> a = new RandomSite(2).Signed<Complex>(SiteKind.Oblong), turned = a.Permute(1, 0, 3, 2);
        Check(new Torus(3, 2, 0), a, new Torus(3, 2, 3), a);
        Check(new Torus(3, 2, 0), a, new Torus(2, 3, 0), turned);
        Check(new Torus(4, 2, 2), a, new Torus(4, 2, 2), turned);
    }

    private static void Check(Torus first, Tensor<Complex> a, Torus second, Tensor<Complex> b)
    {
        (Complex x, double scale) = first.Z(a);
        SchemeCase.Near(x, second.Z(b).Value, scale, 1e-14, $"{first} and {second}");
    }
}
