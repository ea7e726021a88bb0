namespace TensorRG.Models.Lattices.Forms;

/// <summary>The forms of each lattice, written out.</summary>
internal static class FormCatalogue
{
    /// <summary>The vertex of one form, or null where the lattice does not have it.</summary>
    public static VertexForm? Find(LatticeKind lattice, bool onEdges, NetworkForm form) => (lattice, onEdges, form) switch
    {
        (LatticeKind.Square, true, NetworkForm.Vertex) => SquareEdges(),
        (LatticeKind.Honeycomb, true, NetworkForm.Vertex) => HoneycombEdges(),
        (_, true, _) => null,
        (LatticeKind.Square, false, NetworkForm.Bond) => SquareBond(),
        (LatticeKind.Honeycomb, false, NetworkForm.Bond) => HoneycombBond(),
        (LatticeKind.Square or LatticeKind.Triangular, false, NetworkForm.Face) => Face(lattice),
        (LatticeKind.Square or LatticeKind.Triangular, false, NetworkForm.Row) => Row(lattice),
        (LatticeKind.Kagome, false, NetworkForm.Triangles) => Triangles(),
        _ => null,
    };

    // Variables: s, the one above, the one to the left. Half of a site's weight goes to its neighbours below and to the right, so that
    // every vertex of an ordered state weighs the same and nothing underflows; then the vertex is a product of two symmetric bond weights.
    private static VertexForm SquareBond() => new()
    {
        Form = NetworkForm.Bond,
        Sites = 1,
        Outer = 3,
        Up = [1],
        Left = [2],
        Down = [0],
        Right = [0],
        Placements =
        [
            new(Cluster.Site, [0], 0.5, 1, 1),
            new(Cluster.Site, [1], 0.25, 0, -1, false),
            new(Cluster.Site, [2], 0.25, 0, -1, false),
            new(Cluster.Bond1, [2, 0], 1, 1, -1),
            new(Cluster.Bond2, [1, 0], 1, 1, -1),
        ],
        VerticalWeight = [new(Cluster.Bond2, [0, 1], 1, 0, -1), new(Cluster.Site, [0], 0.25, 0, -1, false), new(Cluster.Site, [1], 0.25, 0, 1, false)],
        HorizontalWeight = [new(Cluster.Bond1, [0, 1], 1, 0, -1), new(Cluster.Site, [0], 0.25, 0, -1, false), new(Cluster.Site, [1], 0.25, 0, 1, false)],
    };

    // Variables: b, b of the cell above, b of the cell to the left; inner: a. The weight of b is shared by the three cells that see it.
    private static VertexForm HoneycombBond()
    {
        const double Third = 1.0 / 3;
        return new()
        {
            Form = NetworkForm.Bond,
            Sites = 2,
            Outer = 3,
            Inner = 1,
            Up = [1],
            Left = [2],
            Down = [0],
            Right = [0],
            Placements =
            [
                new(Cluster.Site, [3], 1, 1, 1),
                new(Cluster.Site, [0], Third, 1, -1),
                new(Cluster.Site, [1], Third, 0, -1, false),
                new(Cluster.Site, [2], Third, 0, -1, false),
                new(Cluster.Bond1, [3, 0], 1, 1, 1),
                new(Cluster.Bond2, [3, 2], 1, 1, 1),
                new(Cluster.Bond3, [3, 1], 1, 1, 1),
            ],
            VerticalWeight = [new(Cluster.Bond3, [1, 0], 1, 0, 1), new(Cluster.Site, [0], Third, 0, -1, false), new(Cluster.Site, [1], Third, 0, 1, false)],
            HorizontalWeight = [new(Cluster.Bond2, [1, 0], 1, 0, 1), new(Cluster.Site, [0], Third, 0, -1, false), new(Cluster.Site, [1], Third, 0, 1, false)],
        };
    }

    private static VertexForm Face(LatticeKind lattice) => new()
    {
        Form = NetworkForm.Face,
        Sites = 1,
        Outer = 4,
        Up = [0, 1],
        Left = [0, 2],
        Down = [2, 3],
        Right = [1, 3],
        Placements = Corners(lattice),
    };

    private static VertexForm Row(LatticeKind lattice) => new()
    {
        Form = NetworkForm.Row,
        Sites = 1,
        Outer = 4,
        Up = [1],
        Left = [2, 0],
        Down = [3],
        Right = [3, 1],
        Placements = Corners(lattice),
    };

