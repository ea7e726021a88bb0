using System.Collections.Immutable;
using TensorRG.Models.Lattices;

namespace TensorRG.Cli.Explanations;

/// <summary>Clusters of the lattices in words.</summary>
internal static class ClusterWords
{
    /// <summary>Several clusters at once; all bonds are "bond", and so on.</summary>
    public static string Of(LatticeKind lattice, Cluster[] clusters)
    {
        Cluster[] bonds = lattice == LatticeKind.Square ? [Cluster.Bond1, Cluster.Bond2] : [Cluster.Bond1, Cluster.Bond2, Cluster.Bond3];
        var rest = new List<Cluster>(clusters);
        var words = new List<string>();
        Take(rest, words, "bond", bonds);
        Take(rest, words, "diagonal", Cluster.Diagonal, Cluster.Antidiagonal);
        Take(rest, words, "triangle", Cluster.UpTriangle, Cluster.DownTriangle);
        words.AddRange(rest.Select(c => One(lattice, c)));
        return string.Join(", ", words);
    }

    /// <summary>Names of the places in a cluster, as in model files.</summary>
    public static ImmutableArray<string> Places(LatticeKind lattice, Cluster cluster) => cluster switch
    {
        Cluster.Site => ["i"],
        Cluster.UpTriangle or Cluster.DownTriangle => ["i", "j", "k"],
        Cluster.Face => ["i", "j", "k", "l"],
        Cluster.Vertex => lattice == LatticeKind.Honeycomb ? ["e_1", "e_2", "e_3"] : ["up", "left", "down", "right"],
        _ => ["i", "j"],
    };

    private static void Take(List<Cluster> rest, List<string> words, string word, params Cluster[] all)
    {
        if (!all.All(rest.Contains))
            return;
        rest.RemoveAll(all.Contains);
        words.Add(word);
    }

    private static string One(LatticeKind lattice, Cluster cluster) => cluster switch
    {
        Cluster.Site => "site",
        Cluster.Bond1 => lattice == LatticeKind.Square ? "horizontal bond" : "bond 1",
        Cluster.Bond2 => lattice == LatticeKind.Square ? "vertical bond" : "bond 2",
        Cluster.Bond3 => "bond 3",
        Cluster.Diagonal => "diagonal down-right",
        Cluster.Antidiagonal => "diagonal down-left",
        Cluster.Face => "face",
        Cluster.UpTriangle => "up-triangle",
        Cluster.DownTriangle => "down-triangle",
        _ => "vertex",
    };
}
