using System.Collections.Immutable;
using System.Numerics;
using TensorRG.Tensors;
using TensorRG.Tensors.Decompositions;

namespace TensorRG.CoarseGraining.Loop;

/// <summary>
/// Tensor-network renormalisation by loop optimisation (S. Yang, Z.-C. Gu, X.-G. Wen, Phys. Rev. Lett. 118, 110504 (2017)) on a checkerboard of two
/// tensors A and B: the bonds of every second plaquette are filtered, four tensors round one plaquette in four are split into eight pieces that
/// reproduce the whole ring best, and these join to a new A and a new B. Lengths grow by sqrt 2, the lattice turns by 45 degrees. Cost O(chi^6).
/// </summary>
/// <remarks>
/// What a step calls one tensor is the pair A, B from step 1 on: that step only reads the uniform network as a checkerboard, so that the torus of the pair,
/// closed over (1, 1) and (1, -1), has the shape and the size that other schemes reach with one tensor after as many steps.
/// </remarks>
/// <typeparam name="T">Element type.</typeparam>
/// <param name="algebra">Contractions and kernels.</param>
/// <param name="settings">The user's choices.</param>
internal sealed class LoopScheme<T>(TensorAlgebra<T> algebra, SchemeSettings settings) : IScheme<T>
    where T : unmanaged, INumberBase<T>
{
    private const string Site = "site";
    private const string SublatticeA = "a";
    private const string SublatticeB = "b";

    /// <summary>Discarded weight below which nothing was cut.</summary>
    private const double Exact = 1e-27;

    private const int MostSweeps = 60;

    /// <summary>The sweeps end when one lowers the cost by less than this share of it.</summary>
    private const double LeastGain = 1e-3;

    /// <summary>Relative cost that round-off hides.</summary>
    private const double Noise = 1e-15;

    private readonly EntanglementFilter<T> _filter = new(algebra);
    private readonly RingSplit<T> _split = new(algebra, settings.Cut);
    private readonly PieceJoin<T> _join = new(algebra);

    /// <inheritdoc/>
    public int ShapePeriod => 1;

    /// <inheritdoc/>
    public NetworkState<T> Begin(Tensor<T> site) => NetworkState<T>.Of(Site, site.Clone());

    /// <inheritdoc/>
    public CoarseStep<T> Step(NetworkState<T> state, int step)
    {
        if (state.Tensors.TryGetValue(Site, out Tensor<T>? site))
            return new CoarseStep<T>(Pair(site.Clone(), site.Clone()), 0, []);
        using Tensor<T> a = Unit(state[SublatticeA], out double scaleA), b = Unit(state[SublatticeB], out double scaleB);
        FilteredPair<T> filtered = _filter.Apply(a, b);
        using Tensor<T> filteredA = Unit(filtered.A, out double moreA), filteredB = Unit(filtered.B, out double moreB);
        Tensor<T>[] ring = PlaquetteRing.Of(filteredA, filteredB);
        Tensor<T>[] pieces = _split.Pieces(ring, filtered.Weights, out double discarded, out ImmutableArray<string> notices);
        if (discarded > Exact)
            discarded = Optimise(ring, pieces);
        using Tensor<T> nextA = _join.SideBySide(pieces), nextB = _join.Stacked(pieces);
        T scale = Scalar.FromReal<T>(scaleA * scaleB * moreA * moreB);
        return new CoarseStep<T>(Pair(TensorAlgebra<T>.Scale(nextA, scale), TensorAlgebra<T>.Scale(nextB, scale)), discarded, notices);
    }

    /// <inheritdoc/>
    public Tensor<T> TransferMatrix(NetworkState<T> state)
    {
        if (state.Tensors.TryGetValue(Site, out Tensor<T>? site))
            return TensorAlgebra<T>.Trace(site, [1], [3]);
        using Tensor<T> staircase = algebra.Contract(state[SublatticeB], [1, 2], state[SublatticeA], [3, 0]);
        using Tensor<T> ordered = staircase.Permute(0, 1, 3, 2);
        using Tensor<T> rows = ordered.Fuse(0, 2, Arrow.In);
        return rows.Fuse(1, 2, Arrow.Out);
    }

    /// <inheritdoc/>
    public NetworkState<T> Rescale(NetworkState<T> state, double factor)
        => state.Tensors.ContainsKey(Site)
            ? state.Rescaled(Site, factor)
            : state.Rescaled(SublatticeA, Math.Sqrt(factor)).Rescaled(SublatticeB, Math.Sqrt(factor));

    /// <inheritdoc/>
    public (Leg Vertical, Leg Horizontal) Bonds(NetworkState<T> state)
    {
        Tensor<T> tensor = state.Tensors.TryGetValue(Site, out Tensor<T>? site) ? site : state[SublatticeA];
        return (tensor.Legs[0], tensor.Legs[1]);
    }

    /// <inheritdoc/>
    public double AspectRatio(int step) => 1;

    /// <summary>The relative cost at the end.</summary>
    private double Optimise(Tensor<T>[] ring, Tensor<T>[] pieces)
    {
        var optimizer = new LoopOptimizer<T>(algebra, ring, pieces);
        double cost = optimizer.Cost();
        for (int sweep = 0; sweep < MostSweeps; sweep++)
        {
            double gain = optimizer.Sweep();
            cost -= gain;
            if (!(gain > LeastGain * Math.Max(cost, Noise)))
                break;
        }

        return Math.Max(optimizer.Cost(), Noise);
    }

    private static Tensor<T> Unit(Tensor<T> tensor, out double norm)
    {
        norm = TensorAlgebra<T>.Norm(tensor);
        return TensorAlgebra<T>.Scale(tensor, Scalar.FromReal<T>(1 / norm));
    }

    private static NetworkState<T> Pair(Tensor<T> a, Tensor<T> b)
        => new(
            ImmutableSortedDictionary.Create<string, Tensor<T>>(StringComparer.Ordinal).Add(SublatticeA, a).Add(SublatticeB, b),
            ImmutableSortedDictionary.Create<string, BondWeights>(StringComparer.Ordinal));
}
