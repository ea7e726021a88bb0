using TensorRG.Models.Lattices;

namespace TensorRG.Models.Tests.Lattices;

/// <summary>Where the clusters of a torus of lx x ly cells lie, from the positions in <see cref="Cluster"/> alone.</summary>
internal sealed class TorusGeometry(LatticeKind lattice, bool onEdges, int lx, int ly)
{
    /// <summary>Variables of a cell.</summary>
    public int PerCell => (lattice, onEdges) switch
    {
        (LatticeKind.Honeycomb, true) => 3,
        (_, true) or (LatticeKind.Honeycomb, _) => 2,
        (LatticeKind.Kagome, _) => 3,
        _ => 1,
    };

    public int Variables => PerCell * lx * ly;

    private int Site(int x, int y, int kind) => ((((((y % ly) + ly) % ly) * lx) + (((x % lx) + lx) % lx)) * PerCell) + kind;

    /// <summary>The clusters of a kind that belong to cell (x, y), and the sign of a staggered term there.</summary>
    public IEnumerable<(int[] Sites, int Sign)> Clusters(Cluster cluster, int x, int y)
    {
        int sign = (x + y) % 2 == 0 ? 1 : -1;
        int[][] sites = onEdges ? Edges(x, y) : lattice switch
        {
            LatticeKind.Square => [Square(cluster, x, y)],
            LatticeKind.Triangular => [Triangular(cluster, x, y)],
            LatticeKind.Honeycomb => Honeycomb(cluster, x, y),
            _ => Kagome(cluster, x, y),
        };
        return sites.Select((s, i) => (s, lattice == LatticeKind.Honeycomb ? (i == 0 ? 1 : -1) : sign));
    }

    // Edge 0 of a square cell leaves (x, y) to the right, edge 1 downward. Honeycomb: edge j of a cell is the bond in direction j + 1 named by it.
    private int[][] Edges(int x, int y) => lattice == LatticeKind.Square
        ? [[Site(x, y - 1, 1), Site(x - 1, y, 0), Site(x, y, 1), Site(x, y, 0)]]
        : [[Site(x, y, 0), Site(x - 1, y, 1), Site(x, y - 1, 2)], [Site(x, y, 0), Site(x, y, 1), Site(x, y, 2)]];

    private int[] Square(Cluster cluster, int x, int y) => cluster switch
    {
        Cluster.Site => [Site(x, y, 0)],
        Cluster.Bond1 => [Site(x, y, 0), Site(x + 1, y, 0)],
        Cluster.Bond2 => [Site(x, y, 0), Site(x, y + 1, 0)],
        Cluster.Diagonal => [Site(x, y, 0), Site(x + 1, y + 1, 0)],
        Cluster.Antidiagonal => [Site(x + 1, y, 0), Site(x, y + 1, 0)],
        Cluster.Face => [Site(x, y, 0), Site(x + 1, y, 0), Site(x + 1, y + 1, 0), Site(x, y + 1, 0)],
        _ => throw new ArgumentOutOfRangeException(nameof(cluster)),
    };

    private int[] Triangular(Cluster cluster, int x, int y) => cluster switch
    {
        Cluster.Site => [Site(x, y, 0)],
        Cluster.Bond1 => [Site(x, y, 0), Site(x + 1, y, 0)],
        Cluster.Bond2 => [Site(x, y, 0), Site(x, y + 1, 0)],
        Cluster.Bond3 => [Site(x, y, 0), Site(x + 1, y + 1, 0)],
        Cluster.UpTriangle => [Site(x, y, 0), Site(x, y + 1, 0), Site(x + 1, y + 1, 0)],
        Cluster.DownTriangle => [Site(x, y, 0), Site(x + 1, y, 0), Site(x + 1, y + 1, 0)],
        _ => throw new ArgumentOutOfRangeException(nameof(cluster)),
    };

    private int[][] Honeycomb(Cluster cluster, int x, int y) => cluster switch
    {
        Cluster.Site => [[Site(x, y, 0)], [Site(x, y, 1)]],
        Cluster.Bond1 => [[Site(x, y, 0), Site(x, y, 1)]],
        Cluster.Bond2 => [[Site(x + 1, y, 0), Site(x, y, 1)]],
        Cluster.Bond3 => [[Site(x, y + 1, 0), Site(x, y, 1)]],
        _ => throw new ArgumentOutOfRangeException(nameof(cluster)),
    };

    private int[][] Kagome(Cluster cluster, int x, int y) => cluster switch
    {
        Cluster.Site => [[Site(x, y, 0)], [Site(x, y, 1)], [Site(x, y, 2)]],
        Cluster.Bond1 => [[Site(x, y, 0), Site(x, y, 1)], [Site(x, y, 1), Site(x + 1, y, 0)]],
        Cluster.Bond2 => [[Site(x, y, 0), Site(x, y, 2)], [Site(x, y, 2), Site(x, y + 1, 0)]],
        Cluster.Bond3 => [[Site(x, y, 1), Site(x, y, 2)], [Site(x - 1, y, 1), Site(x, y - 1, 2)]],
        Cluster.UpTriangle => [[Site(x, y, 0), Site(x, y, 1), Site(x, y, 2)]],
        Cluster.DownTriangle => [[Site(x, y, 0), Site(x - 1, y, 1), Site(x, y - 1, 2)]],
        _ => throw new ArgumentOutOfRangeException(nameof(cluster)),
    };
}
