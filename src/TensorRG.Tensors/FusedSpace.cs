using System.Collections.Immutable;

namespace TensorRG.Tensors;

/// <summary>
/// Several legs read as one: for each total charge (ingoing minus outgoing) the combinations of sectors that have it,
/// in lexicographic order, laid one after another.
/// </summary>
internal sealed class FusedSpace
{
    private readonly Dictionary<Charge, int> _index;

    public FusedSpace(AbelianGroup group, ImmutableArray<Leg> legs)
    {
        Group = group;
        Legs = legs;
        var found = new SortedDictionary<Charge, Part>();
        int count = 1;
        foreach (Leg leg in legs)
            count *= leg.Sectors.Length;
        int[] sectors = new int[legs.Length];
        for (int k = 0; k < count; k++)
        {
            Charge charge = Charge.Zero;
            int dimension = 1;
            for (int axis = 0; axis < sectors.Length; axis++)
            {
                charge = group.Add(charge, legs[axis].SignedCharge(sectors[axis]));
                dimension = checked(dimension * legs[axis].Sectors[sectors[axis]].Dimension);
            }

            if (!found.TryGetValue(charge, out Part? part))
                found.Add(charge, part = new Part(charge));
            part.Add([.. sectors], dimension);
            for (int axis = sectors.Length - 1; axis >= 0 && ++sectors[axis] == legs[axis].Sectors.Length; axis--)
                sectors[axis] = 0;
        }

        Parts = [.. found.Values];
        _index = new Dictionary<Charge, int>(Parts.Length);
        for (int i = 0; i < Parts.Length; i++)
            _index.Add(Parts[i].Charge, i);
    }

    public AbelianGroup Group { get; }

    public ImmutableArray<Leg> Legs { get; }

    /// <summary>One part a total charge, in ascending order of charge.</summary>
    public ImmutableArray<Part> Parts { get; }

    /// <summary>The part with a total charge, or null.</summary>
    public Part? Find(Charge charge) => _index.TryGetValue(charge, out int i) ? Parts[i] : null;

    /// <summary>The space as a single leg: ingoing with the total charges, or outgoing with the opposite ones.</summary>
    public Leg ToLeg(Arrow arrow)
        => new(Group, arrow, Parts.Select(p => new Sector(arrow == Arrow.In ? p.Charge : Group.Negate(p.Charge), p.Dimension)));

    /// <summary>All combinations of sectors with one total charge.</summary>
    internal sealed class Part(Charge charge)
    {
        private readonly List<int[]> _combinations = [];
        private readonly List<int> _offsets = [];
        private readonly List<int> _dimensions = [];

        public Charge Charge { get; } = charge;

        public int Dimension { get; private set; }

        public int Count => _combinations.Count;

        /// <summary>Sector index of each leg in a combination.</summary>
        public int[] Sectors(int combination) => _combinations[combination];

        /// <summary>Position of the first state of a combination within the part.</summary>
        public int Offset(int combination) => _offsets[combination];

        /// <summary>Number of states of a combination.</summary>
        public int Size(int combination) => _dimensions[combination];

        public void Add(int[] sectors, int dimension)
        {
            _combinations.Add(sectors);
            _offsets.Add(Dimension);
            _dimensions.Add(dimension);
            Dimension = checked(Dimension + dimension);
        }
    }
}
