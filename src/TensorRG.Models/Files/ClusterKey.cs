using System.Collections.Immutable;
using TensorRG.Models.Lattices;

namespace TensorRG.Models.Files;

/// <summary>A key of [energy], [weight], [require] or an observable: where its term sits.</summary>
/// <param name="Name">The key.</param>
/// <param name="Clusters">The clusters on which the term counts.</param>
/// <param name="Legs">Names of the places in a cluster: indices of sites, or legs of a vertex.</param>
internal sealed record ClusterKey(string Name, ImmutableArray<Cluster> Clusters, ImmutableArray<string> Legs)
{
    /// <summary>Indices of the sites of a cluster.</summary>
    public static ImmutableArray<string> Indices { get; } = ["i", "j", "k", "l"];

    /// <summary>The keys of a lattice with variables on its sites.</summary>
    /// <param name="lattice">The lattice.</param>
    public static ImmutableArray<ClusterKey> Of(LatticeKind lattice)
    {
        ImmutableArray<ClusterKey> bonds = [Key("site", 1, Cluster.Site), .. Bonds(lattice == LatticeKind.Square ? 2 : 3)];
        return lattice switch
        {
            LatticeKind.Square =>
            [
                .. bonds,
                Key("diagonal", 2, Cluster.Diagonal, Cluster.Antidiagonal),
                Key("diagonal_1", 2, Cluster.Diagonal),
                Key("diagonal_2", 2, Cluster.Antidiagonal),
                Key("face", 4, Cluster.Face),
            ],
            LatticeKind.Triangular or LatticeKind.Kagome =>
            [
                .. bonds,
                Key("triangle", 3, Cluster.UpTriangle, Cluster.DownTriangle),
                Key("triangle_up", 3, Cluster.UpTriangle),
                Key("triangle_down", 3, Cluster.DownTriangle),
            ],
            _ => bonds,
        };
    }

    /// <summary>The one key of a lattice with variables on its edges.</summary>
    /// <param name="lattice">The lattice.</param>
    public static ClusterKey Vertex(LatticeKind lattice) => new(
        "vertex",
        [Cluster.Vertex],
        lattice == LatticeKind.Honeycomb ? ["e_1", "e_2", "e_3"] : ["up", "left", "down", "right"]);

    private static ImmutableArray<ClusterKey> Bonds(int directions)
    {
        Cluster[] all = [Cluster.Bond1, Cluster.Bond2, Cluster.Bond3];
        return [Key("bond", 2, [.. all[..directions]]), .. all[..directions].Select((c, n) => Key(FormattableString.Invariant($"bond_{n + 1}"), 2, c))];
    }

    private static ClusterKey Key(string name, int sites, params ImmutableArray<Cluster> clusters) => new(name, clusters, Indices[..sites]);
}