    // Variables: the corners nw = (x, y), ne = (x + 1, y), sw = (x, y + 1), se = (x + 1, y + 1) of the face of cell (x, y).
    private static Placement[] Corners(LatticeKind lattice)
    {
        const int Nw = 0, Ne = 1, Sw = 2, Se = 3;
        Placement[] shared =
        [
            new(Cluster.Site, [Nw], 0.25, 0.25, 1),
            new(Cluster.Site, [Ne], 0.25, 0.25, -1, false),
            new(Cluster.Site, [Sw], 0.25, 0.25, -1, false),
            new(Cluster.Site, [Se], 0.25, 0.25, 1, false),
            new(Cluster.Bond1, [Nw, Ne], 0.5, 0.5, 1),
            new(Cluster.Bond1, [Sw, Se], 0.5, 0.5, -1, false),
            new(Cluster.Bond2, [Nw, Sw], 0.5, 0.5, 1),
            new(Cluster.Bond2, [Ne, Se], 0.5, 0.5, -1, false),
        ];
        Placement[] own = lattice == LatticeKind.Square
            ? [
                new(Cluster.Diagonal, [Nw, Se], 1, 1, 1),
                new(Cluster.Antidiagonal, [Ne, Sw], 1, 1, 1),
                new(Cluster.Face, [Nw, Ne, Se, Sw], 1, 1, 1),
            ]
            : [
                new(Cluster.Bond3, [Nw, Se], 1, 1, 1),
                new(Cluster.UpTriangle, [Nw, Sw, Se], 1, 1, 1),
                new(Cluster.DownTriangle, [Nw, Ne, Se], 1, 1, 1),
            ];
        return [.. shared, .. own];
    }

    // Variables: b, c of the cell, b' of the cell to the left, c' of the cell above; inner: a. Weights of sites b and c are shared with the next cell.
    private static VertexForm Triangles() => new()
    {
        Form = NetworkForm.Triangles,
        Sites = 3,
        Outer = 4,
        Inner = 1,
        Up = [3],
        Left = [2],
        Down = [1],
        Right = [0],
        Placements =
        [
            new(Cluster.Site, [4], 1, 1, 1),
            new(Cluster.Site, [0], 0.5, 1, 1),
            new(Cluster.Site, [2], 0.5, 0, -1, false),
            new(Cluster.Site, [1], 0.5, 1, 1),
            new(Cluster.Site, [3], 0.5, 0, -1, false),
            new(Cluster.Bond1, [4, 0], 1, 1, 1),
            new(Cluster.Bond1, [2, 4], 1, 1, -1),
            new(Cluster.Bond2, [4, 1], 1, 1, 1),
            new(Cluster.Bond2, [3, 4], 1, 1, -1),
            new(Cluster.Bond3, [0, 1], 1, 1, 1),
            new(Cluster.Bond3, [2, 3], 1, 1, 1),
            new(Cluster.UpTriangle, [4, 0, 1], 1, 1, 1),
            new(Cluster.DownTriangle, [4, 2, 3], 1, 1, 1),
        ],
    };

    // The measure of an edge (no other term sits on one) is shared by the two vertices at its ends.
    private static VertexForm SquareEdges() => new()
    {
        Form = NetworkForm.Vertex,
        Sites = 1,
        Outer = 4,
        Up = [0],
        Left = [1],
        Down = [2],
        Right = [3],
        Placements = [new(Cluster.Vertex, [0, 1, 2, 3], 1, 1, 1), .. Ends()],
    };

    private static VertexForm HoneycombEdges() => new()
    {
        Form = NetworkForm.Vertex,
        Sites = 2,
        Outer = 4,
        Inner = 1,
        Up = [0],
        Left = [1],
        Down = [2],
        Right = [3],
        Placements =
        [
            new(Cluster.Vertex, [4, 1, 0], 1, 1, 1),
            new(Cluster.Vertex, [4, 3, 2], 1, 1, -1),
            new(Cluster.Site, [4], 1, 0, 1),
            .. Ends(),
        ],
    };

    private static IEnumerable<Placement> Ends()
        => Enumerable.Range(0, 4).Select(static leg => new Placement(Cluster.Site, [leg], 0.5, 0, 1, leg < 2));
}
