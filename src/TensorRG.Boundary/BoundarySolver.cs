using System.Numerics;
using TensorRG.Tensors;

namespace TensorRG.Boundary;

/// <summary>
/// Fixed points of the row-to-row transfer matrix of a uniform square network, and what follows from them: the partition function per
/// vertex and everything that one vertex can tell. The upper and the lower fixed point are found as uniform matrix product states by
/// the variational iteration of V. Zauner-Stauber, L. Vanderstraeten, M. T. Fishman, F. Verstraete, J. Haegeman, Phys. Rev. B 97, 045145 (2018),
/// in its form for transfer matrices: M. T. Fishman, L. Vanderstraeten, V. Zauner-Stauber, J. Haegeman, F. Verstraete,
/// Phys. Rev. B 98, 235148 (2018). Neither reflection symmetry nor a Hermitian transfer matrix is assumed.
/// </summary>
/// <remarks>
/// <para>With a grading the fixed point is the symmetric one, in an ordered phase the even mixture of the phases. Without it the state is free to
/// break the symmetry: it does so in an ordered phase, started in a field, and at a transition, where it then needs fewer states.</para>
/// <para>U(1) charges are dropped: their density could not adjust. Order that alternates from row to row needs a charge to tell the two
/// states apart (Ising: the spin flip); without one the result says that it is not converged and its value means nothing.</para>
/// <para>The same inputs give the same bits on any number of threads. Cost of a round O(chi^3 D^2) for each product of a map with a vector.</para>
/// </remarks>
/// <typeparam name="T">Element type.</typeparam>
/// <param name="algebra">Contractions and kernels.</param>
/// <param name="settings">The user's choices.</param>
/// <param name="report">Is told of every round, on the thread that called; null for nobody.</param>
public sealed class BoundarySolver<T>(TensorAlgebra<T> algebra, BoundarySettings settings, Action<BoundaryProgress>? report = null)
    where T : unmanaged, INumberBase<T>
{
    private readonly FixedPointSearch<T> _search = new(algebra, settings, report);

    /// <summary>The surroundings of a row at one bond dimension.</summary>
    /// <param name="site">A[u, l, d, r]: u, l ingoing, d, r outgoing, d matching u and r matching l; without flux.</param>
    /// <param name="bondDimension">Most states on the bond of a fixed point, at least 1.</param>
    /// <param name="start">A result for the same legs at another coupling or bond dimension to go on from, or null.</param>
    /// <param name="stop">Ends the search.</param>
    /// <exception cref="ArgumentException">The legs of the tensor do not make a uniform network, or those of the start do not fit it.</exception>
    /// <exception cref="OperationCanceledException">The search was stopped.</exception>
    /// <exception cref="Tensors.Kernels.DecompositionException">NaN or infinity in the tensor, or a network without weight in the sector of the state.</exception>
    public BoundaryState<T> Solve(Tensor<T> site, int bondDimension, BoundaryState<T>? start = null, CancellationToken stop = default)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(bondDimension, 1);
        Check(site);
        double scale = TensorAlgebra<T>.LargestMagnitude(site);
        if (!(scale > 0) || !double.IsFinite(scale))
            throw new Tensors.Kernels.DecompositionException("The tensor of the network is zero or holds NaN or infinity.");
        using Tensor<T> regraded = FiniteGrading.Of(site);
        using Tensor<T> row = TensorAlgebra<T>.Scale(regraded, Scalar.FromReal<T>(1 / scale)), turned = UpsideDown.Of(row);
        if (start is not null && !start.Upper.AC.Legs[1].Equals(row.Legs[2]))
            throw new ArgumentException($"The start was found for vertical legs {start.Upper.AC.Legs[1]}, the network has {row.Legs[2]}.", nameof(start));
        FixedPoint<T> upper = _search.Run(row, bondDimension, start?.Upper, stop);
        FixedPoint<T> lower = UpsideDown.Same(row, turned)
            ? upper with { Iterations = 0 }
            : _search.Run(turned, bondDimension, start?.Lower.Turned(), stop);
        return Assemble(row, scale, upper, lower);
    }

    /// <summary>The surroundings of a row at the bond dimension of the settings, from a small random state.</summary>
    /// <inheritdoc cref="Solve(Tensor{T}, int, BoundaryState{T}?, CancellationToken)"/>
    public BoundaryState<T> Solve(Tensor<T> site, CancellationToken stop = default) => Solve(site, settings.BondDimension, null, stop);

    /// <summary>The surroundings of a row at one bond dimension after another, each going on from the last. Computed as they are asked for.</summary>
    /// <param name="site">A[u, l, d, r], as for one bond dimension.</param>
    /// <param name="bondDimensions">The bond dimensions, ascending to be of use.</param>
    /// <param name="start">A result to go on from, or null.</param>
    /// <param name="stop">Ends the search.</param>
    public IEnumerable<BoundaryState<T>> Sequence(Tensor<T> site, IEnumerable<int> bondDimensions, BoundaryState<T>? start = null, CancellationToken stop = default)
    {
        ArgumentNullException.ThrowIfNull(bondDimensions);
        BoundaryState<T>? last = start;
        foreach (int bondDimension in bondDimensions)
            yield return last = Solve(site, bondDimension, last, stop);
    }

    private BoundaryState<T> Assemble(Tensor<T> row, double scale, FixedPoint<T> upper, FixedPoint<T> lower)
    {
        UniformState<T> under = lower.State.Turned();
        var strip = new Strip<T>(algebra, upper.State, under, settings.Seed);
        (Tensor<T> left, Tensor<T> right, Complex factor) = strip.WithRow(row);
        Complex overlap = strip.WithoutRow();
        return new BoundaryState<T>
        {
            Upper = upper.State,
            Lower = under,
            FL = left,
            FR = right,
            LogEigenvalue = Complex.Log(factor / overlap) + Math.Log(scale),
            Residual = Math.Max(upper.Residual, lower.Residual),
            IsConverged = upper.IsConverged && lower.IsConverged && strip.IsUnique,
            Iterations = upper.Iterations + lower.Iterations,
            Schmidt = upper.State.SchmidtValues(algebra),
        };
    }

    /// <summary>
    /// The expectation value that a vertex measures: the network with one tensor replaced, over the network as it is.
    /// </summary>
    /// <param name="state">The surroundings of a row of <paramref name="site"/>.</param>
    /// <param name="site">The tensor of the network.</param>
    /// <param name="impurity">The tensor to put in its place, with the same legs and without flux.</param>
    /// <exception cref="ArgumentException">The legs differ.</exception>
    public Complex Expectation(BoundaryState<T> state, Tensor<T> site, Tensor<T> impurity)
    {
        ArgumentNullException.ThrowIfNull(state);
        ArgumentNullException.ThrowIfNull(site);
        ArgumentNullException.ThrowIfNull(impurity);
        if (!impurity.Legs.SequenceEqual(site.Legs) || impurity.Flux != Charge.Zero)
            throw new ArgumentException($"The impurity {impurity} does not have the legs of the site {site}.", nameof(impurity));
        var strip = new Strip<T>(algebra, state.Upper, state.Lower, settings.Seed);
        using Tensor<T> below = FiniteGrading.Of(site), above = FiniteGrading.Of(impurity);
        return strip.Vertex(state.FL, above, state.FR) / strip.Vertex(state.FL, below, state.FR);
    }

    /// <summary>
    /// Expectation values of two changed vertices of one row: the network with both, over the network as it is, at distances 1, 2, ..., count.
    /// The impurities may carry opposite charges, such as the spins of a network graded by their flip.
    /// </summary>
    /// <param name="state">The surroundings of a row of <paramref name="site"/>.</param>
    /// <param name="site">The tensor of the network.</param>
    /// <param name="left">The impurity on the left; the legs of the site, any flux.</param>
    /// <param name="right">The impurity on the right; the legs of the site, the opposite flux.</param>
    /// <param name="count">Largest distance, at least 1. Cost O(count chi^3 D^2).</param>
    /// <exception cref="ArgumentException">The legs differ, or the fluxes do not cancel.</exception>
    public IReadOnlyList<Complex> Correlation(BoundaryState<T> state, Tensor<T> site, Tensor<T> left, Tensor<T> right, int count)
    {
        ArgumentNullException.ThrowIfNull(state);
        ArgumentNullException.ThrowIfNull(site);
        ArgumentNullException.ThrowIfNull(left);
        ArgumentNullException.ThrowIfNull(right);
        ArgumentOutOfRangeException.ThrowIfLessThan(count, 1);
        if (!left.Legs.SequenceEqual(site.Legs) || !right.Legs.SequenceEqual(site.Legs))
            throw new ArgumentException($"The impurities {left} and {right} do not have the legs of the site {site}.", nameof(left));
        if (site.Legs[0].Group.Add(left.Flux, right.Flux) != Charge.Zero)
            throw new ArgumentException("The charges of the two impurities do not cancel.", nameof(right));
        var strip = new Strip<T>(algebra, state.Upper, state.Lower, settings.Seed);
        using Tensor<T> row = FiniteGrading.Of(site), first = FiniteGrading.Of(left), second = FiniteGrading.Of(right);
        return strip.Pair(state.FL, state.FR, row, first, second, count);
    }

    /// <summary>
    /// Correlation length along a row, in vertices, of operators that carry a charge: -1 / ln |lambda_q / lambda_0|, lambda_q the largest
    /// eigenvalue of the strip with that charge, for charge zero the second of all. Infinite for degenerate phases; 0 where nothing carries the
    /// charge. A finite bond dimension makes it too short, and it converges in the bond dimension more slowly than any local value.
    /// </summary>
    /// <param name="state">The surroundings of a row of <paramref name="site"/>.</param>
    /// <param name="site">The tensor of the network.</param>
    /// <param name="charge">The charge, of the group of the fixed points: the finite factors of the site's.</param>
    public double CorrelationLength(BoundaryState<T> state, Tensor<T> site, Charge charge = default)
    {
        ArgumentNullException.ThrowIfNull(state);
        ArgumentNullException.ThrowIfNull(site);
        var strip = new Strip<T>(algebra, state.Upper, state.Lower, settings.Seed);
        using Tensor<T> row = FiniteGrading.Of(site);
        double ratio = strip.Ratio(state.FL, state.FR, row, row.Legs[0].Group.Normalize(charge))?.Magnitude ?? 0;
        return ratio >= 1 ? double.PositiveInfinity : -1 / Math.Log(ratio);
    }

    private static void Check(Tensor<T> site)
    {
        ArgumentNullException.ThrowIfNull(site);
        bool uniform = site.Rank == 4 && site.Flux == Charge.Zero
            && site.Legs[0].Arrow == Arrow.In && site.Legs[1].Arrow == Arrow.In
            && site.Legs[0].Matches(site.Legs[2]) && site.Legs[1].Matches(site.Legs[3]);
        if (!uniform)
            throw new ArgumentException($"A uniform network has one tensor [u in; l in; d out; r out] without flux, d matching u and r matching l, not {site}.", nameof(site));
    }
}
