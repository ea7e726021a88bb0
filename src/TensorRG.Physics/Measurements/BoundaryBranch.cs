using System.Collections.Immutable;
using System.Numerics;
using TensorRG.Boundary;
using TensorRG.CoarseGraining;
using TensorRG.Tensors;
using TensorRG.Tensors.Kernels;

namespace TensorRG.Physics.Measurements;

/// <summary>The boundary fixed points of one branch through a sequence of bond dimensions.</summary>
/// <typeparam name="T">Element type.</typeparam>
internal sealed class BoundaryBranch<T> : IDisposable
    where T : unmanaged, INumberBase<T>
{
    /// <summary>Field that chooses an ordered state, times the largest element of the impurity over that of the vertex.</summary>
    private const double OrderingField = 0.2;

    /// <summary>First step of the derivative by the field, in the same unit.</summary>
    private const double DerivativeStep = 0.02;

    /// <summary>Bond dimension up to which the ordering field stays on.</summary>
    private const int OrderingBondDimension = 8;

    /// <summary>Residual of a first round: ln Z feels its square.</summary>
    private const double FirstTolerance = 1e-8;

    /// <summary>Residual where the bond dimension leaves less than that to see: away from criticality.</summary>
    private const double LastTolerance = 1e-13;

    /// <summary>Change of ln Z over the last bond dimensions above which the first round is good enough.</summary>
    private const double Refinable = 1e-9;

    private readonly BoundarySolver<T> _first, _last;
    private readonly InitialNetwork<T> _network;
    private readonly ImmutableArray<int> _variances;
    private readonly bool _isOrdered;
    private readonly Tensor<T>[] _insertions;
    private readonly Tensor<T>[] _squares;

    /// <summary>Builds the tensors.</summary>
    /// <param name="backend">Where the linear algebra runs.</param>
    /// <param name="branch">Network and observables.</param>
    /// <param name="seed">Seed of starting states.</param>
    public BoundaryBranch(Backend backend, Branch branch, long seed)
    {
        var algebra = new TensorAlgebra<T>(backend);
        _first = Solver(algebra, FirstTolerance, seed);
        _last = Solver(algebra, LastTolerance, seed);
        _network = NetworkTensors.Build<T>(branch.Model.Network);
        _variances = branch.Variances;
        _isOrdered = branch.IsOrdered;
        _insertions = [.. branch.Model.Impurities.Select(i => NetworkTensors.Insertion<T>(branch.Model.Network, i, 1))];
        _squares = [.. branch.Model.Impurities.Select(i => NetworkTensors.Insertion<T>(branch.Model.Network, i, 2))];
    }

    /// <summary>Fixed points in ascending bond dimension, each started from the one before; better converged where there is something to gain.</summary>
    /// <param name="bondDimensions">The bond dimensions.</param>
    /// <param name="stop">Stops at the next chance.</param>
    public IReadOnlyList<BranchPoint> Run(ImmutableArray<int> bondDimensions, CancellationToken stop)
    {
        BoundaryState<T>? state = _isOrdered ? Ordered(bondDimensions[0], stop) : null;
        var states = new List<BoundaryState<T>>();
        foreach (int chi in bondDimensions)
            states.Add(state = _first.Solve(_network.Site, chi, state, stop));
        bool refine = states.Count > 1 && Complex.Abs(states[^1].LogEigenvalue - states[^2].LogEigenvalue) < Refinable && states[^1].IsConverged;
        BoundarySolver<T> solver = refine ? _last : _first;
        return [.. states.Select((s, i) => Read(solver, refine ? _last.Solve(_network.Site, bondDimensions[i], s, stop) : s, bondDimensions[i], i >= states.Count - 2, stop))];
    }

    public void Dispose()
    {
        _network.Site.Dispose();
        foreach (Tensor<T> tensor in (Tensor<T>[])[.. _insertions, .. _squares])
            tensor.Dispose();
    }

    private static BoundarySolver<T> Solver(TensorAlgebra<T> algebra, double tolerance, long seed)
        => new(algebra, new BoundarySettings { BondDimension = 1, Tolerance = tolerance, MaxIterations = 600, Seed = seed });

    private BranchPoint Read(BoundarySolver<T> solver, BoundaryState<T> state, int chi, bool withVariances, CancellationToken stop)
    {
        double sites = _network.SitesPerTensor;
        Complex logZ = (state.LogEigenvalue + _network.LogPrefactor) / sites;
        Complex[] means = [.. _insertions.Select(b => solver.Expectation(state, _network.Site, b) / sites)];
        (double, double)[] responses = [.. _insertions.Select((_, i) => withVariances && _variances.Contains(i) ? Variance(solver, state, i, chi, stop) : (double.NaN, double.NaN))];
        return new BranchPoint(state.BondDimension, SmallestWeight(state), logZ, means, responses, state.Residual, state.IsConverged);
    }

    private static double SmallestWeight(BoundaryState<T> state)
    {
        double[] squares = [.. state.Schmidt.Values.SelectMany(static v => v).Select(static s => s * s)];
        return squares.Min() / squares.Sum();
    }

    private BoundaryState<T> Ordered(int largest, CancellationToken stop)
    {
        using Tensor<T> site = InField(0, OrderingField * Unit(0));
        return _first.Solve(site, Math.Min(largest, OrderingBondDimension), null, stop);
    }

    /// <summary>d&lt;O&gt;/dx per site in a field x on O itself, which is the variance of O per site.</summary>
    private (double Value, double Error) Variance(BoundarySolver<T> solver, BoundaryState<T> state, int observable, int chi, CancellationToken stop)
    {
        return Ridders.Derivative(Mean, DerivativeStep * Unit(observable));

        double Mean(double field)
        {
            using Tensor<T> site = InField(observable, field);
            using Tensor<T> insertion = TensorAlgebra<T>.Add(_insertions[observable], _squares[observable], Scalar.FromReal<T>(field));
            BoundaryState<T> shifted = solver.Solve(site, chi, state, stop);
            return solver.Expectation(shifted, site, insertion).Real / _network.SitesPerTensor;
        }
    }

    /// <summary>A + x B1 + x^2 B2 / 2: the weights in a field, to the order that a variance knows.</summary>
    private Tensor<T> InField(int observable, double field)
    {
        using Tensor<T> linear = TensorAlgebra<T>.Add(_network.Site, _insertions[observable], Scalar.FromReal<T>(field));
        return TensorAlgebra<T>.Add(linear, _squares[observable], Scalar.FromReal<T>(field * field / 2));
    }

    private double Unit(int observable)
    {
        double largest = TensorAlgebra<T>.LargestMagnitude(_insertions[observable]);
        return largest > 0 ? TensorAlgebra<T>.LargestMagnitude(_network.Site) / largest : 1;
    }
}
