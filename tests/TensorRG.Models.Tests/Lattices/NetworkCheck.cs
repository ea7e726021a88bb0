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

    /// <summary>Builds and compares ln Z, the phase, and moments of the observables on a torus of lx x ly vertices.</summary>
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
        int block = Block(built, system), variables = new TorusGeometry(system.Lattice, system.OnEdges, block * lx, block * ly).Variables;
        double steps = (h * h * h * Math.Pow(v, 2 * lx)) + Math.Pow(v, 3 * lx);
        return Math.Pow(system.States, variables) <= MaxConfigurations && steps * lx * ly * lx * ly <= MaxSteps;
    }

    // powers is the highest power of an observable on two to four vertices: on one it is always four, on more at most two.
    public static void Compare(ModelNetwork built, LatticeSystem system, NetworkOptions options, int lx, int ly, int powers = TorusOracle.HighestPower)
    {
        int block = Block(built, system);
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
            int highest = (lx * ly) switch { 1 => TorusOracle.HighestPower, <= 4 => powers, _ => Math.Min(2, powers) };
            Complex[][] tensors = Powers(torus, impurity, highest);
            for (int n = 1; n <= highest; n++)
                Near(oracle.Moments[i][n], factor * torus.Moment(tensors, n), Math.Max(oracle.Scale, oracle.MomentScales[i][n]), $"{impurity.Name}^{n}");
        }
    }

    // The vertex with powers 0 to n of an observable put in.
    private static Complex[][] Powers(ComplexTorus torus, Impurity impurity, int n)
        => [torus.Vertex, .. Enumerable.Range(1, n).Select(k => torus.Dense((u, l, d, r) => impurity.Element(k, u, l, d, r)))];

    // Cells along the side of a vertex.
    private static int Block(ModelNetwork built, LatticeSystem system) => built.Network.SitesPerVertex == 4 * system.SitesPerCell ? 2 : 1;

    private static void Near(Complex expected, Complex actual, double scale, string what)
        => Assert.True(Complex.Abs(expected - actual) <= Tolerance * scale, $"{what}: {expected} expected, {actual} found, scale {scale:R}, off by {Complex.Abs(expected - actual) / scale:E2}.");
}
