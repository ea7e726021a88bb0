using System.Collections.Immutable;
using System.Numerics;
using TensorRG.Tensors;
using TensorRG.Tensors.Decompositions;

namespace TensorRG.CoarseGraining.Plaquette;

/// <summary>
/// Splits every vertex tensor along one of its diagonals and joins the four pieces that face each second plaquette:
/// lengths grow by sqrt 2, the lattice turns by 45 degrees (M. Levin, C. P. Nave, Phys. Rev. Lett. 99, 120601 (2007)). With exponent k the
/// pieces take sigma^((1-k)/2) and the new bonds carry weights sigma^k (D. Adachi, T. Okubo, S. Todo, Phys. Rev. B 105, L060402 (2022));
/// k = 0 is the plain scheme.
/// </summary>
/// <remarks>
/// After the first step the network tensor exists only as a ring of pieces [outer leg, bond to the previous piece, bond
/// to the next piece], going round the plaquette: north-west (outer leg: left), north-east (up), south-east (right), south-west (down).
/// </remarks>
/// <typeparam name="T">Element type.</typeparam>
/// <param name="algebra">Contractions and kernels.</param>
/// <param name="settings">The user's choices.</param>
/// <param name="exponent">k.</param>
internal sealed class PlaquetteScheme<T>(TensorAlgebra<T> algebra, SchemeSettings settings, double exponent) : IScheme<T>
    where T : unmanaged, INumberBase<T>
{
    private const string Site = "site";
    private const string NorthWest = "north-west";
    private const string NorthEast = "north-east";
    private const string SouthEast = "south-east";
    private const string SouthWest = "south-west";
    private const string Vertical = "vertical";
    private const string Horizontal = "horizontal";

    private readonly SubspaceSvd<T> _subspace = new(algebra, new SubspaceOptions());

    /// <inheritdoc/>
    public int ShapePeriod => 1;

    /// <inheritdoc/>
    public NetworkState<T> Begin(Tensor<T> site) => NetworkState<T>.Of(Site, site.Permute(1, 0, 3, 2));

    /// <inheritdoc/>
    public CoarseStep<T> Step(NetworkState<T> state, int step)
    {
        TruncatedSvd<T> first, second;
        if (FormsTensor(state))
        {
            using Tensor<T> tensor = Whole(state);
            first = Decompose(tensor, [0, 1], [2, 3], step, 0);
            second = Decompose(tensor, [1, 2], [3, 0], step, 1);
        }
        else
        {
            (first, second) = DecomposeBoth(state, step);
        }

        ImmutableArray<string> notices = [.. first.Truncation.Notices.Union(second.Truncation.Notices)];
        double discarded = Math.Max(first.Truncation.DiscardedFraction, second.Truncation.DiscardedFraction);
        return new CoarseStep<T>(Assemble(state, first, second), discarded, notices);
    }

    /// <inheritdoc/>
    public Tensor<T> TransferMatrix(NetworkState<T> state)
    {
        using Tensor<T> open = HorizontallyClosed(state);
        return state.Weights.TryGetValue(Vertical, out BondWeights? weights) ? TensorAlgebra<T>.ScaleLeg(open, 1, weights) : open.Clone();
    }

    /// <inheritdoc/>
    public NetworkState<T> Rescale(NetworkState<T> state, double factor)
    {
        if (state.Tensors.ContainsKey(Site))
            return state.Rescaled(Site, factor);
        double each = Math.Sqrt(Math.Sqrt(factor));
        foreach (string name in (ReadOnlySpan<string>)[NorthWest, NorthEast, SouthEast, SouthWest])
            state = state.Rescaled(name, each);
        return state;
    }

    /// <inheritdoc/>
    public (Leg Vertical, Leg Horizontal) Bonds(NetworkState<T> state)
        => state.Tensors.TryGetValue(Site, out Tensor<T>? site)
            ? (site.Legs[1], site.Legs[0])
            : (state[NorthEast].Legs[0], state[NorthWest].Legs[0]);

    /// <inheritdoc/>
    public double AspectRatio(int step) => 1;

    private bool FormsTensor(NetworkState<T> state)
        => state.Tensors.ContainsKey(Site) || settings.Decomposition == DecompositionMode.Full;

    /// <summary>T[l, u, r, d].</summary>
    private Tensor<T> Whole(NetworkState<T> state)
    {
        if (state.Tensors.TryGetValue(Site, out Tensor<T>? site))
            return site.Clone();
        using RingMap<T> ring = Ring(state, [NorthWest, NorthEast, SouthEast, SouthWest]);
        return ring.ToTensor();
    }

    private RingMap<T> Ring(NetworkState<T> state, ReadOnlySpan<string> names)
        => new(algebra, state[names[0]], state[names[1]], state[names[2]], state[names[3]]);

    /// <summary>
    /// The two decompositions know nothing of each other: while their matrices are small, each has a thread. Large ones take
    /// turns, for the sake of memory.
    /// </summary>
    private (TruncatedSvd<T> First, TruncatedSvd<T> Second) DecomposeBoth(NetworkState<T> state, int step)
    {
        string[][] names = [[NorthWest, NorthEast, SouthEast, SouthWest], [NorthEast, SouthEast, SouthWest, NorthWest]];
        var results = new TruncatedSvd<T>[2];
        if (PairSize.IsSmall(state[NorthWest], state[NorthEast]))
            algebra.Kernels.RunEach(2, i => results[i] = Decompose(state, names[i], step, i));
        else
            results = [Decompose(state, names[0], step, 0), Decompose(state, names[1], step, 1)];
        return (results[0], results[1]);
    }

    private TruncatedSvd<T> Decompose(NetworkState<T> state, ReadOnlySpan<string> names, int step, int index)
    {
        Tensor<T> a = state[names[0]], b = state[names[1]], c = state[names[2]], d = state[names[3]];
        var random = new RandomSequence(settings.Seed, step, index);
        if (settings.Decomposition == DecompositionMode.Iterative || !PairSize.Fits(a, b, c, d))
        {
            using var ring = new RingMap<T>(algebra, a, b, c, d);
            return _subspace.Compute(ring, settings.Cut, random, Expected(ring));
        }

        using var pairs = new RingPairs<T>(algebra, a, b, c, d);
        return _subspace.Compute(pairs.Map, settings.Cut, random, Expected(pairs.Map));
    }

    private TruncatedSvd<T> Decompose(Tensor<T> tensor, ReadOnlySpan<int> rows, ReadOnlySpan<int> columns, int step, int index)
    {
        if (settings.Decomposition == DecompositionMode.Full)
            return DenseSvd.Compute(algebra.Kernels, tensor, rows, columns, settings.Cut);
        using var map = new TensorMap<T>(algebra.Kernels, tensor, rows, columns);
        return _subspace.Compute(map, settings.Cut, new RandomSequence(settings.Seed, step, index), Expected(map));
    }

    /// <summary>Near a fixed point the new bond has the sectors of the old one: a first guess for the sizes of the blocks.</summary>
    private Dictionary<Charge, int>? Expected(ILinearMap<T> map)
    {
        Leg leg = map.RowLegs[0];
        if (leg.Dimension < settings.Cut.MaxDimension / 2)
            return null;
        return Enumerable.Range(0, leg.Sectors.Length).ToDictionary(leg.SignedCharge, i => leg.Sectors[i].Dimension);
    }

    private NetworkState<T> Assemble(NetworkState<T> state, TruncatedSvd<T> first, TruncatedSvd<T> second)
    {
        (Tensor<T> southEast, Tensor<T> northWest) = Pieces(first);
        (Tensor<T> southWest, Tensor<T> northEast) = Pieces(second);
        if (state.Weights.TryGetValue(Vertical, out BondWeights? vertical))
        {
            southEast = TensorAlgebra<T>.ScaleLeg(southEast, 1, vertical);
            northWest = TensorAlgebra<T>.ScaleLeg(northWest, 1, vertical);
        }

        if (state.Weights.TryGetValue(Horizontal, out BondWeights? horizontal))
        {
            southEast = TensorAlgebra<T>.ScaleLeg(southEast, 2, horizontal);
            northWest = TensorAlgebra<T>.ScaleLeg(northWest, 2, horizontal);
        }

        var next = new NetworkState<T>(
            ImmutableSortedDictionary.Create<string, Tensor<T>>(StringComparer.Ordinal)
                .Add(NorthWest, northWest).Add(NorthEast, northEast).Add(SouthEast, southEast).Add(SouthWest, southWest),
            ImmutableSortedDictionary.Create<string, BondWeights>(StringComparer.Ordinal));
        return exponent == 0 ? next : next with
        {
            Weights = next.Weights
                .Add(Horizontal, Relative(first.Weights).Power(exponent))
                .Add(Vertical, Relative(second.Weights).Power(exponent)),
        };
    }

    /// <summary>U as a piece [bond, second row leg, first row leg] and V as [bond, second column leg, first column leg].</summary>
    private (Tensor<T> FromU, Tensor<T> FromV) Pieces(TruncatedSvd<T> svd)
    {
        BondWeights share = Relative(svd.Weights).Power((1 - exponent) / 2);
        double scale = Math.Sqrt(svd.Weights.Largest);
        using Tensor<T> u = svd.U.Permute(2, 1, 0);
        using Tensor<T> v = svd.V.Permute(0, 2, 1);
        return (TensorAlgebra<T>.ScaleLeg(u, 0, share.Scale(scale)), TensorAlgebra<T>.ScaleLeg(v, 0, share.Scale(scale)));
    }

    /// <summary>Singular values over the largest one: weights of order one, with the scale left in the pieces.</summary>
    private static BondWeights Relative(BondWeights weights) => weights.Scale(1 / weights.Largest);

    /// <summary>[u, d]: the left and right legs joined through the horizontal weights.</summary>
    private Tensor<T> HorizontallyClosed(NetworkState<T> state)
    {
        bool weighted = state.Weights.TryGetValue(Horizontal, out BondWeights? weights);
        if (state.Tensors.TryGetValue(Site, out Tensor<T>? site))
        {
            using Tensor<T> scaled = weighted ? TensorAlgebra<T>.ScaleLeg(site, 0, weights!) : site.Clone();
            return TensorAlgebra<T>.Trace(scaled, [0], [2]);
        }

        using Tensor<T> northWest = weighted ? TensorAlgebra<T>.ScaleLeg(state[NorthWest], 0, weights!) : state[NorthWest].Clone();
        using Tensor<T> sum = RingTrace.Close(algebra, northWest, state[NorthEast], state[SouthEast]);
        return algebra.Contract(sum, [1, 2], state[SouthWest], [1, 2]);
    }
}
