using System.Collections.Immutable;
using System.Numerics;
using TensorRG.CoarseGraining.Higher;
using TensorRG.Tensors;

namespace TensorRG.CoarseGraining.Moments;

/// <summary>All tensors of one block. Operations give a new state with its own tensors.</summary>
/// <typeparam name="T">Element type.</typeparam>
/// <param name="Site">T^(0).</param>
/// <param name="Observables">The powers of each observable, measured from its shift.</param>
/// <param name="Shifts">For each observable the number per site that was taken from it: the powers are those of O - N shift.</param>
/// <param name="LogScale">Logarithm of what was taken out of T^(0), per vertex.</param>
internal sealed record MomentState<T>(
    Tensor<T> Site, ImmutableArray<BlockPowers<T>> Observables, ImmutableArray<Complex> Shifts, CompensatedSum LogScale) : IDisposable
    where T : unmanaged, INumberBase<T>
{
    /// <summary>Tr T^(0).</summary>
    public T Trace => TensorAlgebra<T>.Trace(Site, [0, 1], [2, 3]).Elements[0];

    /// <inheritdoc/>
    public void Dispose()
    {
        Site.Dispose();
        foreach (BlockPowers<T> powers in Observables)
            powers.Dispose();
    }

    /// <summary>The network on its side: rows become columns.</summary>
    public MomentState<T> Turn()
        => this with { Site = Site.Permute(1, 0, 3, 2), Observables = [.. Observables.Select(static p => p.Permute(1, 0, 3, 2))] };

    /// <summary>Two blocks stacked, their doubled horizontal bonds cut by an isometry.</summary>
    public MomentState<T> Join(PairJoin<T> pair, Tensor<T> isometry)
        => this with { Site = pair.Join(Site, isometry), Observables = [.. Observables.Select(p => p.Join(pair, Site, isometry))] };

    /// <summary>All tensors times a factor whose logarithm per vertex is minus <paramref name="logPerVertex"/>.</summary>
    public MomentState<T> Scale(double factor, double logPerVertex)
    {
        CompensatedSum logScale = LogScale;
        logScale.Add(logPerVertex);
        return new(TensorAlgebra<T>.Scale(Site, Scalar.FromReal<T>(factor)), [.. Observables.Select(p => p.Scale(factor))], Shifts, logScale);
    }

    /// <summary>Every observable measured from its mean on the present torus, unless Z cancels: |Tr T^(0)| below <paramref name="leastTrace"/>.</summary>
    public MomentState<T> Centre(double leastTrace)
    {
        T trace = Trace;
        bool cancels = Scalar.Magnitude(trace) < leastTrace;
        T[] means = [.. Observables.Select(p => cancels ? T.Zero : p.Traces()[0] / trace)];
        return new(
            Site.Clone(),
            [.. Observables.Select((p, i) => p.Centre(Site, means[i]))],
            [.. Shifts.Select((s, i) => s + Scalar.ToComplex(means[i]))],
            LogScale);
    }

    /// <summary>The moments of each observable over powers of the sites.</summary>
    /// <param name="central">Of the distance from the mean.</param>
    public ImmutableArray<ImmutableArray<Complex>> Moments(bool central)
    {
        Complex trace = Scalar.ToComplex(Trace);
        return [.. Observables.Select((p, i) =>
        {
            Complex[] shifted = [.. p.Traces().Select(t => Scalar.ToComplex(t) / trace)];
            return Binomial.Shift(shifted, central ? -shifted[0] : Shifts[i]).ToImmutableArray();
        })];
    }
}
