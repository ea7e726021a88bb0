using System.Collections.Immutable;
using System.Numerics;
using TensorRG.Tensors;
using TensorRG.Tensors.Decompositions;

namespace TensorRG.CoarseGraining.Loop;

internal sealed class LoopScheme<T>(TensorAlgebra<T> algebra, SchemeSettings settings) : IScheme<T>
    where T : unmanaged, INumberBase<T>
{
    public static int MaxSweeps = 40;
    public static double Stop = 1e-3;
    public static int Memory = 0;
    public static int Newton = 1000;
    public static int Match = -1;
    public static int Repeats = 1;
    public static double Alpha = 0;
    public static bool Filter = true;
    public static bool Verbose;
    public static bool WeightedStart = false;
    private const string Site = "site";
    private const string First = "a";
    private const string Second = "b";
    private readonly EntanglementFilter<T> _filter = new(algebra);

    public int ShapePeriod => 1;

    public NetworkState<T> Begin(Tensor<T> site) => NetworkState<T>.Of(Site, site.Clone());

    public CoarseStep<T> Step(NetworkState<T> state, int step)
    {
        if (state.Tensors.TryGetValue(Site, out Tensor<T>? site))
            return new CoarseStep<T>(State(site.Clone(), site.Clone()), 0, []);
        (Tensor<T> a, Tensor<T> b) = (state[First], state[Second]);
        double beforeA = TensorAlgebra<T>.Norm(a), beforeB = TensorAlgebra<T>.Norm(b);
        BondWeights[]? weights = null;
        if (Filter)
        {
            (a, b) = (TensorAlgebra<T>.Scale(a, Scalar.FromReal<T>(1 / TensorAlgebra<T>.Norm(a))), TensorAlgebra<T>.Scale(b, Scalar.FromReal<T>(1 / TensorAlgebra<T>.Norm(b))));
        }

        if (Filter)
            for (int n = 0; n < Repeats; n++)
                (a, b, weights) = _filter.Apply(a, b);
        double normA = TensorAlgebra<T>.Norm(a), normB = TensorAlgebra<T>.Norm(b);
        a = TensorAlgebra<T>.Scale(a, Scalar.FromReal<T>(1 / normA));
        b = TensorAlgebra<T>.Scale(b, Scalar.FromReal<T>(1 / normB));
        double scale = normA * normB * (Filter ? beforeA * beforeB : 1);
        Tensor<T>[] ring = PlaquetteRing.Of(a, b);
        // outer legs: ring[0]: l, u ; bonds kinds: A.r 0, B.d(A.u) 1, A.l 2, B.u(A.d) 3.
        // A: u 1, l 2, d 3, r 0.  B: u 3, l 0, d 1, r 2.
        int[][] kinds = [[2, 1], [3, 2], [0, 3], [1, 0]];
        // bond before ring[i] is kind (i+3)%4 and after is kind i.
        if (Filter && Alpha != 0)
        {
            for (int i = 0; i < 4; i++)
                for (int j = 0; j < 2; j++)
                    ring[i] = TensorAlgebra<T>.ScaleLeg(ring[i], 1 + j, weights![kinds[i][j]].Power(Alpha));
        }

        var pieces = new Tensor<T>[8];
        double discarded = 0;
        var notices = ImmutableArray<string>.Empty;
        for (int i = 0; i < 4; i++)
        {
            Tensor<T> m = ring[i];
            bool weighted = Filter && WeightedStart;
            if (weighted)
                m = TensorAlgebra<T>.ScaleLeg(TensorAlgebra<T>.ScaleLeg(m, 0, weights![(i + 3) % 4].Power(0.5)), 3, weights![i].Power(0.5));
            TruncatedSvd<T> svd = DenseSvd.Compute(algebra.Kernels, m, [0, 1], [2, 3], settings.Cut);
            BondWeights root = svd.Weights.Power(0.5);
            pieces[2 * i] = TensorAlgebra<T>.ScaleLeg(svd.U, 2, root);
            pieces[(2 * i) + 1] = TensorAlgebra<T>.ScaleLeg(svd.V, 0, root);
            if (weighted)
            {
                pieces[2 * i] = TensorAlgebra<T>.ScaleLeg(pieces[2 * i], 0, weights![(i + 3) % 4].Power(-0.5));
                pieces[(2 * i) + 1] = TensorAlgebra<T>.ScaleLeg(pieces[(2 * i) + 1], 2, weights![i].Power(-0.5));
            }

            discarded = Math.Max(discarded, svd.Truncation.DiscardedFraction);
        }

        if (discarded > 1e-28)
        {
            var optimizer = new LoopOptimizer<T>(algebra, ring, pieces);
            double cost = optimizer.Cost(), start = cost;
            int sweep = 0;
            var newton = new GaussNewton<T>(algebra, optimizer);
            var sweeps = new AcceleratedSweeps<T>(optimizer, Memory);
            for (; sweep < MaxSweeps; sweep++)
            {
                double next = sweep >= Newton ? newton.Advance(cost) : Memory < 2 ? cost - optimizer.Sweep() : sweeps.Advance(cost);
                double gain = cost - next;
                cost = next;
                if (gain < Stop * Math.Max(cost, 1e-16))
                    break;
            }

            if (Verbose)
                Console.Error.WriteLine($"  step {step} bonds {a.Legs[0].Dimension} {a.Legs[1].Dimension} svd {discarded:E1} cost {start:E2} -> {cost:E2} ({optimizer.Cost():E2}) {sweep} sweeps {sweeps.Taken}/{sweeps.Rejected} cg {newton.Inner} mu {newton.Mu:E1} weights min {(weights is null ? 0 : weights.Min(w => w.Values.Min(v => v.Min()))):E1}");
        }

        if (Filter && Alpha != 0)
        {
            for (int i = 0; i < 4; i++)
                for (int j = 0; j < 2; j++)
                    pieces[(2 * i) + j] = TensorAlgebra<T>.ScaleLeg(pieces[(2 * i) + j], 1, weights![kinds[i][j]].Power(-Alpha));
        }

        Tensor<T> x = Assemble(pieces[3], pieces[0], pieces[7], pieces[4], false);
        Tensor<T> y = Assemble(pieces[6], pieces[5], pieces[2], pieces[1], true);
        if (Match >= 0)
        {
            double ratio = BlockTorus.Before(algebra, a, b, Match) - BlockTorus.After(algebra, x, y, Match);
            if (Verbose)
                Console.Error.WriteLine($"      ln ratio {ratio:E2}, shift per site {ratio / Math.Pow(2, step):E2}; others {string.Join(" ", Enumerable.Range(0, 5).Select(k => (BlockTorus.Before(algebra, a, b, k) - BlockTorus.After(algebra, x, y, k)).ToString("E2")))}");
            scale *= Math.Exp(ratio / 2);
        }

        return new CoarseStep<T>(State(TensorAlgebra<T>.Scale(x, Scalar.FromReal<T>(scale)), TensorAlgebra<T>.Scale(y, Scalar.FromReal<T>(scale))), discarded, notices);
    }

    /// <summary>
    /// Pieces round a plaquette: nw faces south-east and so on. For even: S4[x, o=r, right=d], S1[left=d, o=l, x], S8[x, o=u.. see below.
    /// </summary>
    private Tensor<T> Assemble(Tensor<T> nw, Tensor<T> ne, Tensor<T> se, Tensor<T> sw, bool second)
    {
        // X: S4 = B_NE [x2, r(o), d(right)], S1 = A_NW [d(left), l(o), x1], S8 = B_SW [x4, l(o), u(right)], S5 = A_SE [u(left), r(o), x3]
        // Y: S7 = B_SW [r(left), d(o), x4], S6 = A_SE [x3, d(o), l(right)], S3 = B_NE [l(left), u(o), x2], S2 = A_NW [x1, u(o), r(right)]
        Tensor<T> upper, lower, t;
        if (!second)
        {
            upper = algebra.Contract(nw, [1], ne, [1]); // [x2, d4, d1, x1]
            lower = algebra.Contract(sw, [1], se, [1]); // [u5, x3, x4, u8]
            t = algebra.Contract(upper, [1, 2], lower, [0, 3]); // [x2 (u), x1 (r), x3 (l), x4 (d)]
            t = t.Permute(0, 2, 3, 1);
        }
        else
        {
            upper = algebra.Contract(nw, [0], ne, [2]); // [d7, x4, x3, d6]
            lower = algebra.Contract(sw, [2], se, [0]); // [x1, u2, u3, x2]
            t = algebra.Contract(upper, [0, 3], lower, [1, 2]); // [x4 (u), x3 (r), x1 (l), x2 (d)]
            t = t.Permute(0, 2, 3, 1);
        }

        if (t.Legs[0].Arrow != Arrow.In)
            t = t.ReverseArrow(0);
        if (t.Legs[1].Arrow != Arrow.In)
            t = t.ReverseArrow(1);
        if (t.Legs[2].Arrow != Arrow.Out)
            t = t.ReverseArrow(2);
        if (t.Legs[3].Arrow != Arrow.Out)
            t = t.ReverseArrow(3);
        return t;
    }

    /// <summary>M of the torus (1, 1), (1, -1).</summary>
    public Tensor<T> TransferMatrix(NetworkState<T> state)
    {
        if (state.Tensors.TryGetValue(Site, out Tensor<T>? site))
            return TensorAlgebra<T>.Trace(site, [1], [3]);
        // B[u, l, d, r] A[u, l, d, r]: B.l - A.r, B.d - A.u -> [Bu, Br, Al, Ad]
        using Tensor<T> m = algebra.Contract(state[Second], [1, 2], state[First], [3, 0]);
        using Tensor<T> ordered = m.Permute(0, 1, 3, 2);
        using Tensor<T> rows = ordered.Fuse(0, 2, Arrow.In);
        return rows.Fuse(1, 2, Arrow.Out);
    }

    public NetworkState<T> Rescale(NetworkState<T> state, double factor)
    {
        if (state.Tensors.ContainsKey(Site))
            return state.Rescaled(Site, factor);
        double each = Math.Sqrt(factor);
        return state.Rescaled(First, each).Rescaled(Second, each);
    }

    public (Leg Vertical, Leg Horizontal) Bonds(NetworkState<T> state)
    {
        Tensor<T> tensor = state.Tensors.TryGetValue(Site, out Tensor<T>? site) ? site : state[First];
        return (tensor.Legs[0], tensor.Legs[1]);
    }

    public double AspectRatio(int step) => 1;

    private static NetworkState<T> State(Tensor<T> a, Tensor<T> b)
        => new(
            ImmutableSortedDictionary.Create<string, Tensor<T>>(StringComparer.Ordinal).Add(First, a).Add(Second, b),
            ImmutableSortedDictionary.Create<string, BondWeights>(StringComparer.Ordinal));
}
