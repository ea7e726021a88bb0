using System.Numerics;
using TensorRG.Models.Lattices;

namespace TensorRG.Models.Tests.Lattices;

/// <summary>Compares the network of a system with the sum over all configurations.</summary>
internal static class NetworkCheck
{
    private const double Tolerance = 1e-12;

    // Configurations, and steps of the contraction, that a test may take.
    private const double MaxConfigurations = 1 << 13;

    private const double MaxSteps = 5e6;

    /// <summary>Builds and compares ln Z, the phase, and the first two moments of the observables on a torus of lx x ly vertices.</summary>
    public static ModelNetwork Torus(LatticeSystem system, NetworkOptions options, int lx, int ly)
    {
        ModelNetwork built = NetworkBuilder.Build(system, options);
        if (IsSmall(built, system, lx, ly))
            Compare(built, system, options, lx, ly);
        return built;
    }

    /// <summary>True if the direct sum and the contraction are short enough to be made.</summary>
    public static bool IsSmall(ModelNetwork built, LatticeSystem system, int lx, int ly)
    {
        double v = built.Network.VerticalBond.Length, h = built.Network.HorizontalBond.Length;
        double perCell = system.OnEdges ? (system.Lattice == LatticeKind.Honeycomb ? 3 : 2) : system.SitesPerCell;
        double cells = (double)lx * ly * built.Network.SitesPerVertex / system.SitesPerCell;
        double steps = (h * h * h * Math.Pow(v, 2 * lx)) + Math.Pow(v, 3 * lx);
        return Math.Pow(system.States, perCell * cells) <= MaxConfigurations && steps * lx * ly * lx * ly <= MaxSteps;
    }

    public static void Compare(ModelNetwork built, LatticeSystem system, NetworkOptions options, int lx, int ly)
    {
        int block = built.Network.SitesPerVertex == 4 * system.SitesPerCell ? 2 : 1;
        var oracle = new TorusOracle(system, options, block * lx, block * ly);
        var torus = new ComplexTorus(built.Network, lx, ly);
        if (double.IsNegativeInfinity(oracle.LogScale))
        {
            Near(0, torus.Contract((_, _) => torus.Vertex), 1, "Z of a torus that allows nothing");
            return;
        }
        double factor = Math.Exp((lx * ly * built.Network.LogPrefactor) - oracle.LogScale);
        Near(oracle.Z, factor * torus.Contract((_, _) => torus.Vertex), oracle.Scale, "Z");
        for (int i = 0; i < options.Observables.Length; i++)
        {
            Impurity impurity = built.Impurities[i];
            Complex[] first = torus.Dense((u, l, d, r) => impurity.Element(1, u, l, d, r)), second = torus.Dense((u, l, d, r) => impurity.Element(2, u, l, d, r));
            Near(oracle.Moments[i].First, factor * torus.One(first), Math.Max(oracle.Scale, oracle.MomentScales[i].First), impurity.Name);
            Near(oracle.Moments[i].Second, factor * (torus.One(second) + torus.Two(first)), Math.Max(oracle.Scale, oracle.MomentScales[i].Second), impurity.Name + "^2");
        }
    }

    private static void Near(Complex expected, Complex actual, double scale, string what)
        => Assert.True(Complex.Abs(expected - actual) <= Tolerance * scale, $"{what}: {expected} expected, {actual} found, scale {scale:R}, off by {Complex.Abs(expected - actual) / scale:E2}.");
}
