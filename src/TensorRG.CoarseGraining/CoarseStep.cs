using System.Collections.Immutable;
using System.Numerics;

namespace TensorRG.CoarseGraining;

/// <summary>What a scheme returns from one step.</summary>
/// <typeparam name="T">Element type.</typeparam>
/// <param name="State">The coarser network, not yet rescaled.</param>
/// <param name="DiscardedWeight">Largest discarded weight of the step's truncations, relative to the total.</param>
/// <param name="Notices">Remarks for the record, such as a cut inside a multiplet.</param>
public sealed record CoarseStep<T>(NetworkState<T> State, double DiscardedWeight, ImmutableArray<string> Notices)
    where T : unmanaged, INumberBase<T>;
