using System.Collections.Immutable;
using System.Numerics;
using TensorRG.Boundary;
using TensorRG.CoarseGraining;
using TensorRG.Models.Lattices;
using TensorRG.Tensors;
using TensorRG.Tensors.Kernels;

namespace TensorRG.Physics.Measurements;

/// <summary>One network of a model, its impurities, and its boundary fixed points through a sequence of bond dimensions.</summary>
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

    private readonly BoundarySolver<T> _solver;
    private readonly InitialNetwork<T> _network;
    private readonly Tensor<T>[] _first;
    private readonly Tensor<T>[] _second;

    /// <summary>Builds the tensors.</summary>
    /// <param name="backend">Where the linear algebra runs.</param>
    /// <param name="model">The network with an impurity for each observable.</param>
    /// <param name="settings">Settings of the fixed points.</param>
    public BoundaryBranch(Backend backend, ModelNetwork model, BoundarySettings settings)
    {
        _solver = new BoundarySolver<T>(new TensorAlgebra<T>(backend), settings);
        _network = NetworkTensors.Build<T>(model.Network);
        _first = [.. model.Impurities.Select(i => NetworkTensors.Insertion<T>(model.Network, i, 1))];
        _second = [.. model.Impurities.Select(i => NetworkTensors.Insertion<T>(model.Network, i, 2))];
    }

    /// <summary>Fixed points in ascending bond dimension, each started from the one before.</summary>
    /// <param name="bondDimensions">The bond dimensions.</param>
    /// <param name="orderBy">Index of the observable whose field chooses an ordered state at the start; null for none.</param>
    /// <param name="variances">Indices of observables whose variance is wanted.</param>
    /// <param name="stop">Stops at the next chance.</param>
    public IReadOnlyList<BranchPoint> Run(
        ImmutableArray<int> bondDimensions, int? orderBy, IReadOnlyCollection<int> variances, CancellationToken stop)
    {
        BoundaryState<T>? state = orderBy is { } index ? Ordered(index, bondDimensions[0], stop) : null;
        var points = new List<BranchPoint>();
        foreach (int chi in bondDimensions)
        {
            state = _solver.Solve(_network.Site, chi, state, stop);
            points.Add(Read(state, chi, variances, stop));
        }

        return points;
    }

    public void Dispose()
    {
        _network.Site.Dispose();
        foreach (Tensor<T> tensor in (Tensor<T>[])[.. _first, .. _second])
            tensor.Dispose();
    }

    private BranchPoint Read(BoundaryState<T> state, int chi, IReadOnlyCollection<int> variances, CancellationToken stop)
    {
        double sites = _network.SitesPerTensor;
        Complex logZ = (state.LogEigenvalue + _network.LogPrefactor) / sites;
        Complex[] means = [.. _first.Select(b => _solver.Expectation(state, _network.Site, b) / sites)];
        (double, double)[] responses = [.. _first.Select((_, i) => variances.Contains(i) ? Variance(state, i, chi, stop) : (double.NaN, double.NaN))];
        return new BranchPoint(chi, logZ, means, responses, state.Residual, state.IsConverged);
    }

    private BoundaryState<T> Ordered(int observable, int largest, CancellationToken stop)
    {
        using Tensor<T> site = InField(observable, OrderingField * Unit(observable));
        return _solver.Solve(site, Math.Min(largest, OrderingBondDimension), null, stop);
    }

    /// <summary>d&lt;O&gt;/dx per site in a field x on O itself, which is the variance of O per site.</summary>
    private (double Value, double Error) Variance(BoundaryState<T> state, int observable, int chi, CancellationToken stop)
    {
        return Ridders.Derivative(Mean, DerivativeStep * Unit(observable));

        double Mean(double field)
        {
            using Tensor<T> site = InField(observable, field);
            using Tensor<T> insertion = TensorAlgebra<T>.Add(_first[observable], _second[observable], Scalar.FromReal<T>(field));
            BoundaryState<T> shifted = _solver.Solve(site, chi, state, stop);
            return _solver.Expectation(shifted, site, insertion).Real / _network.SitesPerTensor;
        }
    }

    /// <summary>A + x B1 + x^2 B2 / 2: the weights in a field, to the order that a variance knows.</summary>
    private Tensor<T> InField(int observable, double field)
    {
        using Tensor<T> linear = TensorAlgebra<T>.Add(_network.Site, _first[observable], Scalar.FromReal<T>(field));
        return TensorAlgebra<T>.Add(linear, _second[observable], Scalar.FromReal<T>(field * field / 2));
    }

    private double Unit(int observable)
        => TensorAlgebra<T>.LargestMagnitude(_network.Site) / TensorAlgebra<T>.LargestMagnitude(_first[observable]);
}
