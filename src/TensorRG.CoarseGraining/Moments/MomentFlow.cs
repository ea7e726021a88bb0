using System.Numerics;
using TensorRG.CoarseGraining.Higher;
using TensorRG.Tensors;
using TensorRG.Tensors.Decompositions;

namespace TensorRG.CoarseGraining.Moments;

/// <summary>
/// Moments &lt;O^n&gt; of sums over all sites of finite tori: HOTRG with higher-order impurity tensors (S. Morita, N. Kawashima,
/// Comput. Phys. Commun. 236, 65 (2019)). T^(n) is the tensor of a block weighted with the n-th power of the block's O; all are joined with the isometries
/// of one density, T'^(n) = sum_k binom(n, k) join(T^(k), T^(n-k)), and &lt;O^n&gt; = Tr T^(n) / Tr T^(0). Several observables share the isometries,
/// which follow the density of T^(0) and, unlike the published ones, that of every T^(1): what responds to a field is kept too.
/// Cost (order + 1)(order + 2) / 2 times that of HOTRG for each observable, O(chi^7), memory O(chi^5). The flow gives the same bits on any number of threads.
/// </summary>
/// <typeparam name="T">Element type.</typeparam>
public sealed class MomentFlow<T>
    where T : unmanaged, INumberBase<T>
{
    private const int HighestOrder = 4;

    /// <summary>Weight of the first moments in the density that the isometries come from, as measured (DEVELOPERS.md).</summary>
    private const double DerivativeWeight = 0.3;

    /// <summary>|Tr T^(0)| relative to the norm of the transfer matrix below which weights cancel, and a mean says nothing of a block.</summary>
    private const double LeastTrace = 0.1;

    private readonly PairJoin<T> _pair;
    private readonly InitialNetwork<T> _network;
    private readonly List<MomentRecord> _records = [];
    private MomentState<T> _state;

    /// <summary>A flow at step 0 for one observable.</summary>
    /// <param name="algebra">Contractions and kernels.</param>
    /// <param name="cut">How many states a bond keeps.</param>
    /// <param name="network">Where it starts.</param>
    /// <param name="insertions">As one member of the list of the other constructor.</param>
    /// <exception cref="ArgumentException">The insertions do not fit.</exception>
    /// <exception cref="ArithmeticException">The transfer matrix of one vertex is zero or not finite.</exception>
    public MomentFlow(TensorAlgebra<T> algebra, CutRule cut, InitialNetwork<T> network, IReadOnlyList<Tensor<T>> insertions)
        : this(algebra, cut, network, [insertions])
    {
    }

    /// <summary>A flow at step 0.</summary>
    /// <param name="algebra">Contractions and kernels.</param>
    /// <param name="cut">How many states a bond keeps.</param>
    /// <param name="network">Where it starts.</param>
    /// <param name="observables">
    /// For each observable the vertex tensors weighted with o^n, n = 1 .. order (1 to 4), o being the observable of one vertex. They have the legs of the
    /// network's tensor, and on a graded network tensor n has n times the flux of tensor 1: an observable that is odd under a spin flip may keep the
    /// grading. One whose parts have different charges needs the network without grading.
    /// </param>
    /// <exception cref="ArgumentException">The insertions do not fit.</exception>
    /// <exception cref="ArithmeticException">The transfer matrix of one vertex is zero or not finite.</exception>
    public MomentFlow(TensorAlgebra<T> algebra, CutRule cut, InitialNetwork<T> network, IReadOnlyList<IReadOnlyList<Tensor<T>>> observables)
    {
        ArgumentNullException.ThrowIfNull(algebra);
        ArgumentNullException.ThrowIfNull(cut);
        ArgumentNullException.ThrowIfNull(network);
        ArgumentNullException.ThrowIfNull(observables);
        foreach (IReadOnlyList<Tensor<T>> insertions in observables)
            Check(network.Site, insertions);
        _pair = new PairJoin<T>(algebra, cut);
        _network = network;
        CompensatedSum logScale = default;
        logScale.Add(network.LogPrefactor);
        BlockPowers<T>[] powers = [.. observables.Select(o => BlockPowers<T>.Begin(o, network.SitesPerTensor))];
        _state = Settle(new MomentState<T>(network.Site.Clone(), [.. powers], [.. powers.Select(static _ => Complex.Zero)], logScale), default);
    }

    /// <summary>Completed steps.</summary>
    public int Step => _records.Count - 1;

    /// <summary>One record for each torus from one vertex (step 0) to the present one.</summary>
    public IReadOnlyList<MomentRecord> Records => _records;

    /// <summary>Doubles the torus, vertically in odd steps and horizontally in even ones, and returns the record of the new one.</summary>
    /// <exception cref="ArithmeticException">The step failed: a decomposition did not converge, or Z vanished or overflowed. The flow stays where it was.</exception>
    public MomentRecord Advance()
    {
        bool vertical = (Step + 1) % 2 == 1;
        using MomentState<T>? turned = vertical ? null : _state.Turn();
        MomentState<T> oriented = turned ?? _state;
        TruncatedEigen<T> isometry = _pair.Isometry(oriented.Site, [.. oriented.Observables.Select(static o => o.First)], DerivativeWeight);
        using Tensor<T> vectors = isometry.Vectors;
        MomentState<T> joined = oriented.Join(_pair, vectors);
        if (!vertical)
        {
            using MomentState<T> standing = joined;
            joined = standing.Turn();
        }

        MomentState<T> before = _state;
        _state = Settle(joined, isometry.Truncation);
        before.Dispose();
        return _records[^1];
    }

    private static void Check(Tensor<T> site, IReadOnlyList<Tensor<T>> insertions)
    {
        ArgumentNullException.ThrowIfNull(insertions);
        if (insertions.Count is < 1 or > HighestOrder)
            throw new ArgumentException($"An observable comes with 1 to {HighestOrder} insertions, not {insertions.Count}.", nameof(insertions));
        Charge flux = Charge.Zero;
        for (int n = 1; n <= insertions.Count; n++)
        {
            flux = site.Legs[0].Group.Add(flux, insertions[0].Flux);
            if (!insertions[n - 1].Legs.SequenceEqual(site.Legs))
                throw new ArgumentException($"Insertion {n} has legs {insertions[n - 1]}, the network's tensor has {site}.", nameof(insertions));
            if (insertions[n - 1].Flux != flux)
                throw new ArgumentException($"Insertion {n} must have {n} times the flux of the first. Take the network without grading.", nameof(insertions));
        }
    }

    /// <summary>Rescales a new state, measures from its means and adds its record; an exception leaves the flow as it was.</summary>
    private MomentState<T> Settle(MomentState<T> raw, Truncation truncation)
    {
        using MomentState<T> owned = raw;
        int step = _records.Count;
        double vertices = Math.Pow(2, step);
        Tensor<T> matrix = TensorAlgebra<T>.Trace(owned.Site, [1], [3]);
        double norm = TensorAlgebra<T>.Norm(matrix);
        if (!(norm > 0) || !double.IsFinite(norm))
            throw new ArithmeticException($"Step {step}: the transfer matrix has norm {norm}. All weights cancel or vanish, or the numbers left the range of doubles.");
        using MomentState<T> scaled = owned.Scale(1 / norm, Math.Log(norm) / vertices);
        MomentState<T> state = scaled.Centre(LeastTrace);
        Complex trace = Scalar.ToComplex(state.Trace);
        CompensatedSum torus = state.LogScale;
        torus.Add(Math.Log(trace.Magnitude) / vertices);
        _records.Add(new MomentRecord
        {
            Step = step,
            Sites = vertices * _network.SitesPerTensor,
            AspectRatio = step % 2 == 1 ? 2 : 1,
            BondDimension = Math.Max(state.Site.Legs[0].Dimension, state.Site.Legs[1].Dimension),
            LogZTorusPerSite = torus.Value / _network.SitesPerTensor,
            TorusPhase = trace.Phase,
            Moments = state.Moments(central: false),
            CentralMoments = state.Moments(central: true),
            DiscardedWeight = truncation.DiscardedFraction,
            Notices = [.. truncation.Notices],
        });
        return state;
    }
}
