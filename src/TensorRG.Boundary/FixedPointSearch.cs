using System.Numerics;
using TensorRG.Tensors;
using TensorRG.Tensors.Decompositions;

namespace TensorRG.Boundary;

/// <summary>Finds the dominant eigenvector of a row: rounds of <see cref="RowProblem{T}"/> at growing bond dimensions.</summary>
/// <typeparam name="T">Element type.</typeparam>
/// <param name="algebra">Contractions and kernels.</param>
/// <param name="settings">The user's choices.</param>
/// <param name="report">Is told of every round.</param>
internal sealed class FixedPointSearch<T>(TensorAlgebra<T> algebra, BoundarySettings settings, Action<BoundaryProgress>? report)
    where T : unmanaged, INumberBase<T>
{
    private const double GrowthTolerance = 1e-6;
    private const int GrowthIterations = 200;
    private const int TrialIterations = 15;
    private const int Patience = 100;
    private const double SmallestSchmidt = 1e-16;

    private readonly SubspaceExpansion<T> _expansion = new(algebra);

    /// <summary>
    /// The dominant eigenvector as a uniform state of at most a bond dimension. The last growth goes a quarter too far and is cut back to the largest Schmidt
    /// values: the directions that two vertices propose are spread less well over the charges.
    /// </summary>
    /// <param name="row">A[u, l, d, r].</param>
    /// <param name="bondDimension">Most states on the bond.</param>
    /// <param name="start">A state with the vertical leg of the row, or null.</param>
    /// <param name="stop">Ends the search with an exception.</param>
    public FixedPoint<T> Run(Tensor<T> row, int bondDimension, UniformState<T>? start, CancellationToken stop)
    {
        UniformState<T> first = start ?? StartingState.Create(algebra, row.Legs[2], settings.Seed);
        var problem = new RowProblem<T>(algebra, row, settings.Seed) { State = Reduced(first, Cut(bondDimension)) };
        int iterations = 0;
        while (problem.State.BondDimension < bondDimension)
        {
            iterations += Converge(problem, GrowthTolerance, GrowthIterations, stop);
            Reduce(problem, bondDimension);
            if (!Grow(problem, bondDimension + (bondDimension / 4) + 1))
                break;
            if (problem.State.BondDimension <= bondDimension)
                continue;
            iterations += Converge(problem, GrowthTolerance, TrialIterations, stop);
            problem.Replace(Reduced(problem.State, Cut(bondDimension)));
            break;
        }

        iterations += Converge(problem, settings.Tolerance, settings.MaxIterations, stop);
        UniformState<T> reduced = Reduced(problem.State, Cut(bondDimension));
        if (reduced.BondDimension < problem.State.BondDimension)
        {
            // AL is an isometry no longer: its columns may reach into states of much less weight than their own.
            problem.Replace(reduced);
            iterations += Converge(problem, settings.Tolerance, settings.MaxIterations, stop);
        }

        return new FixedPoint<T>(Reduced(problem.State, UnitaryFactor.KeepAll), problem.Residual, iterations, problem.Residual <= settings.Tolerance);
    }

    private static CutRule Cut(int bondDimension) => new(bondDimension, RelativeFloor: SmallestSchmidt);

    private void Reduce(RowProblem<T> problem, int bondDimension)
    {
        problem.Replace(Reduced(problem.State, Cut(bondDimension)));
        problem.Iterate();
    }

    private bool Grow(RowProblem<T> problem, int bondDimension)
    {
        using Tensor<T> two = problem.TwoVertices();
        int next = Math.Min(bondDimension, 2 * problem.State.BondDimension);
        UniformState<T>? larger = _expansion.Expand(problem.State, two, next);
        if (larger is null)
            return false;
        problem.Replace(larger);
        return true;
    }

    /// <summary>Rounds until the residual is small or no longer falls; their number.</summary>
    private int Converge(RowProblem<T> problem, double tolerance, int most, CancellationToken stop)
    {
        double best = double.PositiveInfinity;
        int since = 0;
        for (int n = 1; n <= most; n++)
        {
            stop.ThrowIfCancellationRequested();
            problem.Iterate();
            report?.Invoke(new BoundaryProgress(problem.State.BondDimension, n, problem.Residual, problem.Applications));
            since = problem.Residual < 0.5 * best ? 0 : since + 1;
            best = since == 0 ? problem.Residual : best;
            if (problem.Residual <= tolerance || since > Patience)
                return n;
        }

        return most;
    }

    /// <summary>The state in the basis of those of its Schmidt vectors that a rule keeps, the heaviest with charge zero.</summary>
    private UniformState<T> Reduced(UniformState<T> state, CutRule rule)
    {
        TruncatedSvd<T> svd = DenseSvd.Compute(algebra.Kernels, state.C, [0], [1], rule);
        using Tensor<T> u = svd.U, v = svd.V;
        UniformState<T> turned = BondShape.Turn(algebra, state, u, v);
        Charge leading = Leading(svd.Weights);
        return leading == Charge.Zero ? turned : BondShape.Shift(algebra, turned, turned.Bond.Group.Negate(leading));
    }

    private static Charge Leading(BondWeights weights)
    {
        int best = 0;
        for (int sector = 1; sector < weights.Values.Length; sector++)
        {
            if (weights.Values[sector][0] > weights.Values[best][0])
                best = sector;
        }

        return weights.Leg.Sectors[best].Charge;
    }
}
