namespace TensorRG.Models.Lattices.Forms;

/// <summary>Chooses the form, or checks the one asked for.</summary>
internal static class FormChoice
{
    /// <summary>Largest number of elements that a tensor or a table of configurations may have.</summary>
    public const long MaxElements = 1L << 27;

    /// <summary>The form to build, and why.</summary>
    /// <param name="system">The system.</param>
    /// <param name="asked">The form asked for.</param>
    /// <param name="used">Clusters of all terms that must be held.</param>
    /// <exception cref="ModelException">No form holds the terms, or the one asked for does not.</exception>
    public static (VertexForm Form, string Why) Choose(LatticeSystem system, NetworkForm asked, IReadOnlyCollection<Cluster> used)
    {
        (NetworkForm form, string why) = asked == NetworkForm.Auto ? Automatic(system, used) : (asked, $"The {Name(asked)} form was asked for.");
        VertexForm found = FormCatalogue.Find(system.Lattice, system.OnEdges, form)
            ?? throw new ModelException(
                $"The {Name(form)} form does not exist for {(system.OnEdges ? "variables on the edges" : "sites")} of the {Lower(system.Lattice)} lattice; use the form 'auto'.");
        Cluster[] missing = [.. used.Where(c => found.Placements.All(p => p.Cluster != c))];
        if (missing.Length > 0)
        {
            string remedy = asked == NetworkForm.Auto ? "put the term on another cluster of this lattice" : "use the form 'auto'";
            throw new ModelException($"The {Name(form)} form of the {Lower(system.Lattice)} lattice has no {string.Join(", ", missing)} terms; {remedy}.");
        }
        if (Math.Pow(system.States, found.Variables) > MaxElements)
            throw TooLarge($"The table of a vertex with {system.States} states", Math.Pow(system.States, found.Variables), "use fewer states");
        return (found, why);
    }

    /// <summary>The other forms that hold the terms and surely fit, in the order of <see cref="NetworkForm"/>.</summary>
    /// <param name="system">The system.</param>
    /// <param name="chosen">The form that is not listed.</param>
    /// <param name="used">Clusters of all terms that must be held.</param>
    public static IEnumerable<NetworkForm> Others(LatticeSystem system, NetworkForm chosen, IReadOnlyCollection<Cluster> used)
        => Enum.GetValues<NetworkForm>().Where(form => form != NetworkForm.Auto && form != chosen
            && FormCatalogue.Find(system.Lattice, system.OnEdges, form) is { } found
            && used.All(c => found.Placements.Any(p => p.Cluster == c))
            && Math.Pow(system.States, Math.Max(found.Variables, 2 * (found.Up.Length + found.Left.Length))) <= MaxElements);

    /// <summary>An exception for what does not fit in memory.</summary>
    /// <param name="what">What does not fit.</param>
    /// <param name="elements">Its number of elements of 16 bytes.</param>
    /// <param name="remedy">What helps.</param>
    public static ModelException TooLarge(string what, double elements, string remedy)
        => new(FormattableString.Invariant($"{what} needs {elements * 16 / (1L << 30):G3} GB; {remedy}."));

    /// <summary>The form's name as people read it.</summary>
    public static string Name(NetworkForm form) => form switch
    {
        NetworkForm.Auto => "auto",
        NetworkForm.Bond => "bond",
        NetworkForm.Face => "face",
        NetworkForm.Row => "row",
        NetworkForm.Triangles => "triangles",
        _ => "vertex",
    };

    private static string Lower(LatticeKind lattice) => lattice switch
    {
        LatticeKind.Square => "square",
        LatticeKind.Triangular => "triangular",
        LatticeKind.Honeycomb => "honeycomb",
        _ => "kagome",
    };

    private static (NetworkForm Form, string Why) Automatic(LatticeSystem system, IReadOnlyCollection<Cluster> used)
    {
        if (system.OnEdges)
            return (NetworkForm.Vertex, "The vertex form: the variables sit on the edges, which are the legs.");
        if (system.Lattice == LatticeKind.Kagome)
            return (NetworkForm.Triangles, "The triangles form: the lattice is made of pairs of triangles that share sites.");
        if (system.Lattice == LatticeKind.Honeycomb)
            return (NetworkForm.Bond, "The bond form: terms on sites and nearest neighbours split with the fewest states a leg.");
        if (system.Lattice == LatticeKind.Square && used.All(static c => c is Cluster.Site or Cluster.Bond1 or Cluster.Bond2))
            return (NetworkForm.Bond, "The bond form: terms on sites and nearest neighbours split with the fewest states a leg.");
        return Math.Pow(system.States, 8) > MaxElements
            ? (NetworkForm.Row, "The row form: terms reach across a face, and the face form would be too large for so many states.")
            : (NetworkForm.Face, "The face form: terms reach across a face, and sharing the energy of an edge between its faces relieves frustration.");
    }
}
